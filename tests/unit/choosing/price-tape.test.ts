import { describe, expect, it } from 'vitest';
import { longBlade, shortBlade } from '@/components/price-tape/blade';
import { differenceWords, groupLines } from '@/components/price-tape/words';
import type { Cents, PriceLine, ZoneOrKitchen } from '@/lib/engine/types';

describe('the price tape', () => {
  it('says the difference in words; sums worked by hand: $18,462 against $17,222 is $1,240 more', () => {
    expect(differenceWords(18_462_00, 17_222_00, 'signed')).toBe('$1,240 more than signed');
    expect(differenceWords(17_222_00, 18_462_00, 'firstEstimate')).toBe(
      '$1,240 less than the first estimate',
    );
    expect(differenceWords(100, 100, 'signed')).toBe('the same as signed');
    expect(differenceWords(18_462_50, 17_222_00, 'signed')).toBe('$1,240.50 more than signed');
  });

  it('has a tick at every $100 and a numeral at every $1,000 and nowhere else', () => {
    for (const blade of [shortBlade(17_222_00, 18_462_00), longBlade(17_222_00, 18_462_00)]) {
      const wanted: number[] = [];
      for (let cents = blade.fromCents; cents <= blade.toCents; cents += 100_00) wanted.push(cents);
      expect(blade.ticks.map((tick) => tick.cents)).toEqual(wanted);
      for (const tick of blade.ticks) expect(tick.numeral).toBe(tick.cents % 1_000_00 === 0);
    }
  });

  it('on a phone shows $2,000 to either side of the total, to the nearest thousand', () => {
    const blade = shortBlade(17_222_00, 18_462_00);
    expect([blade.fromCents, blade.toCents]).toEqual([16_000_00, 20_000_00]);
    // (18,462 - 16,000) / 4,000 and (17,222 - 16,000) / 4,000.
    expect(blade.end).toBeCloseTo(61.55, 6);
    expect(blade.hook).toBeCloseTo(30.55, 6);
  });

  it('names the side on which a hook lies that is out of the phone’s window', () => {
    expect(shortBlade(12_000_00, 18_462_00).hookBeyond).toBe('left');
    expect(shortBlade(24_000_00, 18_462_00).hookBeyond).toBe('right');
    expect(shortBlade(17_222_00, 18_462_00).hookBeyond).toBeNull();
  });

  it('on a laptop keeps hook and end in sight however far they lie apart', () => {
    for (const [baseline, total] of [
      [17_222_00, 18_462_00],
      [18_462_00, 9_100_00],
      [5_000_00, 42_000_00],
      [400_00, 300_00],
    ] as const) {
      const blade = longBlade(baseline, total);
      expect(blade.hookBeyond).toBeNull();
      for (const place of [blade.hook, blade.end]) {
        expect(place).toBeGreaterThan(0);
        expect(place).toBeLessThan(100);
      }
      expect(blade.hook < blade.end).toBe(baseline < total);
    }
  });

  it('unrolls into groups that hold every line once and add up to the lines', () => {
    const line = (code: string, zone: ZoneOrKitchen, amount: number): PriceLine => ({
      code,
      label: code,
      zone,
      class: 'material',
      unit: 'each',
      quantity: 1,
      quantityText: '1',
      unitPrice: amount as Cents,
      amount: amount as Cents,
      parts: [],
      because: 'it is there',
    });
    const lines = [
      line('a', 'kitchen', 500),
      line('b', 'wall', 1250),
      line('c', 'base', -300),
      line('d', 'wall', 1),
    ];
    const groups = groupLines(lines);
    expect(groups.map((group) => group.zone)).toEqual(['wall', 'base', 'kitchen']);
    expect(groups.map((group) => group.sumCents)).toEqual([1251, -300, 500]);
    expect(groups.flatMap((group) => group.lines.map((one) => one.code)).sort()).toEqual([
      'a',
      'b',
      'c',
      'd',
    ]);
  });
});
