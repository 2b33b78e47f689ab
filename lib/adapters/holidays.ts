import { allForYear } from '@18f/us-federal-holidays';

/**
 * Federal holidays of the years from one date's to another's, as calendar dates: the statutory day and the day on which
 * it is observed, both.
 */
export function federalHolidays(fromYear: number, toYear: number): ReadonlySet<string> {
  const days = new Set<string>();
  // New Year's Day can be observed in the year before.
  for (let year = fromYear - 1; year <= toYear + 1; year++) {
    for (const shifted of [true, false]) {
      const options = { shiftSaturdayHolidays: shifted, shiftSundayHolidays: shifted };
      for (const { dateString } of allForYear(year, options)) days.add(padded(dateString));
    }
  }
  return days;
}

/** `2026-07-04`, whichever way the library writes its figures. */
const padded = (date: string): string =>
  date
    .split('-')
    .map((part) => part.padStart(2, '0'))
    .join('-');
