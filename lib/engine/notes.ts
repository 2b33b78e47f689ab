import type { Quantities } from './quantities';
import type { EngineInput } from './takeoff';
import type { Cents, FitNote } from './types';

export function fitNotes(_input: EngineInput, _q: Quantities, _total: Cents): FitNote[] {
  return [];
}
