import Link from 'next/link';
import type { ReactNode } from 'react';
import { Frame } from '@/components/ui/frame';
import { Telephone } from '@/components/ui/telephone';
import type { CompanyBrand } from '@/lib/contracts/brand';
import { paths } from '@/lib/paths';

type Company = Pick<CompanyBrand, 'slug' | 'name' | 'phone' | 'brand'>;

/** The contractor's mark; drawn in the brand's colour, checked when it was stored. */
export function Mark({ svg, className }: { svg: string; className?: string }) {
  return <span aria-hidden="true" className={className} dangerouslySetInnerHTML={{ __html: svg }} />;
}

/** The contractor's header: mark, name, the job at hand, whom to call. */
export function PortalHeader({
  company,
  job,
  salesperson,
}: {
  company: Company;
  /** The job at hand, which leads to its overview. */
  job?: { readonly id: string; readonly name: string } | null;
  /** First name of whom to ask. */
  salesperson?: string | null;
}) {
  return (
    <header className="flex min-h-target items-center gap-x-3 rounded-frame border border-hairline bg-panel px-3 md:gap-x-5 md:px-5">
      <Link
        href={paths.home(company.slug)}
        className="flex min-h-target min-w-0 items-center gap-2 font-title text-reading leading-tight font-semibold text-brand no-underline md:text-lead"
      >
        {company.brand.markSvg && (
          <Mark svg={company.brand.markSvg} className="size-7 shrink-0 [&>svg]:size-full" />
        )}
        <span className="line-clamp-2">{company.name}</span>
      </Link>
      {job && (
        <Link
          href={paths.job(company.slug, job.id)}
          className="hidden min-h-target items-center text-reading no-underline hover:underline md:flex"
        >
          {job.name}
        </Link>
      )}
      <span className="ml-auto flex min-h-target shrink-0 flex-col items-end justify-center text-note md:flex-row md:items-center md:gap-2 md:text-reading">
        <span className="text-quiet">{salesperson ? `Ask ${salesperson}` : 'Call us'}</span>
        <Telephone phone={company.phone} className="font-semibold whitespace-nowrap" />
      </span>
    </header>
  );
}

/**
 * A homeowner's page: header over the panels. Reading pages keep to the width of a sheet; a child marked
 * `data-wide` takes the whole frame.
 */
export function PortalFrame({
  children,
  ...header
}: Parameters<typeof PortalHeader>[0] & { children: ReactNode }) {
  return (
    <Frame className="grid-rows-[auto_1fr]">
      <PortalHeader {...header} />
      <main
        id="main"
        className="mx-auto grid w-full max-w-5xl content-start gap-frame has-[[data-wide]]:max-w-none has-[[data-wide]]:content-stretch"
      >
        {children}
      </main>
    </Frame>
  );
}
