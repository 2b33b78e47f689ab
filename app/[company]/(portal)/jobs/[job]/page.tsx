import { notFound } from 'next/navigation';
import { readCompany } from '@/app/[company]/read-company';
import { requireActor } from '@/app/[company]/visitor';
import { decisionsOf } from '@/components/choosing/decisions';
import { JobOverview } from '@/components/portal/job-overview';
import { nextStep, type NextStep } from '@/components/portal/next-step';
import { SignedInAs } from '@/components/sign-in/signed-in-as';
import { paths } from '@/lib/paths';
import { listDraws } from '@/lib/services/draw/list';
import { readKitchen } from '@/lib/services/scheme/read-kitchen';
import { requireJob } from './read-job';

export default async function JobPage({ params }: { params: Promise<{ company: string; job: string }> }) {
  const { company: slug, job: jobId } = await params;
  const company = await readCompany(slug);
  if (!company) notFound();
  const actor = await requireActor(slug, jobId);
  const job = await requireJob(actor, jobId);
  const schedule = await listDraws(actor, { jobId });
  const kitchen = job.surveyId && job.editionId ? await readKitchen(actor, { jobId }) : null;
  const schemes = kitchen?.ok ? kitchen.value.schemes : [];
  const newest = [...schemes].sort((a, b) => b.updatedAt.localeCompare(a.updatedAt))[0] ?? null;
  const keys = kitchen?.ok ? decisionsOf(kitchen.value.edition).map((one) => one.key) : [];
  const due = (schedule.ok ? schedule.value.draws : []).find((draw) => draw.state === 'due') ?? null;

  const next = nextStep({
    stage: job.stage,
    decided: newest && {
      taken: keys.filter((key) => newest.decided.some((one) => one === key)).length,
      of: keys.length,
    },
    due,
    changeToSign: false,
    salesperson: job.salesperson.name.split(' ')[0] ?? job.salesperson.name,
  });
  const signed = schedule.ok && schedule.value.balance.agreedCents > 0;
  const hrefs: Readonly<Record<Exclude<NextStep['goes'], null>, string>> = {
    choose: paths.choose(slug, jobId),
    review: paths.review(slug, jobId),
    pay: due ? paths.payment(slug, jobId, due.id) : paths.payments(slug, jobId),
    changes: paths.changeOrders(slug, jobId),
  };
  return (
    <>
      <JobOverview
        job={job}
        next={next}
        nextHref={next.goes && hrefs[next.goes]}
        estimateCents={newest?.totalCents ?? null}
        balance={schedule.ok ? schedule.value.balance : null}
        phone={company.phone}
        contractor={company.name}
        rooms={[
          {
            href: paths.choose(slug, jobId),
            label: signed ? 'Look, or ask for a change' : 'Choose',
            about: 'Your kitchen, every choice and what it costs.',
          },
          {
            href: paths.payments(slug, jobId),
            label: 'Payments',
            about: 'What is due, what was paid, receipts.',
          },
          { href: paths.book(slug, jobId), label: 'Job book', about: 'Every signed page, sealed, in order.' },
          {
            href: paths.changeOrders(slug, jobId),
            label: 'Change orders',
            about: 'What changed after signing.',
          },
        ]}
      />
      <SignedInAs />
    </>
  );
}
