import Link from 'next/link';
import type { ReactNode } from 'react';
import { Mark } from '@/components/portal/portal-frame';
import { SignedInAs } from '@/components/sign-in/signed-in-as';
import { Frame } from '@/components/ui/frame';
import type { Member } from '@/lib/contracts/actor';
import type { CompanyBrand } from '@/lib/contracts/brand';
import { may } from '@/lib/contracts/rights';
import { paths } from '@/lib/paths';

const LINK =
  'flex min-h-target items-center px-2 text-reading no-underline underline-offset-4 hover:underline md:px-3';

/** A staff page: the contractor's mark, the desk's rooms, then the panels at full width. */
export function DeskFrame({
  company,
  member,
  children,
}: {
  company: Pick<CompanyBrand, 'slug' | 'name' | 'brand'>;
  member: Pick<Member, 'role' | 'name'>;
  children: ReactNode;
}) {
  return (
    <Frame className="grid-rows-[auto_1fr_auto] [&:has([data-wide])>footer]:hidden">
      <header className="flex flex-wrap items-center gap-x-5 rounded-frame border border-hairline bg-panel px-3 md:px-5 print:hidden">
        <Link
          href={paths.desk(company.slug)}
          className="flex min-h-target items-center gap-2 font-title text-reading font-semibold text-brand no-underline md:text-lead"
        >
          {company.brand.markSvg && (
            <Mark svg={company.brand.markSvg} className="size-7 shrink-0 [&>svg]:size-full" />
          )}
          {company.name}
        </Link>
        <nav aria-label="Desk" className="flex flex-wrap">
          <Link href={paths.deskJobs(company.slug)} className={LINK}>
            Jobs
          </Link>
          {may(member.role, 'approval.list') && (
            <Link href={paths.approvals(company.slug)} className={LINK}>
              Approvals
            </Link>
          )}
        </nav>
        <span className="ml-auto text-note text-quiet">
          {member.name}, {member.role}
        </span>
      </header>
      <main id="main" className="grid content-start gap-frame has-[[data-wide]]:content-stretch">
        {children}
      </main>
      <footer className="print:hidden">
        <SignedInAs />
      </footer>
    </Frame>
  );
}
