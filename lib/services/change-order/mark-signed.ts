import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { changeOrders } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import { writeAudit } from '../audit/write';

/** The household has signed; the order waits for the contractor. The caller holds the job's lock. */
export async function markSigned(tx: Transaction, actor: Actor, orderId: string): Promise<void> {
  const [order] = await tx
    .update(changeOrders)
    .set({ state: 'signed', updatedAt: now() })
    .where(
      and(
        eq(changeOrders.companyId, actor.companyId),
        eq(changeOrders.id, orderId),
        eq(changeOrders.state, 'offered'),
      ),
    )
    .returning({ jobId: changeOrders.jobId });
  if (!order) throw new Error(`Change order ${orderId} was not offered.`);
  await writeAudit(tx, actor, {
    verb: 'changeOrder.signed',
    subject: orderId,
    jobId: order.jobId,
    detail: {},
  });
}
