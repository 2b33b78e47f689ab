import { ok, refuse, type Result } from '@/lib/contracts/result';
import { chosenIn, clash, find, optionsOf } from '@/lib/engine/choices';
import { takeoff } from '@/lib/engine/takeoff';
import { CHOICE_KEYS, ZONES, type Choices } from '@/lib/engine/types';
import type { Kitchen } from '../job/load-kitchen';

/**
 * What choices come to in a kitchen, in cents, computed from scratch. Refused when an option is not in the edition
 * or when two of them do not go together.
 */
export function priceChoices(kitchen: Kitchen, choices: Choices): Result<number> {
  const { survey, edition, terms } = kitchen;
  for (const zone of ZONES) {
    const here = chosenIn(choices, zone);
    for (const key of CHOICE_KEYS) {
      if (!find(optionsOf(edition, key), here[key])) {
        return refuse('invalid', `The price book has no such ${key}: ${here[key]}.`);
      }
    }
    const found = clash(edition, here);
    if (found) return refuse('invalid', found.reason);
  }
  return ok(takeoff(survey, edition, choices, terms).total);
}
