import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sorrelLane, sorrelLaneProposed } from '@/db/seed/scenario/sorrel-lane';
import { millRace, millRaceProposed } from '@/db/seed/scenario/mill-race';
import { ternHollowCosts } from '@/db/seed/scenario/costs';
import { applyChange } from '@/lib/engine/choices';
import { changePrice, contractArithmetic, partDifferences } from '@/lib/engine/contract';
import { explainDifference, unfoldLine } from '@/lib/engine/explain';
import { discountWithin, marginOf } from '@/lib/engine/margin';
import { cents, divideCents, formatCents, lineAmount, share } from '@/lib/engine/money';
import { discountOn, netAmounts, taxOn } from '@/lib/engine/tax';
import { takeoff } from '@/lib/engine/takeoff';
import type { Edition, Terms } from '@/lib/engine/edition-types';
import { EDITION, TERMS } from './scene';

describe('M1 cents are whole, a line is rounded once, half away from zero', () => {
  it('M1 $1.005 is $1.01 and −2.5 cents are −3 cents', () => {
    expect(divideCents(1005, 10)).toBe(101);
    expect(divideCents(-25, 10)).toBe(-3);
    // 0.67 of a unit at 150 cents: 100.5 → 101.
    expect(lineAmount(67, 100, cents(150))).toBe(101);
  });
  it('M1 credits mirror charges', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 10 ** 9 }), fc.integer({ min: 1, max: 10_000 }), (n, d) => {
        return divideCents(-n, d) === (divideCents(n, d) === 0 ? 0 : -divideCents(n, d));
      }),
    );
  });
  it('M1 sums are read with signs', () => {
    expect(formatCents(cents(123_450))).toBe('$1,234.50');
    expect(formatCents(cents(-300))).toBe('−$3.00');
  });
});

describe('M4 shares by largest remainder', () => {
  it('M4 $100.00 in thirds is 33.34, 33.33, 33.33, and mirrors below zero', () => {
    expect(share(cents(10_000), [1, 1, 1])).toEqual([3334, 3333, 3333]);
    expect(share(cents(-10_000), [1, 1, 1])).toEqual([-3334, -3333, -3333]);
  });
  it('M4 shares add up to the total exactly', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -(10 ** 9), max: 10 ** 9 }),
        fc
          .array(fc.integer({ min: 0, max: 10 ** 6 }), { minLength: 1, maxLength: 40 })
          .filter((w) => w.some((x) => x > 0)),
        (total, weights) => share(cents(total), weights).reduce((a, b) => a + b, 0) === total,
      ),
    );
  });
});

const taxed = (rate: number[], basis: Terms['tax']['basis'] = 'invoice'): Terms => ({
  ...TERMS,
  tax: { mode: 'onLines', basis, rates: { material: rate }, place: 'Test' },
});
const material = (net: number, units = 1) => ({ class: 'material' as const, net: cents(net), units });

describe('M3 tax', () => {
  // Streamlined Sales and Use Tax Agreement, section 324.
  it('M3 $5.39 at 8.25 % is 0.44', () => {
    expect(taxOn([material(539)], taxed([82_500]))).toBe(44);
  });
  it('M3 3 × $1.15 at 8.25 % is 0.27 by item and 0.28 by invoice', () => {
    expect(taxOn([material(345, 3)], taxed([82_500], 'item'))).toBe(27);
    expect(taxOn([material(345, 3)], taxed([82_500]))).toBe(28);
  });
  it('M3 rates of a class are added up first', () => {
    // 0.5 % and 0.5 % of $1.00: 0.005 each would round up twice to 2 cents; together 1 cent.
    expect(taxOn([material(100)], taxed([5_000, 5_000]))).toBe(1);
  });
  it('M9 none where the contractor pays tax on materials, or with an exemption on file', () => {
    const terms = taxed([82_500]);
    expect(taxOn([material(539)], { ...terms, tax: { ...terms.tax, mode: 'onMaterials' } })).toBe(0);
    expect(taxOn([material(539)], { ...terms, tax: { ...terms.tax, exemption: 'EX-1' } })).toBe(0);
  });
  it('M1 a discount is spread over the lines before tax', () => {
    expect(netAmounts([cents(1000), cents(2000), cents(0)], cents(100))).toEqual([967, 1933, 0]);
    const terms: Terms = { ...taxed([100_000]), discount: { kind: 'percent', ppm: 100_000 } };
    const plain = takeoff(sorrelLane, EDITION, sorrelLaneProposed, { ...terms, discount: { kind: 'none' } });
    const less = takeoff(sorrelLane, EDITION, sorrelLaneProposed, terms);
    expect(less.discount).toBe(Math.round(plain.subtotal / 10));
    expect(less.tax).toBeLessThan(plain.tax);
    expect(less.total).toBe(less.subtotal - less.discount + less.tax);
  });
  it('M3 a discount never exceeds the subtotal', () => {
    expect(discountOn(cents(500), { kind: 'amount', cents: cents(900) })).toBe(500);
  });
});

