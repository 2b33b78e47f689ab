import Link from 'next/link';
import { notFound } from 'next/navigation';
import { requireActor } from '@/app/[company]/visitor';
import { ButtonLink } from '@/components/ui/button';
import { Difference } from '@/components/ui/difference';
import { PageTitle } from '@/components/ui/frame';
import { Panel } from '@/components/ui/panel';
import { EmptyState } from '@/components/ui/states';
import { CHANGE_ORDER_STATE_NAMES } from '@/lib/contracts/change-order';
import { paths } from '@/lib/paths';
import { listChangeOrders } from '@/lib/services/change-order/list';

export const metadata = { title: 'Change orders' };

export default async function ChangesPage({ params }: { params: Promise<{ company: string; job: string }> }) {
  const { company, job: jobId } = await params;
  const actor = await requireActor(company, jobId);
  const orders = await listChangeOrders(actor, { jobId });
  if (!orders.ok) notFound();
  if (orders.value.length === 0)
    return (
      <EmptyState
        title="No change was asked for"
        actions={<ButtonLink href={paths.choose(company, jobId)}>Go to the choices</ButtonLink>}
      >
        <p>
          After signing nothing is edited. Whoever wants something else chooses it on the same screens and
          asks for the change there.
        </p>
      </EmptyState>
    );
  return (
    <>
      <PageTitle>Change orders</PageTitle>
      <ul className="grid gap-frame">
        {orders.value.map((order) => (
          <li key={order.id}>
            <Panel as="article">
              <div className="flex flex-wrap items-baseline justify-between gap-x-5">
                <h2 className="font-title text-part font-semibold">
                  <Link href={paths.changeOrder(company, jobId, order.id)} className="text-brand underline">
                    Change order {order.number}
                  </Link>
                </h2>
                <Difference cents={order.amountCents} />
              </div>
              <p>{order.reason}</p>
              <p className="text-quiet">
                {CHANGE_ORDER_STATE_NAMES[order.state]}.
                {order.decisionReason ? ` ${order.decisionReason}` : ''}
              </p>
            </Panel>
          </li>
        ))}
      </ul>
    </>
  );
}
