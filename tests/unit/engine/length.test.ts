import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatFeet,
  formatLength,
  inches,
  LENGTH_SENTENCE,
  parseLength,
  roundDown,
  roundUp,
  sixtyfourths,
  toMillimetres,
} from '@/lib/engine/length';

const read = (text: string): number | string => {
  const parsed = parseLength(text);
  return parsed.ok ? parsed.value : parsed.sentence;
};

describe('D1 a length counts 64ths of an inch', () => {
  // 1 in = 25.4 mm exactly: international yard and pound agreement of 1959.
  it('D1 24 1/2 in is 622.3 mm, and 1/32 in is 0.79375 mm', () => {
    expect(toMillimetres(inches(24.5))).toBeCloseTo(622.3, 10);
    expect(toMillimetres(sixtyfourths(2))).toBeCloseTo(0.79375, 10);
  });
  it('D1 refuses what is no whole number of 64ths', () => {
    expect(() => inches(0.01)).toThrow(RangeError);
    expect(() => sixtyfourths(1.5)).toThrow(RangeError);
  });
});

describe('D2 reads a length as a tape is read', () => {
  // The forms are the rule's own list.
  it.each([
    ['24 1/2', 24.5],
    ['24-1/2"', 24.5],
    ['24 1/2"', 24.5],
    ['24½', 24.5],
    ['24.5', 24.5],
    [`2'-0 1/2"`, 24.5],
    [`2' 1/2"`, 24.5],
    ['622.3 mm', 24.5],
    ['3/16', 0.1875],
    [`6'`, 72],
    [' 12 ', 12],
  ])('D2 %s', (text, value) => {
    expect(read(text)).toBe(value * 64);
  });
  it('D2 62.2cm is converted exactly and stored to the nearest 64th', () => {
    // 622 / 25.4 × 64 = 1567.24…
    expect(read('62.2cm')).toBe(1567);
  });
  it('D3 600 mm is stored as 23 5/8 in', () => {
    expect(read('600 mm')).toBe(1512);
    expect(formatLength(sixtyfourths(1512))).toBe('23 5/8');
  });
  it('D2 keeps the text as it was typed', () => {
    expect(parseLength(' 24½ ')).toMatchObject({ ok: true, typed: ' 24½ ' });
  });
  it.each([
    '',
    'abc',
    '24 1/3',
    '1/0',
    '24"5',
    '--3',
    '-4',
    '1e3',
    '24 1/2 mm',
    '12 in 3',
    '24..5',
    '9'.repeat(50),
  ])('D2 refuses %j with one sentence that shows a form', (text) => {
    expect(parseLength(text)).toEqual({ ok: false, sentence: LENGTH_SENTENCE });
  });
  it('D2 never throws, whatever is typed', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 60 }), (text) => {
        const parsed = parseLength(text);
        return parsed.ok
          ? Number.isSafeInteger(parsed.value) && parsed.typed === text
          : parsed.sentence !== '';
      }),
      { numRuns: 2000 },
    );
  });
  it('D2 reads back every sixteenth that is shown', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 40_000 }), (sixteenths) => {
        const length = sixtyfourths(sixteenths * 4);
        return read(formatLength(length)) === length;
      }),
    );
  });
});

describe('D3 each size is rounded once, at its end', () => {
  it('D3 fronts go down to 1/16, veneer up to 1/8', () => {
    expect(roundDown(1003, 16)).toBe(1000);
    expect(roundDown(1004, 16)).toBe(1004);
    expect(roundUp(1001, 8)).toBe(1008);
    expect(roundUp(1000, 8)).toBe(1000);
  });
  it('D3 73 1/64 in shows as 6′ 1″, and half a sixteenth goes up', () => {
    expect(formatFeet(sixtyfourths(73 * 64 + 1))).toBe('6′ 1″');
    expect(formatLength(sixtyfourths(2))).toBe('1/16');
    expect(formatLength(sixtyfourths(64 * 12 - 2))).toBe('12');
  });
});