describe('M2 every line knows its parts and its zone', () => {
  const taken = takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS);
  it('M2 total = Σ lines − discount + tax, and each line is its quantity times its price', () => {
    const steps = { each: 1, squareFoot: 100, foot: 768, sheet: 1, hour: 100, lump: 1 };
    for (const line of taken.lines) {
      const exact = (line.quantity * line.unitPrice) / steps[line.unit];
      expect(Math.abs(line.amount - exact)).toBeLessThanOrEqual(0.5);
      expect(line.because).not.toBe('');
    }
    expect(taken.lines.reduce((sum, line) => sum + line.amount, 0)).toBe(taken.subtotal);
  });
  it('M2 a line’s parts are parts of the takeoff', () => {
    const known = new Set(
      [...taken.fronts, ...taken.mouldings, ...taken.panels, ...taken.boxes, ...taken.counters].map(
        (part) => part.mark,
      ),
    );
    for (const front of taken.fronts) known.add(front.opening).add(front.cabinet);
    for (const line of taken.lines) for (const part of line.parts) expect(known).toContain(part);
  });
  it('M2 a line unfolds to the openings that made it', () => {
    const steps = unfoldLine(taken, 'fronts.wall');
    expect(steps.find((step) => step.mark === 'N-06-1')?.formula).toBe('16 in × 38 5/16 in = 4.2569 ft²');
    expect(steps.at(-1)?.formula).toContain(
      taken.lines.find((line) => line.code === 'fronts.wall')?.quantityText,
    );
  });
});

describe('explain', () => {
  it('reasons add up to the difference and name what changed', () => {
    const before = takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS);
    const after = takeoff(
      sorrelLane,
      EDITION,
      applyChange(sorrelLaneProposed, { key: 'crown', zone: 'kitchen', option: 'stepped-4-1-4' }),
      TERMS,
    );
    const reasons = explainDifference(before, after);
    expect(reasons.reduce((sum, reason) => sum + reason.amount, 0)).toBe(after.total - before.total);
    const texts = reasons.map((reason) => reason.text).join('\n');
    expect(texts).toContain('Stepped crown, 4 1/4 in');
    expect(texts).toContain('14 fronts shorter by 13/16 in');
  });
});

describe('M6 sunk cost after the release', () => {
  const signed = takeoff(millRace, EDITION, millRaceProposed, TERMS);
  const wanted = takeoff(
    millRace,
    EDITION,
    applyChange(millRaceProposed, { key: 'finish', zone: 'kitchen', option: 'paint-4' }),
    TERMS,
  );
  it('M6 before the release a change costs the difference of the totals', () => {
    expect(changePrice(signed, wanted, EDITION, false)).toMatchObject({
      restocking: 0,
      amount: wanted.total - signed.total,
    });
  });
  it('M6 after it each removed part adds the published charge', () => {
    const price = changePrice(signed, wanted, EDITION, true);
    const fronts = price.charges.find((charge) => charge.part === 'front');
    expect(fronts?.marks).toHaveLength(signed.fronts.length);
    expect(fronts?.amount).toBe(signed.fronts.length * 4200);
    expect(price.amount).toBe(wanted.total - signed.total + price.restocking);
  });
  it('A1 parts to stop and to add are named by their marks', () => {
    const pulled = takeoff(
      millRace,
      EDITION,
      applyChange(millRaceProposed, { inside: 'N-01-2', option: null }),
      TERMS,
    );
    expect(partDifferences(signed, pulled)).toEqual({
      removed: [
        { kind: 'box', mark: 'N-01-2-P1' },
        { kind: 'box', mark: 'N-01-2-P2' },
      ],
      added: [],
    });
  });
});

