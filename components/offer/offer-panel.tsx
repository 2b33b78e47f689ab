'use client';

import { useState } from 'react';
import useSWR from 'swr';
import { ButtonLink } from '@/components/ui/button';
import { Difference } from '@/components/ui/difference';
import { readJson, sendJson } from '@/components/ui/json';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { formatCents } from '@/lib/engine/money';
import type { OfferView } from '@/lib/contracts/offer';
import { paths } from '@/lib/paths';
import { OfferDocument } from './offer-document';
import { SignForm } from './sign-form';

export interface Viewer {
  readonly personId: string;
  readonly name: string;
  readonly role: 'owner' | 'salesperson' | 'homeowner';
}

/** How often the page asks whether the others have signed, while it waits for them. */
const WAIT_MS = 4000;

/**
 * An offer with its signatures: read, signed, waited for, sealed. When something moved under it, the signer sees
 * what, and signs the new one.
 */
export function OfferPanel({
  company,
  jobId,
  initial,
  viewer,
  what,
  timeZone,
  closed = false,
}: {
  company: string;
  jobId: string;
  initial: OfferView;
  viewer: Viewer;
  /** Such as `this agreement`. */
  what: string;
  /** Where the company is; moments are told by its clock. */
  timeZone: string;
  /** Nothing more can be signed on it. */
  closed?: boolean;
}) {
  const [shown, setShown] = useState(initial);
  const [fault, setFault] = useState<string | null>(null);
  const [moved, setMoved] = useState(false);
  const { data, mutate } = useSWR<OfferView>(paths.api.offer(company, jobId, shown.id), readJson, {
    fallbackData: shown,
    refreshInterval: (latest) => (latest?.state === 'current' && !closed ? WAIT_MS : 0),
  });
  const offer = data?.id === shown.id ? data : shown;
  const own = offer.signatures.some((one) => one.personId === viewer.personId);
  const required = offer.body.requiredSigners.some((one) => one.personId === viewer.personId);

  async function sign(text: string) {
    setFault(null);
    setMoved(false);
    const answer = await sendJson<OfferView>(paths.api.signatures(company, jobId, offer.id), 'POST', {
      sha256: offer.sha256,
      consent: { accepted: true, sha256: offer.body.consent.sha256 },
      means: { kind: 'typed', text },
    });
    if (answer.ok) {
      setShown(answer.value);
      await mutate(answer.value, { revalidate: false });
      return;
    }
    if (answer.fault.code === 'moved') {
      const { offer: next } = answer.fault.detail as { offer?: OfferView };
      if (next) {
        setShown(next);
        setMoved(true);
        window.scrollTo({ top: 0 });
        return;
      }
    }
    setFault(answer.fault.sentence);
  }

  return (
    <>
      {moved && (
        <Notice kind="caution" title="Something moved since you opened this">
          Nothing was signed. Read what changed, then sign again.
        </Notice>
      )}
      {(moved || offer.differences.length > 0) && offer.state !== 'sealed' && (
        <Panel title="What changed since it was last shown">
          <ul className="grid gap-2">
            {offer.differences.map((one) => (
              <li key={one.text} className="flex flex-wrap justify-between gap-x-5">
                <span>{one.text}</span>
                {one.amountCents !== undefined && <Difference cents={one.amountCents} />}
              </li>
            ))}
          </ul>
        </Panel>
      )}
      {offer.state === 'replaced' && (
        <Notice kind="caution" title="This is no longer what would be signed">
          Something moved since. Open the page again to see the newest.
        </Notice>
      )}
      <OfferDocument body={offer.body} />
      <Panel title="Signatures">
        <Signatures offer={offer} timeZone={timeZone} />
        {offer.state === 'sealed' ? (
          <Sealed company={company} jobId={jobId} offer={offer} />
        ) : own && !closed ? (
          <Notice kind="info" title="You have signed">
            {offer.body.kind === 'changeOrder' && offer.missing.length === 0
              ? 'The contractor decides next. You will get a mail, and this page shows it.'
              : `It is sealed once ${offer.missing.map((one) => one.name).join(' and ')} has signed too, on any device.`}
          </Notice>
        ) : (
          required &&
          !closed &&
          offer.state === 'current' && (
            <div className="mt-5">
              <SignForm
                signer={viewer.name}
                sumText={formatCents(offer.body.sum.afterCents)}
                what={what}
                consent={offer.body.consent}
                fault={fault}
                reasonNot={null}
                onSign={sign}
              />
            </div>
          )
        )}
        <p className="mt-5 text-note text-quiet">
          Fingerprint of what is shown here (SHA-256):{' '}
          <span className="font-mono break-all">{offer.sha256}</span>
        </p>
      </Panel>
    </>
  );
}

function Signatures({ offer, timeZone }: { offer: OfferView; timeZone: string }) {
  const moment = new Intl.DateTimeFormat('en-US', { dateStyle: 'long', timeStyle: 'short', timeZone });
  return (
    <ul className="grid gap-1">
      {offer.body.requiredSigners.map((signer) => {
        const signed = offer.signatures.find((one) => one.personId === signer.personId);
        return (
          <li
            key={signer.personId}
            className="flex flex-wrap justify-between gap-x-5 border-b border-hairline py-2"
          >
            <span className="font-semibold">{signer.name}</span>
            <span className={signed ? undefined : 'text-quiet'}>
              {signed ? `signed ${moment.format(new Date(signed.signedAt))}` : 'not signed yet'}
            </span>
          </li>
        );
      })}
    </ul>
  );
}

function Sealed({ company, jobId, offer }: { company: string; jobId: string; offer: OfferView }) {
  return (
    <div className="mt-5 grid gap-3" role="status">
      <Notice kind="info" title={`Sealed as page ${offer.sealedSequence ?? ''} of the job book`}>
        Everyone has signed. It can no longer be changed; any difference is a change order.
      </Notice>
      <div className="flex flex-wrap gap-3">
        <ButtonLink href={paths.payments(company, jobId)}>
          {offer.body.kind === 'agreement' ? 'Go to the first payment' : 'See the payments'}
        </ButtonLink>
        <ButtonLink href={paths.book(company, jobId)} tone="quiet">
          Open the job book
        </ButtonLink>
      </div>
    </div>
  );
}
