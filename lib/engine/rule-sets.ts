import { inches } from './length';
import { cents } from './money';
import type { Cents, Sixtyfourths } from './types';

/** A sum that a deposit is measured by: a fixed one, a fraction of the contract, or what is ordered specially. */
export type CapPart =
  | { readonly kind: 'fixed'; readonly cents: Cents }
  | { readonly kind: 'fraction'; readonly numerator: number; readonly denominator: number }
  | { readonly kind: 'specialOrder' };

/** A deposit cap (L2). */
export interface CapRule {
  readonly take: 'least' | 'greatest' | 'sum';
  readonly parts: readonly CapPart[];
  /** Applies to contracts over this sum only. */
  readonly over?: Cents;
  readonly source: string;
}

/** A right to cancel (L1). */
export interface CancellationRule {
  readonly businessDays: number;
  readonly source: string;
}

export interface CancellationRules {
  /** Sales below these sums carry no right: at the buyer's home, and elsewhere away from the seller's place. */
  readonly leastAtHome: Cents;
  readonly leastElsewhere: Cents;
  readonly ordinary: CancellationRule;
  /** For buyers of 65 or over, and in a declared disaster. */
  readonly senior?: CancellationRule;
  readonly disaster?: CancellationRule;
  readonly refundBusinessDays: number;
}

export interface Notice {
  readonly code: string;
  readonly title: string;
  readonly text: string;
  readonly source: string;
}

/** The published rules by which one state's jobs are computed. Shown with source; not legal advice. */
export interface RuleSet {
  readonly id: string;
  readonly name: string;
  /** `null`: no cap is known to this rule set. */
  readonly depositCap: CapRule | null;
  /** Later draws may not run ahead of work done or material delivered. */
  readonly drawsFollowWork: boolean;
  readonly cancellation: CancellationRules;
  /** Built before this year, and more than this disturbed (0.01 ft²) in one room within 30 days (L5). */
  readonly lead: { readonly builtBefore: number; readonly limit: number; readonly source: string };
  readonly range: {
    readonly unguarded: Sixtyfourths;
    readonly guarded: Sixtyfourths;
    readonly source: string;
  };
  readonly notices: readonly Notice[];
}

const NOT_ADVICE = 'Computed from the published rule named here; not legal advice. Local law governs.';

const CHANGE_ORDER: Notice = {
  code: 'changeOrder',
  title: 'Changes are written first',
  text: `A change states its scope, the amount it adds or subtracts, and its effect on payments or the completion date, and is signed before the work. ${NOT_ADVICE}`,
  source: 'California Business and Professions Code 7159.6; good practice elsewhere',
};

const FEDERAL_NOTICES: readonly Notice[] = [
  {
    code: 'cancel',
    title: 'Right to cancel',
    text: `A sale made at your home can be cancelled until midnight of the third business day after it; Saturdays count, Sundays and federal holidays do not. What was paid comes back within 10 business days. ${NOT_ADVICE}`,
    source: '16 CFR 429',
  },
  {
    code: 'electronic',
    title: 'Electronic records',
    text: `You may have every record on paper instead, may withdraw this consent, and are told how and at what cost; it covers this job’s records; you keep your mail address current; you need a browser and a mail program; before signing you open a record to show that you can. ${NOT_ADVICE}`,
    source: '15 USC 7001(c)',
  },
  {
    code: 'lead',
    title: 'Lead-safe work',
    text: `In a house built before 1978, more than 6 ft² of painted or varnished surface disturbed in one room asks for a certified renovator, and the pamphlet is acknowledged before the work. ${NOT_ADVICE}`,
    source: '40 CFR 745',
  },
  {
    code: 'compositeWood',
    title: 'Composite wood',
    text: `Panels meet the formaldehyde limits: hardwood plywood 0.05 ppm, particleboard 0.09, MDF 0.11, thin MDF 0.13. ${NOT_ADVICE}`,
    source: 'TSCA title VI, 40 CFR 770',
  },
  CHANGE_ORDER,
];

/** Formaldehyde limits in parts per million (L7, TSCA title VI). */
export const FORMALDEHYDE_PPM = {
  hardwoodPlywood: 0.05,
  particleboard: 0.09,
  mdf: 0.11,
  thinMdf: 0.13,
} as const;

const FEDERAL: RuleSet = {
  id: 'US',
  name: 'Federal rules alone',
  depositCap: null,
  drawsFollowWork: false,
  cancellation: {
    leastAtHome: cents(2_500),
    leastElsewhere: cents(13_000),
    ordinary: { businessDays: 3, source: '16 CFR 429' },
    refundBusinessDays: 10,
  },
  lead: { builtBefore: 1978, limit: 600, source: '40 CFR 745' },
  range: {
    unguarded: inches(30),
    guarded: inches(24),
    source: 'IRC M1901.1 and fuel-gas codes (the 24 from memory); the appliance’s listing governs',
  },
  notices: FEDERAL_NOTICES,
};

const third: CapPart = { kind: 'fraction', numerator: 1, denominator: 3 };

/** Rule sets by state; what a state does not change is the federal rule. */
export const RULE_SETS: Readonly<Record<string, RuleSet>> = {
  US: FEDERAL,
  CA: {
    ...FEDERAL,
    id: 'CA',
    name: 'California',
    depositCap: {
      take: 'least',
      parts: [
        { kind: 'fixed', cents: cents(100_000) },
        { kind: 'fraction', numerator: 1, denominator: 10 },
      ],
      source: 'California Business and Professions Code 7159.5',
    },
    drawsFollowWork: true,
    cancellation: {
      ...FEDERAL.cancellation,
      senior: { businessDays: 5, source: 'California Business and Professions Code 7159' },
      disaster: { businessDays: 7, source: 'California Business and Professions Code 7159' },
    },
  },
  MA: {
    ...FEDERAL,
    id: 'MA',
    name: 'Massachusetts',
    depositCap: {
      take: 'greatest',
      parts: [third, { kind: 'specialOrder' }],
      source: 'Massachusetts General Laws chapter 142A',
    },
  },
  MD: {
    ...FEDERAL,
    id: 'MD',
    name: 'Maryland',
    depositCap: { take: 'least', parts: [third], source: 'Maryland Business Regulation 8-617' },
  },
  PA: {
    ...FEDERAL,
    id: 'PA',
    name: 'Pennsylvania',
    depositCap: {
      take: 'sum',
      parts: [third, { kind: 'specialOrder' }],
      over: cents(500_000),
      source: 'Pennsylvania Home Improvement Consumer Protection Act',
    },
  },
};
