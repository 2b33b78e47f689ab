import type { Member } from '@/lib/contracts/actor';
import type { JobView } from '@/lib/contracts/job';
import { ensureEdition, ensureSurveyed, type Proposal } from './kitchen';
import { quillbackCosts, ternHollowCosts } from './scenario/costs';
import { ternHollowEdition } from './scenario/edition';
import { quillbackEdition } from './scenario/edition-quillback';
import { gannetCourt } from './scenario/gannet-court';
import { millRace, millRaceProposed } from './scenario/mill-race';
import { quillbackJob, quillbackJobProposed } from './scenario/quillback-job';
import { secondHousehold, secondHouseholdProposed } from './scenario/second-household';
import { sorrelLane, sorrelLaneProposed } from './scenario/sorrel-lane';

/** What a contractor settles beforehand; the rest is the household's to decide. */
const SETTLED = ['overlay', 'ends', 'drawerBox', 'counter'];

const proposal = (choices: Proposal['choices']): Proposal => ({
  name: 'Proposed to begin with',
  choices,
  decided: SETTLED,
});

/** Publishes both contractors' price books. A job opened afterwards is priced from them. */
export async function ensurePriceBooks({
  ines,
  dov,
}: Readonly<Record<'ines' | 'dov', Member>>): Promise<void> {
  await ensureEdition(ines, { edition: ternHollowEdition, costs: ternHollowCosts });
  await ensureEdition(dov, { edition: quillbackEdition, costs: quillbackCosts });
}

/** Brings every job of the demo its surveyed kitchen, and those that are choosing their proposal. */
export async function ensureKitchens(
  { rowan, dov }: Readonly<Record<'rowan' | 'dov', Member>>,
  jobs: Readonly<Record<'millRace' | 'gannetCourt' | 'alderYard' | 'sorrelLane' | 'thistleRow', JobView>>,
): Promise<void> {
  const survey = (job: JobView, kitchen: Parameters<typeof ensureSurveyed>[2], by = rowan) =>
    ensureSurveyed(by, job, kitchen);
  await survey(jobs.millRace, { survey: millRace, proposal: proposal(millRaceProposed) });
  await survey(jobs.gannetCourt, { survey: gannetCourt });
  await survey(jobs.alderYard, { survey: secondHousehold, proposal: proposal(secondHouseholdProposed) });
  await survey(jobs.sorrelLane, { survey: sorrelLane, proposal: proposal(sorrelLaneProposed) });
  await survey(jobs.thistleRow, { survey: quillbackJob, proposal: proposal(quillbackJobProposed) }, dov);
}
