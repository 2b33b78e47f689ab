import canonicalize from 'canonicalize';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { newToken, sha256, sha256OfJson } from '@/lib/adapters/ids';

describe('hashes', () => {
  it('are SHA-256 over UTF-8', () => {
    // FIPS 180-2, appendix B.1; the second from memory of the empty message's digest.
    expect(sha256('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
    expect(sha256('')).toBe('e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855');
  });

  it('of JSON are over its canonical form (RFC 8785), as a package of that name writes it', () => {
    const values = fc.property(fc.jsonValue(), (value) => {
      const held = { value, b: 1, a: 2, 10: 3, 9: 4, '\u20ac': 5, '\ud83d\ude00': 6, '\ufb33': 7 };
      expect(sha256OfJson(held)).toBe(sha256(canonicalize(held) ?? ''));
    });
    fc.assert(values, { numRuns: 500 });
  });

  it('of tokens lead from the token to what is stored, and no two tokens are alike', () => {
    const made = Array.from({ length: 100 }, newToken);
    for (const { token, hash } of made) expect(sha256(token)).toBe(hash);
    expect(new Set(made.map(({ token }) => token)).size).toBe(100);
  });
});
