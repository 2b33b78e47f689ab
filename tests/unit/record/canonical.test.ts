import { describe, expect, it } from 'vitest';
import { CanonicalError, canonicalJson, isCanonical } from '@/lib/record/canonical';
import { sha256Hex } from '@/lib/record/hash';
import rfc8785 from '../../fixtures/rfc8785.json';

describe('R1 canonical JSON', () => {
  it('gives the bytes of RFC 8785’s own test data, keys by UTF-16 code units', () => {
    const input = {
      '\u20ac': 'Euro Sign',
      '1': 'One',
      '\u0080': 'Control\u007f',
      '\ud83d\ude02': 'Smiley',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '</script>': 'Browser Challenge',
    };
    expect(Buffer.from(canonicalJson(input), 'utf8').toString('hex')).toBe(rfc8785.weirdOutputHex);
  });

  it('writes numbers as RFC 8785 section 3.2.4 does', () => {
    // The RFC's own sample, section 3.2.2 and 3.2.4.
    expect(
      canonicalJson({ numbers: [333333333.33333329, 1e30, 4.5, 2e-3, 0.000000000000000000000000001] }),
    ).toBe('{"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27]}');
    expect(
      canonicalJson({
        string: '\u20ac$\u000f\u000aA\'\u0042\u0022\u005c\\"\u002f',
        literals: [null, true, false],
      }),
    ).toBe('{"literals":[null,true,false],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}');
  });

  it.each([
    ['undefined', { a: { b: undefined } }, 'a.b'],
    ['a BigInt', { a: [1, 2n] }, 'a[1]'],
    ['a Date', { at: new Date(0) }, 'at'],
    ['minus zero', { sum: -0 }, 'sum'],
    ['NaN', { sum: NaN }, 'sum'],
    ['infinity', { sum: Infinity }, 'sum'],
    ['a function', { f: () => 1 }, 'f'],
    ['a symbol', { s: Symbol('x') }, 's'],
    ['half a character', { text: 'a\ud83d' }, 'text'],
    ['a key with half a character', { '\udc00': 1 }, ''],
    ['a Map', { m: new Map() }, 'm'],
  ])('refuses %s instead of dropping it, and says where', (_name, value, path) => {
    const attempt = () => canonicalJson(value);
    expect(attempt).toThrow(CanonicalError);
    expect(attempt).toThrow(expect.objectContaining({ path }));
  });

  it('refuses what lies inside itself', () => {
    const knot: Record<string, unknown> = {};
    knot.self = knot;
    expect(() => canonicalJson(knot)).toThrow(CanonicalError);
  });

  it('knows a text that is not canonical', () => {
    expect(isCanonical('{"a":1,"b":2}')).toBe(true);
    for (const text of ['{"b":2,"a":1}', '{"a": 1}', '{"a":1.0}', '{"a":1', '', '{"a":1,"a":1}'])
      expect(isCanonical(text), text).toBe(false);
  });
});

describe('R1 the hash', () => {
  // FIPS 180-4, examples of SHA-256; that of the empty text from the same family of published examples.
  it.each([
    ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'],
    ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855'],
    [
      'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
      '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    ],
  ])('of "%s" is the published one', async (text, published) => {
    expect(await sha256Hex(text)).toBe(published);
  });
});
