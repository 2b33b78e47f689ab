import { installDays } from './dates';
import type { Edition, Terms } from './edition-types';
import type { LineDraft } from './price';
import type { Quantities } from './quantities';
import { ZONES, type Schedule } from './types';

/** Lead time, work and the days without a counter (T0, T1). */
export function scheduleOf(
  q: Quantities,
  drafts: readonly LineDraft[],
  edition: Edition,
  terms: Terms,
): Schedule {
  const zones = ZONES.filter((zone) => q.faces.some((face) => face.renewed && face.cabinet.zone === zone));
  let longest = edition.leadTimeDays;
  let slowest = 'the shop’s own lead time';
  let withoutCounterDays = 0;
  for (const zone of zones) {
    const made = q.made[zone];
    const options = [
      made.style,
      made.species,
      made.finish,
      made.overlay,
      made.hingeSet,
      made.pull,
      made.crown,
      made.base,
      made.lightRail,
      made.ends,
      made.drawerBox,
    ];
    for (const option of options) {
      const days = edition.leadTimeDays + (option?.leadTimeDays ?? 0);
      if (option && days > longest) {
        longest = days;
        slowest = option.name;
      }
    }
    if (made.counter.kind !== 'keep')
      withoutCounterDays = Math.max(withoutCounterDays, made.counter.leadTimeDays ?? 0);
  }
  for (const { option } of q.boxes.storage) {
    const found = edition.storage.find((one) => one.id === option);
    const days = edition.leadTimeDays + (found?.leadTimeDays ?? 0);
    if (found && days > longest) {
      longest = days;
      slowest = found.name;
    }
  }
  const labourHours = drafts.reduce((sum, draft) => sum + draft.hours, 0);
  const days = installDays(labourHours, terms.crewSize, edition.shop.crewHoursPerDay);
  return {
    readyBusinessDays: longest,
    installDays: days,
    withoutCounterDays,
    labourHours,
    because: `${longest} business days from the release, by ${slowest}; ${(labourHours / 100).toFixed(2)} hours of work for a crew of ${terms.crewSize}.`,
  };
}
