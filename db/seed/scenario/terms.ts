import type { Terms } from '@/lib/engine/edition-types';

/** Common for lump-sum work to real property; local law decides. */
export const ternHollowTerms: Terms = {
  version: 1,
  tax: { mode: 'onMaterials', basis: 'invoice', rates: {}, place: 'Massachusetts' },
  discount: { kind: 'none' },
  crewSize: 2,
};

export const quillbackTerms: Terms = {
  ...ternHollowTerms,
  tax: { mode: 'onMaterials', basis: 'invoice', rates: {}, place: 'Pennsylvania' },
};
