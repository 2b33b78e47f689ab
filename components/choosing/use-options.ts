'use client';

import { useMemo } from 'react';
import type { Edition, Terms } from '@/lib/engine/edition-types';
import type { Cents, Choices, OptionState, Survey, ZoneOrKitchen } from '@/lib/engine/types';
import { optionStates } from './compute';
import type { DecisionKey } from './decisions';

interface Asked {
  readonly survey: Survey;
  readonly edition: Edition;
  readonly choices: Choices;
  readonly terms: Terms;
  readonly totalNow: Cents;
  readonly at: DecisionKey;
  readonly scope: ZoneOrKitchen;
  /** The opening whose inside is at hand. */
  readonly opening: string | null;
}

/** The options of the decision at hand, each with the difference it would make now. */
export function useOptions({
  survey,
  edition,
  choices,
  terms,
  at,
  scope,
  opening,
}: Asked): readonly OptionState[] {
  return useMemo(() => {
    if (at !== 'inside') return optionStates(survey, edition, choices, terms, { key: at, zone: scope });
    return opening === null ? [] : optionStates(survey, edition, choices, terms, { inside: opening });
  }, [survey, edition, choices, terms, at, scope, opening]);
}
