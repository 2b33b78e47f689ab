import { notFound } from 'next/navigation';
import { readCompany } from '@/app/[company]/read-company';
import { requireActor } from '@/app/[company]/visitor';
import { WithdrawButton } from '@/components/change-order/withdraw-button';
import { OfferPanel } from '@/components/offer/offer-panel';
import { PageTitle } from '@/components/ui/frame';
import { Notice } from '@/components/ui/notice';
import { CHANGE_ORDER_STATE_NAMES } from '@/lib/contracts/change-order';
import { canMove, CHANGE_ORDER_NEXT } from '@/lib/contracts/states';
import { readChangeOrder } from '@/lib/services/change-order/read';

export const metadata = { title: 'Change order' };

export default async function ChangePage({
  params,
}: {
  params: Promise<{ company: string; job: string; order: string }>;
}) {
  const { company, job: jobId, order: orderId } = await params;
  const contractor = await readCompany(company);
  if (!contractor) notFound();
  const actor = await requireActor(company, jobId);
  const order = await readChangeOrder(actor, { jobId, orderId });
  if (!order.ok) notFound();
  const { number, state, startedBy, decisionReason, offer } = order.value;
  const own = (actor.kind === 'guest') === (startedBy === 'homeowner');
  return (
    <>
      <PageTitle
        about={`${CHANGE_ORDER_STATE_NAMES[state]}.`}
        actions={
          own &&
          canMove(CHANGE_ORDER_NEXT, state, 'withdrawn') && (
            <WithdrawButton company={company} jobId={jobId} orderId={orderId} />
          )
        }
      >
        Change order {number}
      </PageTitle>
      {state === 'declined' && (
        <Notice kind="caution" title="The contractor declined this change">
          {decisionReason}
        </Notice>
      )}
      <OfferPanel
        company={company}
        jobId={jobId}
        initial={offer}
        viewer={{ personId: actor.personId, name: actor.name, role: actor.role }}
        what="this change order"
        timeZone={contractor.timeZone}
        closed={state === 'declined' || state === 'withdrawn'}
      />
    </>
  );
}
