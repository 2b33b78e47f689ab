import { notFound } from 'next/navigation';
import { requireActor } from '@/app/[company]/visitor';
import { Seal } from '@/components/book/book-pages';
import { pageTitle } from '@/components/book/words';
import { OfferDocument } from '@/components/offer/offer-document';
import { ButtonLink } from '@/components/ui/button';
import { PageTitle } from '@/components/ui/frame';
import { Panel } from '@/components/ui/panel';
import { paths } from '@/lib/paths';
import { readPage } from '@/lib/services/page/read';

export const metadata = { title: 'Page of the job book' };

export default async function SealedPage({
  params,
}: {
  params: Promise<{ company: string; job: string; sequence: string }>;
}) {
  const { company, job: jobId, sequence } = await params;
  const actor = await requireActor(company, jobId);
  const page = await readPage(actor, { jobId, sequence: Number(sequence) });
  if (!page.ok) notFound();
  const { summary, body, signatures } = page.value;
  return (
    <>
      <PageTitle
        about={`Sealed ${summary.sealedOn}.`}
        actions={
          <ButtonLink href={paths.book(company, jobId)} tone="quiet">
            All pages
          </ButtonLink>
        }
      >
        Page {summary.sequence}, {pageTitle(summary.kind)}
      </PageTitle>
      <OfferDocument body={body} />
      <Panel title="Signatures and seal">
        <ul className="grid gap-1">
          {signatures.map((one) => (
            <li
              key={one.name}
              className="flex flex-wrap justify-between gap-x-5 border-b border-hairline py-2"
            >
              <span className="font-title text-lead">{one.name}</span>
              <span className="text-quiet">
                {one.role}, {one.signedAtText}
              </span>
            </li>
          ))}
        </ul>
        <Seal sha256={summary.sha256} previous={summary.previousSha256} />
      </Panel>
    </>
  );
}
