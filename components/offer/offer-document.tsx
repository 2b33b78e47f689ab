import type { ReactNode } from 'react';
import { Difference } from '@/components/ui/difference';
import { LengthText } from '@/components/ui/length';
import { Money } from '@/components/ui/money';
import { Panel } from '@/components/ui/panel';
import { Table, Td, Th } from '@/components/ui/table';
import type { OfferBody } from '@/lib/contracts/offer';
import { zoneWord } from './words';

/** Everything that a page of the job book says, in the order in which it is read before signing. */
export function OfferDocument({ body }: { body: OfferBody }) {
  return (
    <>
      {body.kind === 'changeOrder' && <ChangeScope body={body} />}
      <Panel title="What is renewed">
        <Choices body={body} />
      </Panel>
      <div className="grid gap-frame lg:grid-cols-2">
        <Panel title="What stays as it is">
          <Sentences items={body.stays} />
        </Panel>
        <Panel title="Found in this kitchen">
          {body.fitNotes.length === 0 ? (
            <p className="text-quiet">Nothing in this kitchen stands against these choices.</p>
          ) : (
            <ul className="grid gap-2">
              {body.fitNotes.map((note) => (
                <li key={`${note.code} ${note.parts.join(' ')}`}>{note.text}</li>
              ))}
            </ul>
          )}
        </Panel>
      </div>
      <Panel title="Price, line by line">
        <Lines body={body} />
      </Panel>
      <Panel title="Payments">
        <Payments body={body} />
      </Panel>
      <div className="grid gap-frame lg:grid-cols-2">
        <Panel title="When">
          <Sentences items={body.dates} />
        </Panel>
        <Panel title="Who sees to what">
          <dl className="grid gap-3">
            {body.responsibilities.map((one) => (
              <div key={one.title}>
                <dt className="font-semibold">{one.title}</dt>
                <dd>{one.text}</dd>
              </div>
            ))}
          </dl>
        </Panel>
      </div>
      <Panel title="Notices">
        <div className="grid gap-5">
          {body.notices.map((notice) => (
            <section key={notice.code} className="max-w-prose">
              <h3 className="font-title text-lead font-semibold">{notice.title}</h3>
              {notice.text.split('\n').map((paragraph) => (
                <p key={paragraph} className="mt-1">
                  {paragraph}
                </p>
              ))}
              <p className="mt-1 text-note text-quiet">{notice.source}</p>
            </section>
          ))}
        </div>
      </Panel>
    </>
  );
}

function Sentences({ items }: { items: readonly string[] }) {
  return (
    <ul className="grid gap-2">
      {items.map((item) => (
        <li key={item}>{item}</li>
      ))}
    </ul>
  );
}

function ChangeScope({ body }: { body: OfferBody }) {
  return (
    <Panel title="What changes">
      {body.reason && <p className="mb-3 text-lead">{body.reason}</p>}
      <Sentences items={body.scope} />
      <dl className="mt-5 grid max-w-xl grid-cols-[1fr_auto] gap-x-8 gap-y-1">
        <Sum label="Original sum">{<Money cents={body.sum.originalCents} />}</Sum>
        <Sum label="Change orders before this one">{<Money cents={body.sum.previousOrdersCents} />}</Sum>
        <Sum label="Sum before this change">{<Money cents={body.sum.beforeCents} />}</Sum>
        <Sum label="This change">{<Difference cents={body.sum.thisPageCents} />}</Sum>
        <Sum label="New sum" strong>
          {<Money cents={body.sum.afterCents} />}
        </Sum>
      </dl>
    </Panel>
  );
}

function Sum({ label, strong, children }: { label: string; strong?: boolean; children: ReactNode }) {
  return (
    <>
      <dt className={strong ? 'font-semibold' : 'text-quiet'}>{label}</dt>
      <dd className={`text-right ${strong ? 'font-semibold' : ''}`}>{children}</dd>
    </>
  );
}

function Choices({ body }: { body: OfferBody }) {
  return (
    <dl className="grid gap-x-8 md:grid-cols-2">
      {body.choicesNamed.map((choice) => (
        <div
          key={`${choice.zone} ${choice.label}`}
          className="flex flex-wrap items-baseline justify-between gap-x-5 border-b border-hairline py-2"
        >
          <dt className="text-quiet">
            {choice.label}
            {choice.zone !== 'kitchen' && `, ${zoneWord(choice.zone).toLowerCase()}`}
          </dt>
          <dd className="font-semibold">
            <LengthText text={choice.option} />
          </dd>
        </div>
      ))}
    </dl>
  );
}

/** Lines by part of the kitchen, in the order in which the page has them. */
function linesByZone(body: OfferBody) {
  const groups = new Map<OfferBody['lines'][number]['zone'], OfferBody['lines']>();
  for (const line of body.lines) groups.set(line.zone, [...(groups.get(line.zone) ?? []), line]);
  return [...groups].map(([zone, lines]) => ({
    zone,
    lines,
    sum: lines.reduce((sum, line) => sum + line.amountCents, 0),
  }));
}

function Lines({ body }: { body: OfferBody }) {
  return (
    <Table caption="Price lines">
      {linesByZone(body).map(({ zone, lines, sum }) => (
        <tbody key={zone}>
          <tr>
            <Th scope="rowgroup" className="pt-5 font-title text-lead font-semibold text-ink">
              {zoneWord(zone)}
            </Th>
            <Th numeric className="pt-5 text-ink">
              <Money cents={sum} />
            </Th>
          </tr>
          {lines.map((line) => (
            <tr key={line.code}>
              <Td>
                {line.label}, <span className="whitespace-nowrap">{line.quantityText}</span>
                <div className="text-note text-quiet">
                  <LengthText text={line.because} />
                </div>
              </Td>
              <Td numeric>
                <Money cents={line.amountCents} />
              </Td>
            </tr>
          ))}
        </tbody>
      ))}
      <tbody>
        <Foot label="Lines together" cents={body.subtotalCents} />
        {body.discountCents !== 0 && <Foot label="Discount" cents={-body.discountCents} />}
        <Foot label="Tax" cents={body.taxCents} />
        <Foot label="Total" cents={body.totalCents} strong />
      </tbody>
    </Table>
  );
}

function Foot({ label, cents, strong }: { label: string; cents: number; strong?: boolean }) {
  return (
    <tr className={strong ? 'font-semibold' : undefined}>
      <Td>{label}</Td>
      <Td numeric>
        <Money cents={cents} />
      </Td>
    </tr>
  );
}

function Payments({ body }: { body: OfferBody }) {
  return (
    <Table caption="Schedule of payments">
      <tbody>
        {body.schedule.map((draw) => (
          <tr key={draw.number}>
            <Td>
              Payment {draw.number} of {body.schedule.length}, {draw.label}
              <div className="text-note text-quiet">{draw.dueText}</div>
            </Td>
            <Td numeric>
              <Money cents={draw.amountCents} />
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
