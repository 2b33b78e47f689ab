import { auth } from '@clerk/nextjs/server';
import { notFound, redirect } from 'next/navigation';
import { readCompany } from '@/app/[company]/read-company';
import { PayPanel } from '@/components/payment/pay-panel';
import { ButtonLink } from '@/components/ui/button';
import { PageTitle } from '@/components/ui/frame';
import { drawName } from '@/lib/contracts/payment';
import { reasonNot } from '@/lib/contracts/rights';
import { paths } from '@/lib/paths';
import { listDraws } from '@/lib/services/draw/list';
import { readPayment } from '@/lib/services/payment/read';
import { resolveActor } from '@/lib/services/session/resolve-actor';

export const metadata = { title: 'Payment' };

interface Props {
  readonly params: Promise<{ company: string; job: string; draw: string }>;
}

export default async function PaymentPage({ params }: Props) {
  const { company, job, draw: drawId } = await params;
  const { userId } = await auth();
  if (!userId) redirect(paths.signIn(company));
  const actor = await resolveActor({ slug: company, clerkUserId: userId, jobId: job });
  const contractor = await readCompany(company);
  if (!actor || !contractor) notFound();
  const schedule = await listDraws(actor, { jobId: job });
  const draw = schedule.ok ? schedule.value.draws.find((one) => one.id === drawId) : undefined;
  if (!draw) notFound();
  // While the payment service cannot be reached, the page still opens and says so when it is asked to pay.
  const looked = draw.state === 'due' ? await readPayment(actor, { drawId }) : null;
  const initial = looked?.ok ? looked.value : { draw, attempt: null };
  return (
    <>
      <PageTitle
        actions={
          <ButtonLink tone="quiet" href={paths.payments(company, job)}>
            All payments
          </ButtonLink>
        }
      >
        {drawName(draw)}
      </PageTitle>
      <PayPanel
        company={company}
        jobId={job}
        contractor={{ name: contractor.name, phone: contractor.phone }}
        reasonNot={reasonNot(actor.role, 'draw.pay')}
        initial={initial}
      />
    </>
  );
}
