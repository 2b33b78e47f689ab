/** SHA-256 (FIPS 180-4) of a text's UTF-8 bytes, lower-case hex. The same in the browser and on the server. */
export async function sha256Hex(text: string): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text));
  return [...new Uint8Array(digest)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
