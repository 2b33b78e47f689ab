import { createHash, randomBytes, randomUUID } from 'node:crypto';
import canonicalize from 'canonicalize';

/** A fresh row id. */
export const newId = (): string => randomUUID();

/** SHA-256 of UTF-8 text, in lower-case hex. */
export const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** A token of 32 random bytes for a link, and its hash, which alone is stored. */
export function newToken(): { token: string; hash: string } {
  const token = randomBytes(32).toString('base64url');
  return { token, hash: sha256(token) };
}

/** SHA-256 of a value's canonical JSON (RFC 8785), so that the order of its keys does not matter. */
export function sha256OfJson(value: object): string {
  const text = canonicalize(value);
  if (text === undefined) throw new Error('This value has no JSON.');
  return sha256(text);
}
