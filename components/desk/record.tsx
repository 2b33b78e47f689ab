import Link from 'next/link';
import { SealKnot } from '@/components/book/seal-knot';
import { pageTitle } from '@/components/book/words';
import { Difference } from '@/components/ui/difference';
import { Money } from '@/components/ui/money';
import { CHANGE_ORDER_STATE_NAMES, type ChangeOrderRow } from '@/lib/contracts/change-order';
import type { PageSummary } from '@/lib/contracts/page';
import { paths } from '@/lib/paths';

const LINK = 'text-brand underline underline-offset-4';

/** A job's sealed pages and its change orders, each a line. */
export function Record({
  company,
  jobId,
  pages,
  orders,
}: {
  company: string;
  jobId: string;
  pages: readonly PageSummary[];
  orders: readonly ChangeOrderRow[];
}) {
  return (
    <div className="grid gap-5">
      <section>
        <h3 className="mb-1 font-title text-lead font-semibold">
          <Link href={paths.book(company, jobId)} className={LINK}>
            Job book
          </Link>
        </h3>
        {pages.length === 0 ? (
          <p className="text-quiet">Nothing is sealed yet.</p>
        ) : (
          <ol>
            {pages.map((page) => (
              <li
                key={page.sequence}
                className="flex flex-wrap items-center gap-x-5 gap-y-1 border-b border-hairline py-2"
              >
                <Link href={paths.bookPage(company, jobId, page.sequence)} className={LINK}>
                  Page {page.sequence}, {pageTitle(page.kind)}
                </Link>
                <SealKnot sha256={page.sha256} className="h-5 w-20" />
                <span className="ml-auto">
                  <Money cents={page.sumAfterCents} />
                </span>
              </li>
            ))}
          </ol>
        )}
      </section>
      <section>
        <h3 className="mb-1 font-title text-lead font-semibold">
          <Link href={paths.changeOrders(company, jobId)} className={LINK}>
            Change orders
          </Link>
        </h3>
        {orders.length === 0 ? (
          <p className="text-quiet">None was asked for.</p>
        ) : (
          <ol>
            {orders.map((order) => (
              <li
                key={order.id}
                className="flex flex-wrap items-center gap-x-5 gap-y-1 border-b border-hairline py-2"
              >
                <Link href={paths.changeOrder(company, jobId, order.id)} className={LINK}>
                  No. {order.number}
                </Link>
                <span className="text-quiet">{CHANGE_ORDER_STATE_NAMES[order.state]}</span>
                <span className="ml-auto">
                  <Difference cents={order.amountCents} />
                </span>
              </li>
            ))}
          </ol>
        )}
      </section>
    </div>
  );
}
