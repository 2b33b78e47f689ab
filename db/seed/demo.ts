import type { CompanyInput } from '@/lib/contracts/company';
import { quillbackTerms, ternHollowTerms } from './scenario/terms';

type Company = Omit<CompanyInput, 'clerkOrganizationId'>;

/** Somebody of a contractor's staff who signs in with a password. */
export interface Staff {
  readonly name: string;
  readonly email: string;
  readonly role: 'owner' | 'salesperson';
}

const MARKS = {
  // A tern over the hollow of a wave.
  ternHollow:
    '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 48 48" fill="none" stroke="currentColor" stroke-width="3" stroke-linecap="round" stroke-linejoin="round"><path d="M4 16 Q15 9 24 20 Q33 9 44 16"/><path d="M24 20 L24 26"/><path d="M6 33 Q24 46 42 33"/></svg>',
  // A quill laid across a cabinet's stile.
  quillback:
    '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 48 48" fill="none" stroke="currentColor" stroke-width="3" stroke-linecap="round" stroke-linejoin="round"><rect x="6" y="6" width="12" height="36"/><path d="M16 40 Q22 16 42 8 Q42 28 24 34 Z"/><path d="M16 40 L34 17"/></svg>',
} as const;

/** Invented contractors; what they charge and promise is invented too. */
export const TERN_HOLLOW: Company = {
  slug: 'tern-hollow',
  name: 'Tern Hollow Cabinet Refacing',
  phone: '(413) 555-0142',
  licence: 'HIC 000142 (invented)',
  timeZone: 'America/New_York',
  state: 'MA',
  brand: { light: '#0b5d63', dark: '#5fb6ba', markSvg: MARKS.ternHollow },
  stripeAccountId: 'acct_ternhollow',
  settings: {
    drawPlan: [
      { label: 'Deposit', share: 300_000, due: 'signing' },
      { label: 'Materials are in', share: 400_000, due: 'materialsIn' },
      { label: 'Installation begins', share: 200_000, due: 'installing' },
      { label: 'Walk-through', share: 100_000, due: 'walkThrough' },
    ],
    ruleSet: 'MA',
    terms: ternHollowTerms,
    warrantyYears: 5,
    insurance: 'General liability and workers’ compensation; certificates on request.',
    permits: 'Tern Hollow gets the permits that the work needs.',
    disconnects: 'Plumbing, gas and electrical connections are undone and made by licensed trades.',
    startWindow: 'within six weeks of the release to the shop',
    salespersonLimitCents: 50_000,
  },
};

export const QUILLBACK: Company = {
  slug: 'quillback',
  name: 'Quillback Kitchens',
  phone: '(610) 555-0117',
  licence: null,
  timeZone: 'America/New_York',
  state: 'PA',
  brand: { light: '#7a3b1d', dark: '#d79a75', markSvg: MARKS.quillback },
  stripeAccountId: 'acct_quillback',
  settings: {
    ...TERN_HOLLOW.settings,
    terms: quillbackTerms,
    ruleSet: 'PA',
    permits: 'Quillback gets the permits that the work needs.',
    salespersonLimitCents: 0,
  },
};

export const STAFF = {
  ines: { name: 'Ines Aldaba', email: 'ines@ternhollow.example', role: 'owner' },
  rowan: { name: 'Rowan Petrie', email: 'rowan@ternhollow.example', role: 'salesperson' },
  dov: { name: 'Dov Lindqvist', email: 'dov@quillback.example', role: 'owner' },
} as const satisfies Record<string, Staff>;

export const HOMEOWNERS = {
  mara: { name: 'Mara Winslade', email: 'mara@winslade.example' },
  teo: { name: 'Teo Winslade', email: 'teo@winslade.example' },
  /** Mill Race, signed. */
  odile: { name: 'Odile Fenn', email: 'odile@fenn.example' },
  /** Gannet Court, measured. */
  casimir: { name: 'Casimir Holt', email: 'casimir@holt.example' },
  /** Alder Yard, choosing: the other household of Tern Hollow. */
  perrin: { name: 'Perrin Oake', email: 'perrin@oake.example' },
  /** Quillback's household. */
  petra: { name: 'Petra Stannard', email: 'petra@stannard.example' },
} as const;

export const JOBS = {
  millRace: { name: 'Mill Race', address: '8 Mill Race, Haddon Ferry, MA' },
  gannetCourt: { name: 'Gannet Court', address: '3 Gannet Court, Haddon Ferry, MA' },
  alderYard: { name: 'Alder Yard', address: '5 Alder Yard, Haddon Ferry, MA' },
  sorrelLane: { name: 'Sorrel Lane', address: '14 Sorrel Lane, Haddon Ferry, MA' },
  thistleRow: { name: 'Thistle Row', address: '21 Thistle Row, Lower Marsh, PA' },
} as const;
