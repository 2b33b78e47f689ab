import { SealKnot } from '@/components/book/seal-knot';
import { LengthText } from '@/components/ui/length';
import { Table, Td, Th } from '@/components/ui/table';
import type { DoorOrder } from '@/lib/contracts/door-order';
import type { OfferFront } from '@/lib/contracts/offer';
import { formatLength } from '@/lib/engine/length';
import type { Sixtyfourths } from '@/lib/engine/types';

const KINDS: Readonly<Record<OfferFront['kind'], string>> = {
  door: 'Door',
  drawerFront: 'Drawer front',
  falseFront: 'False front',
  appliancePanel: 'Appliance panel',
};

const HINGES: Readonly<Record<OfferFront['hinge'], string>> = { left: 'left', right: 'right', none: '' };

/** A stored length; it was checked with the page it stands on. */
const text = (length: number) => formatLength(length as Sixtyfourths);

/** The sheet that the door supplier and the bench work from, stamped with its page and seal. */
export function DoorOrderSheet({ order }: { order: DoorOrder }) {
  return (
    <article className="rounded-frame border border-hairline bg-panel p-5 print:border-0 print:p-0">
      <header className="mb-5 flex flex-wrap items-start justify-between gap-x-8 gap-y-3">
        <div>
          <h1 className="font-title text-page font-semibold">Door order</h1>
          <p className="text-lead">
            {order.company}, job {order.job.number}, {order.job.name}
          </p>
          <p className="text-quiet">{order.job.address}</p>
        </div>
        <div className="text-right">
          <p className="font-semibold">Page {order.page} of the job book</p>
          <p className="text-note text-quiet">sealed {order.sealedOn}</p>
          <SealKnot sha256={order.seal} className="ml-auto h-7 w-28" />
          <p className="font-mono text-note break-all">{order.seal.slice(0, 16)}</p>
        </div>
      </header>
      {order.since && <Since since={order.since} />}
      <Table caption={`Door order, ${order.rows.length} fronts`}>
        <thead>
          <tr>
            <Th>Mark</Th>
            <Th>Front</Th>
            <Th numeric>Width</Th>
            <Th numeric>Height</Th>
            <Th>Style</Th>
            <Th>Wood</Th>
            <Th>Finish</Th>
            <Th>Hinge side</Th>
            <Th numeric>Hinges</Th>
          </tr>
        </thead>
        <tbody>
          {order.rows.map((row) => (
            <tr key={row.mark}>
              <Td className="font-mono whitespace-nowrap">{row.mark}</Td>
              <Td>
                {KINDS[row.kind]}
                {row.glass ? ', prepared for glass' : ''}
              </Td>
              <Td numeric className="whitespace-nowrap">
                <LengthText text={text(row.width)} />
              </Td>
              <Td numeric className="whitespace-nowrap">
                <LengthText text={text(row.height)} />
              </Td>
              <Td>{row.build === 'slab' ? `${row.style} (slab)` : row.style}</Td>
              <Td>{row.wood}</Td>
              <Td>{row.finish}</Td>
              <Td>{HINGES[row.hinge]}</Td>
              <Td numeric>{row.hinges > 0 ? row.hinges : ''}</Td>
            </tr>
          ))}
        </tbody>
      </Table>
      <p className="mt-5 text-note text-quiet">
        {order.rows.length} fronts, sizes in inches, width by height. Build only from the newest sealed page.
      </p>
    </article>
  );
}

function Since({ since }: { since: NonNullable<DoorOrder['since']> }) {
  const parts: readonly [string, readonly string[]][] = [
    ['Stop', since.removed],
    ['Add', since.added],
    ['Order otherwise', since.changed],
  ];
  const some = parts.filter(([, marks]) => marks.length > 0);
  return (
    <section className="mb-5 rounded-frame border border-hairline p-3">
      <h2 className="font-semibold">Against page {since.page}</h2>
      {some.length === 0 ? (
        <p>No front changes.</p>
      ) : (
        <dl>
          {some.map(([label, marks]) => (
            <div key={label}>
              <dt className="text-quiet">
                {label}, {marks.length}
              </dt>
              <dd className="font-mono text-note">{marks.join(', ')}</dd>
            </div>
          ))}
        </dl>
      )}
    </section>
  );
}
