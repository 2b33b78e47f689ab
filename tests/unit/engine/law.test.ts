import { describe, expect, it } from 'vitest';
import { sorrelLane, sorrelLaneProposed } from '@/db/seed/scenario/sorrel-lane';
import { appliance, frame, opening, upper } from '@/db/seed/scenario/build';
import { federalHolidays } from '@/lib/adapters/holidays';
import { businessDaysAfter, installDays, readyDate } from '@/lib/engine/dates';
import { EngineError } from '@/lib/engine/error';
import { facesOf } from '@/lib/engine/faces';
import { leadReading } from '@/lib/engine/hazards';
import { inches } from '@/lib/engine/length';
import {
  cancellationDeadline,
  cancellationRule,
  depositCap,
  draws,
  drawsAfterOrder,
  refundDeadline,
  ruleSetOf,
} from '@/lib/engine/law';
import { cents } from '@/lib/engine/money';
import { FORMALDEHYDE_PPM } from '@/lib/engine/rule-sets';
import { takeoff } from '@/lib/engine/takeoff';
import { CHOICES, EDITION, oneDoor, survey, TERMS } from './scene';

const holidays = federalHolidays(2026, 2028);

describe('L1 cooling-off', () => {
  // 16 CFR 429; the dates computed by hand from its rule.
  it.each([
    ['2026-07-01', '2026-07-07'],
    ['2026-07-02', '2026-07-08'],
    ['2026-11-25', '2026-11-30'],
    ['2027-07-02', '2027-07-07'],
    ['2027-12-29', '2028-01-04'],
  ])('L1 signed %s, until midnight of %s', (signed, until) => {
    const rule = cancellationRule(ruleSetOf('US'), { total: cents(1_000_000), place: 'home' });
    expect(rule && cancellationDeadline(signed, rule, holidays)).toBe(until);
  });
  it('L8 neither the statutory nor the observed day of a holiday counts', () => {
    // July 4, 2026 is a Saturday, observed on Friday the 3rd.
    expect(holidays.has('2026-07-04')).toBe(true);
    expect(holidays.has('2026-07-03')).toBe(true);
    // New Year's Day of 2028 is a Saturday, observed on December 31, 2027.
    expect(holidays.has('2027-12-31')).toBe(true);
  });
  it('L1 small sales and sales at the seller’s place carry no right', () => {
    const at = (total: number, place: 'home' | 'elsewhere' | 'sellersPlace') =>
      cancellationRule(ruleSetOf('US'), { total: cents(total), place });
    expect(at(2_500, 'home')).not.toBeNull();
    expect(at(2_499, 'home')).toBeNull();
    expect(at(13_000, 'elsewhere')).not.toBeNull();
    expect(at(12_999, 'elsewhere')).toBeNull();
    expect(at(1_000_000, 'sellersPlace')).toBeNull();
  });
  it('L1 California gives five days to buyers of 65 and seven in a disaster', () => {
    const sale = { total: cents(1_000_000), place: 'home' as const };
    const days = (more: object) => cancellationRule(ruleSetOf('CA'), { ...sale, ...more })?.businessDays;
    expect(days({})).toBe(3);
    expect(days({ buyerIsSenior: true })).toBe(5);
    expect(days({ buyerIsSenior: true, inDisaster: true })).toBe(7);
  });
  it('L1 the refund is due within ten business days, counted the same way', () => {
    // From Tue 2026-12-01: 2, 3, 4, 5, 7, 8, 9, 10, 11, 12 December; Saturdays count.
    expect(refundDeadline('2026-12-01', ruleSetOf('US'), holidays)).toBe('2026-12-12');
  });
});

describe('L2 deposit caps', () => {
  const cap = (state: string, total: number, special = 0) =>
    depositCap(ruleSetOf(state).depositCap, cents(total * 100), cents(special * 100));
  it('L2 California, B&P 7159.5: the lesser of $1,000 and 10 %', () => {
    expect(cap('CA', 15_000)).toBe(100_000);
    expect(cap('CA', 8_000)).toBe(80_000);
  });
  it('L2 Massachusetts, 142A: the greater of a third and the special-order cost', () => {
    expect(cap('MA', 12_000, 5_000)).toBe(500_000);
    expect(cap('MA', 12_000, 1_000)).toBe(400_000);
  });
  it('L2 Maryland, 8-617: a third, rounded down', () => {
    expect(cap('MD', 10_000)).toBe(333_333);
  });
  it('L2 Pennsylvania, over $5,000: a third plus special order', () => {
    expect(cap('PA', 12_000, 3_000)).toBe(700_000);
    expect(cap('PA', 5_000)).toBeNull();
  });
  it('L2 never above the contract sum', () => {
    expect(cap('MA', 1_000, 5_000)).toBe(100_000);
  });
  it('L2 an unknown rule set is a listed error', () => {
    expect(() => ruleSetOf('toString')).toThrow(EngineError);
  });
});

