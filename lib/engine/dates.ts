import type { CalendarDate } from './types';

const DAY = 86_400_000;

/** Days since 1970-01-01 of a calendar date. Throws `RangeError` when it is none. */
function dayNumber(date: CalendarDate): number {
  const found = /^(\d{4})-(\d{2})-(\d{2})$/.exec(date);
  const at = found ? Date.UTC(Number(found[1]), Number(found[2]) - 1, Number(found[3])) : NaN;
  if (Number.isNaN(at) || new Date(at).toISOString().slice(0, 10) !== date)
    throw new RangeError(`${date} is no calendar date.`);
  return at / DAY;
}

const fromDayNumber = (day: number): CalendarDate => new Date(day * DAY).toISOString().slice(0, 10);

export const addDays = (date: CalendarDate, days: number): CalendarDate =>
  fromDayNumber(dayNumber(date) + days);

/** 0 is Sunday. */
export const weekday = (date: CalendarDate): number => (dayNumber(date) + 4) % 7;

export type BusinessWeek = 'notSunday' | 'mondayToFriday';

/**
 * The `count`-th business day after a date: any day but Sunday (or but Saturday and Sunday) and `holidays`, of which
 * both the statutory and the observed day are listed (L1).
 */
export function businessDaysAfter(
  date: CalendarDate,
  count: number,
  holidays: ReadonlySet<CalendarDate>,
  week: BusinessWeek,
): CalendarDate {
  let day = dayNumber(date);
  let left = count;
  while (left > 0) {
    day += 1;
    const now = fromDayNumber(day);
    const of = weekday(now);
    const free = of === 0 || (week === 'mondayToFriday' && of === 6) || holidays.has(now);
    if (!free) left -= 1;
  }
  return fromDayNumber(day);
}

/** Ready date: business days of the longest lead time from the release to the shop (T1). */
export const readyDate = (
  releasedOn: CalendarDate,
  readyBusinessDays: number,
  holidays: ReadonlySet<CalendarDate>,
): CalendarDate => businessDaysAfter(releasedOn, readyBusinessDays, holidays, 'mondayToFriday');

/** Whole working days for so many hundredths of an hour by a crew (T1). */
export const installDays = (hours: number, crewSize: number, hoursPerDay: number): number =>
  Math.ceil(hours / (100 * crewSize * hoursPerDay));
