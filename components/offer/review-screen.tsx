'use client';

import { useEffect, useState } from 'react';
import { PageTitle } from '@/components/ui/frame';
import { sendJson } from '@/components/ui/json';
import { PageSkeleton } from '@/components/ui/skeleton';
import { ErrorState } from '@/components/ui/states';
import { ButtonLink } from '@/components/ui/button';
import type { OfferView } from '@/lib/contracts/offer';
import type { Fault } from '@/lib/contracts/result';
import { paths } from '@/lib/paths';
import { OfferPanel, type Viewer } from './offer-panel';

/**
 * One scheme as an agreement to read and sign. The server prepares it when the page opens; opening it again
 * shows the same one as long as nothing moved.
 */
export function ReviewScreen({
  company,
  jobId,
  schemeId,
  viewer,
  timeZone,
  contact,
}: {
  company: string;
  jobId: string;
  schemeId: string;
  viewer: Viewer;
  timeZone: string;
  contact: { readonly name: string; readonly phone: string };
}) {
  const [offer, setOffer] = useState<OfferView | null>(null);
  const [fault, setFault] = useState<Fault | null>(null);

  useEffect(() => {
    let left = false;
    void sendJson<OfferView>(paths.api.offers(company, jobId), 'POST', { schemeId }).then((answer) => {
      if (left) return;
      if (answer.ok) setOffer(answer.value);
      else setFault(answer.fault);
    });
    return () => {
      left = true;
    };
  }, [company, jobId, schemeId]);

  if (fault)
    return (
      <ErrorState
        title="This cannot be signed as it is"
        contact={contact}
        actions={<ButtonLink href={paths.choose(company, jobId)}>Back to the choices</ButtonLink>}
      >
        {fault.sentence}
      </ErrorState>
    );
  if (!offer) return <PageSkeleton label="The agreement is being prepared" panels={3} />;
  return (
    <>
      <PageTitle about="Read all of it, then sign at the foot. Nothing is agreed before everyone has signed.">
        Review and sign
      </PageTitle>
      <OfferPanel
        company={company}
        jobId={jobId}
        initial={offer}
        viewer={viewer}
        timeZone={timeZone}
        what="this agreement"
      />
    </>
  );
}