describe('M4 payments under a cap', () => {
  const plan = [
    { label: 'Deposit', share: 500_000, due: 'signing' },
    { label: 'Materials', share: 300_000, due: 'materialsIn' },
    { label: 'Walk-through', share: 200_000, due: 'walkThrough' },
  ];
  it('M4 the first is the smaller of its share and the cap, the rest goes to the later ones', () => {
    const found = draws(cents(1_000_000), plan, ruleSetOf('MD'));
    expect(found.map((draw) => draw.amount)).toEqual([333_333, 400_000, 266_667]);
    expect(found.reduce((sum, draw) => sum + draw.amount, 0)).toBe(1_000_000);
  });
  it('M4 the first share is rounded down', () => {
    expect(draws(cents(10_001), plan, ruleSetOf('US'))[0]?.amount).toBe(5_000);
  });
  it('M4 an order’s amount is shared over the open payments', () => {
    expect(drawsAfterOrder([cents(400_000), cents(200_000)], cents(-30_000))).toEqual([380_000, 190_000]);
    expect(drawsAfterOrder([cents(0), cents(0)], cents(101))).toEqual([51, 50]);
  });
});

describe('L5 lead', () => {
  // 40 CFR 745.
  const rule = ruleSetOf('US').lead;
  it('L5 one face of a 24 × 36 door is 6.00 ft²', () => {
    const door = survey(
      [
        oneDoor({
          action: 'replace',
          frame: frame({
            opening: {
              n: 1,
              kind: 'door',
              width: inches(15),
              height: inches(27),
              existing: [{ width: inches(24), height: inches(36) }],
            },
          }),
        }),
      ],
      { yearBuilt: 1960 },
    );
    // Both faces of the front that comes off.
    expect(leadReading(door, facesOf(door), rule)).toEqual({ applies: true, area: 1200, overLimit: true });
  });
  it('L5 an unknown year counts as before 1978, and 1978 itself is not before', () => {
    const of = (yearBuilt: number | null) => {
      const kitchen = survey([oneDoor()], { yearBuilt });
      return leadReading(kitchen, facesOf(kitchen), rule).applies;
    };
    expect([of(null), of(1977), of(1978)]).toEqual([true, true, false]);
  });
  it('L5 what is not coated is not counted', () => {
    const bare = survey([oneDoor({ coated: false })], { yearBuilt: 1960 });
    expect(leadReading(bare, facesOf(bare), rule).area).toBe(0);
  });
  it('L5 the house of 1974 is noted with its area', () => {
    const { notes } = takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS);
    expect(notes.find((note) => note.code === 'lead.area')?.homeowner).toContain('40 CFR 745');
  });
});

describe('L6 range', () => {
  // IRC M1901.1 and fuel-gas codes, the 24 from memory; the listing governs.
  const over = (bottom: number, hood: boolean) =>
    takeoff(
      survey(
        [
          upper(
            'N-01',
            { at: 60, width: 30, bottom, height: 90 - bottom },
            frame(opening(1, 'pair', 27, 87 - bottom)),
          ),
        ],
        {
          appliances: [
            appliance('N-range', 'range', { wall: 'N', at: 60, width: 30, bottom: 0, height: 36, depth: 26 }),
            ...(hood
              ? [
                  appliance('N-hood', 'hood', {
                    wall: 'N',
                    at: 60,
                    width: 30,
                    bottom: 58,
                    height: 4,
                    depth: 18,
                  }),
                ]
              : []),
          ],
        },
      ),
      EDITION,
      CHOICES,
      TERMS,
    ).notes.some((note) => note.code === 'range.clearance');
  it('L6 30 in to an unprotected cabinet, 24 to a protected one', () => {
    expect([over(66, false), over(65, false)]).toEqual([false, true]);
    expect([over(62, true), over(59, true)]).toEqual([false, true]);
  });
});

describe('L7 composite wood', () => {
  it('L7 the limits of TSCA title VI', () => {
    expect(FORMALDEHYDE_PPM).toEqual({
      hardwoodPlywood: 0.05,
      particleboard: 0.09,
      mdf: 0.11,
      thinMdf: 0.13,
    });
  });
});

describe('T1 dates', () => {
  it('T1 the ready date counts business days from the release', () => {
    // From Wed 2026-12-16: 17, 18, 21, 22, 23, 24, 28 (25 is Christmas).
    expect(readyDate('2026-12-16', 7, holidays)).toBe('2026-12-28');
    expect(businessDaysAfter('2026-12-16', 0, holidays, 'notSunday')).toBe('2026-12-16');
  });
  it('T1 install days from labour hours and crew size', () => {
    expect(installDays(5_600, 2, 7)).toBe(4);
    expect(installDays(5_601, 2, 7)).toBe(5);
  });
  it('T1 the longest lead time counts', () => {
    const birch = takeoff(
      sorrelLane,
      EDITION,
      { ...sorrelLaneProposed, kitchen: { ...sorrelLaneProposed.kitchen, drawerBox: 'birch' } },
      TERMS,
    );
    expect(birch.schedule.readyBusinessDays).toBe(25);
    expect(takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS).schedule.readyBusinessDays).toBe(20);
  });
});
