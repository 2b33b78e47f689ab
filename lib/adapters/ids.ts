import { createHash, randomBytes, randomUUID } from 'node:crypto';

/** A fresh row id. */
export const newId = (): string => randomUUID();

/** SHA-256 of UTF-8 text, in lower-case hex. */
export const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** A token of 32 random bytes for a link, and its hash, which alone is stored. */
export function newToken(): { token: string; hash: string } {
  const token = randomBytes(32).toString('base64url');
  return { token, hash: sha256(token) };
}

/** JSON as RFC 8785 writes it: no spaces, keys by UTF-16 code units, numbers and strings as JSON.stringify has them. */
function canonicalJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value) ?? 'null';
  const members = Object.entries(value)
    .filter(([, member]) => member !== undefined)
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([key, member]) => `${JSON.stringify(key)}:${canonicalJson(member)}`);
  return `{${members.join(',')}}`;
}

/** SHA-256 of a value's canonical JSON, so that a value read back from the database hashes the same. */
export const sha256OfJson = (value: object): string => sha256(canonicalJson(value));
