import type { EditionCosts } from '@/lib/engine/edition-types';

/** Invented: what the two contractors' first editions cost them, in parts per million of the price. */
export const ternHollowCosts: EditionCosts = {
  version: 1,
  number: 1,
  costShare: { default: 560_000, fronts: 540_000, labour: 620_000, pulls: 500_000, mouldings: 520_000 },
};

export const quillbackCosts: EditionCosts = { version: 1, number: 1, costShare: { default: 590_000 } };
