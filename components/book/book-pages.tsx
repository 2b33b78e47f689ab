import Link from 'next/link';
import { Difference } from '@/components/ui/difference';
import { Money } from '@/components/ui/money';
import { Panel } from '@/components/ui/panel';
import type { PageSummary } from '@/lib/contracts/page';
import { paths } from '@/lib/paths';
import { SealKnot } from './seal-knot';
import { pageTitle } from './words';

/** The sealed pages in order; a thread runs from each seal to the next page that names it. */
export function BookPages({
  company,
  jobId,
  pages,
}: {
  company: string;
  jobId: string;
  pages: readonly PageSummary[];
}) {
  return (
    <ol className="grid gap-frame" aria-label="Pages">
      {pages.map((page, index) => (
        <li key={page.sequence} className="relative">
          {index > 0 && (
            <span
              aria-hidden="true"
              className="absolute -top-[calc(var(--frame-gap,10px)+1px)] left-8 h-[calc(var(--frame-gap,10px)+2px)] w-0.5 bg-brand"
            />
          )}
          <Panel as="article">
            <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-2">
              <div>
                <h2 className="font-title text-part font-semibold">
                  <Link
                    href={paths.bookPage(company, jobId, page.sequence)}
                    className="text-brand underline underline-offset-4"
                  >
                    Page {page.sequence}, {pageTitle(page.kind)}
                  </Link>
                </h2>
                <p className="text-quiet">
                  Sealed {page.sealedOn}. Signed by {page.signedBy.join(' and ')}.
                </p>
              </div>
              <p className="text-right">
                {page.kind === 'changeOrder' && <Difference cents={page.thisPageCents} />}
                <span className="block font-title text-part font-semibold">
                  <Money cents={page.sumAfterCents} />
                </span>
                <span className="text-note text-quiet">sum after this page</span>
              </p>
            </div>
            <Seal sha256={page.sha256} previous={page.previousSha256} />
          </Panel>
        </li>
      ))}
    </ol>
  );
}

/** A seal as knot and full hash, with the hash that the page names before it. */
export function Seal({ sha256, previous }: { sha256: string; previous: string | null }) {
  return (
    <div className="mt-3 border-t border-hairline pt-3">
      <SealKnot sha256={sha256} className="h-7 w-28" />
      <dl className="mt-2 grid gap-x-5 text-note md:grid-cols-[auto_1fr]">
        <dt className="text-quiet">Seal (SHA-256)</dt>
        <dd className="font-mono break-all">{sha256}</dd>
        <dt className="text-quiet">Page before</dt>
        <dd className="font-mono break-all">{previous ?? 'none, this is the first page'}</dd>
      </dl>
    </div>
  );
}