describe('M7 contract arithmetic', () => {
  it('M7 18,750.00 − 425.00 = 18,325.00; + 1,260.00 = 19,585.00', () => {
    // As on AIA G701.
    expect(contractArithmetic(cents(1_875_000), [cents(-42_500)], cents(126_000), 3)).toEqual({
      original: 1_875_000,
      netOfPrevious: -42_500,
      before: 1_832_500,
      thisOrder: 126_000,
      after: 1_958_500,
      days: 3,
    });
  });
});

describe('M8 cost and margin', () => {
  it('M8 cost, margin and share of a job', () => {
    const taken = takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS);
    const margin = marginOf(taken, ternHollowCosts);
    expect(margin.cost + margin.margin).toBe(taken.subtotal - taken.discount);
    expect(margin.share).toBeGreaterThan(350_000);
  });
  it('M8 an edition has no field for a cost', () => {
    type Keys<T> = T extends readonly (infer U)[]
      ? Keys<U>
      : T extends object
        ? keyof T | Keys<T[keyof T]>
        : never;
    type Costly = Extract<Keys<Edition>, `${string}${'cost' | 'Cost'}${string}`>;
    const none: [Costly] extends [never] ? true : false = true;
    expect(none).toBe(true);
    expect(JSON.stringify(EDITION).toLowerCase()).not.toContain('"cost');
  });
  it('M8 a discount at the limit of a role is allowed, a cent more is not', () => {
    expect(discountWithin(cents(10_000), { kind: 'amount', cents: cents(500) }, 50_000)).toBe(true);
    expect(discountWithin(cents(10_000), { kind: 'amount', cents: cents(501) }, 50_000)).toBe(false);
  });
});

describe('M10 counters and known damage', () => {
  it('M10 a priced counter is charged by area, edge, splash and cut-outs; an allowance is one sum', () => {
    const with_ = (option: string) =>
      takeoff(
        sorrelLane,
        EDITION,
        applyChange(sorrelLaneProposed, { key: 'counter', zone: 'kitchen', option }),
        TERMS,
      );
    expect(with_('laminate').lines.map((line) => line.code)).toEqual(
      expect.arrayContaining([
        'counter.base',
        'counter-edge.base',
        'counter-splash.base',
        'counter-cut-outs.base',
        'counter.island',
      ]),
    );
    const stone = with_('stone-allowance');
    expect(
      stone.lines.find(
        (line) =>
          line.zone === 'kitchen' &&
          line.unit === 'lump' &&
          line.class === 'other' &&
          line.code.startsWith('counter'),
      )?.amount,
    ).toBe(520_000);
    expect(stone.schedule.withoutCounterDays).toBe(12);
  });
  it('M10 damage found at the survey is priced at the agreed rates and noted', () => {
    const damaged = {
      ...sorrelLane,
      cabinets: sorrelLane.cabinets.map((cabinet) =>
        cabinet.id === 'N-01' ? { ...cabinet, condition: 'damagedFloor' as const } : cabinet,
      ),
    };
    const taken = takeoff(damaged, EDITION, sorrelLaneProposed, TERMS);
    const sound = takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS);
    expect(taken.total - sound.total).toBe(18_500);
    expect(taken.notes.find((note) => note.code === 'condition.floor')).toMatchObject({ amount: 18_500 });
  });
});
