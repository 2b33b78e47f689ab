import { auth } from '@clerk/nextjs/server';
import { notFound, redirect } from 'next/navigation';
import { Schedule } from '@/components/payment/schedule';
import { PageTitle } from '@/components/ui/frame';
import { paths } from '@/lib/paths';
import { listDraws } from '@/lib/services/draw/list';
import { resolveActor } from '@/lib/services/session/resolve-actor';

export const metadata = { title: 'Payments' };

export default async function PaymentsPage({
  params,
}: {
  params: Promise<{ company: string; job: string }>;
}) {
  const { company, job } = await params;
  const { userId } = await auth();
  if (!userId) redirect(paths.signIn(company));
  const actor = await resolveActor({ slug: company, clerkUserId: userId, jobId: job });
  if (!actor) notFound();
  const schedule = await listDraws(actor, { jobId: job });
  if (!schedule.ok) notFound();
  return (
    <>
      <PageTitle about={schedule.value.jobName}>Payments</PageTitle>
      <Schedule schedule={schedule.value} company={company} jobId={job} pays={actor.kind === 'guest'} />
    </>
  );
}
