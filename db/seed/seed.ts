import { closePool } from '@/db/client';
import { ensureContractor } from './contractor';
import { HOMEOWNERS, JOBS, QUILLBACK, STAFF, TERN_HOLLOW } from './demo';
import { ensureInvited, ensureJob } from './job';
import { ensureKitchens, ensurePriceBooks } from './kitchens';
import { ensureSigned } from './signed';

/** The staff's password in the demo, which stands on one machine alone. */
const PASSWORD = 'veneer-and-stile-1974';

/**
 * Puts the demo in, by the same services that people use, as far as it is not there yet. Answers a line for each
 * who can sign in, and last what was done.
 */
async function seed(): Promise<string[]> {
  const [ines, rowan] = await ensureContractor(TERN_HOLLOW, [STAFF.ines, STAFF.rowan], PASSWORD);
  const [dov] = await ensureContractor(QUILLBACK, [STAFF.dov], PASSWORD);
  if (!ines || !rowan || !dov) throw new Error('The staff is not complete.');
  await ensurePriceBooks({ ines, dov });

  const jobs = {
    millRace: await ensureJob(rowan, JOBS.millRace),
    gannetCourt: await ensureJob(rowan, JOBS.gannetCourt),
    alderYard: await ensureJob(rowan, JOBS.alderYard),
    sorrelLane: await ensureJob(rowan, JOBS.sorrelLane),
    thistleRow: await ensureJob(dov, JOBS.thistleRow),
  };
  await ensureKitchens({ rowan, dov }, jobs);
  await ensureSigned({
    company: TERN_HOLLOW.slug,
    ines,
    rowan,
    job: jobs.millRace,
    household: HOMEOWNERS.odile,
    changes: [
      {
        change: { key: 'pull', zone: 'kitchen', option: 'bar-5-black' },
        reason: 'Bars are easier to hold than the knobs.',
      },
      {
        change: { key: 'finish', zone: 'base', option: 'paint-12' },
        reason: 'We would like the base cabinets in spruce.',
      },
    ],
  });
  await ensureInvited(rowan, jobs.alderYard.id, HOMEOWNERS.perrin);
  await ensureInvited(rowan, jobs.sorrelLane.id, HOMEOWNERS.mara);
  await ensureInvited(rowan, jobs.sorrelLane.id, HOMEOWNERS.teo);
  await ensureInvited(dov, jobs.thistleRow.id, HOMEOWNERS.petra);

  return [
    ...Object.values(STAFF).map(
      ({ name, email, role }) => `  ${name}, ${role}: ${email}, password ${PASSWORD}`,
    ),
    ...[HOMEOWNERS.mara, HOMEOWNERS.teo].map(
      ({ name, email }) => `  ${name}, homeowner: ${email}, by the invitation in the mailbox`,
    ),
    `  ${HOMEOWNERS.odile.name}, homeowner of Mill Race: ${HOMEOWNERS.odile.email}, by a code by mail`,
    `2 contractors, ${Object.keys(jobs).length} jobs`,
  ];
}

seed()
  .then((lines) => console.log(lines.join('\n')))
  .catch((error: unknown) => {
    console.error(error);
    process.exitCode = 1;
  })
  .finally(() => closePool());
