import type { ChangeOrderRow } from '@/lib/contracts/change-order';
import type { OrderRow } from './find';

export const rowOf = (order: OrderRow): ChangeOrderRow => ({
  id: order.id,
  number: order.number,
  state: order.state,
  startedBy: order.startedBy,
  reason: order.reason,
  amountCents: order.amountCents,
  decisionReason: order.decisionReason,
});
