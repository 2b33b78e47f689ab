import Link from 'next/link';
import { notFound, redirect } from 'next/navigation';
import { PortalFrame } from '@/components/portal/portal-frame';
import { SignedInAs } from '@/components/sign-in/signed-in-as';
import { PageTitle } from '@/components/ui/frame';
import { Panel } from '@/components/ui/panel';
import { EmptyState } from '@/components/ui/states';
import { JOB_STAGE_NAMES } from '@/lib/contracts/states';
import { paths } from '@/lib/paths';
import { listOwnJobs } from '@/lib/services/session/list-own-jobs';
import { readCompany } from './read-company';
import { requireUser } from './visitor';

/** The contractor's front door: staff go to the desk, a household to its kitchen. */
export default async function HomePage({ params }: { params: Promise<{ company: string }> }) {
  const { company: slug } = await params;
  const company = await readCompany(slug);
  if (!company) notFound();
  const own = await listOwnJobs({ slug, clerkUserId: await requireUser(slug) });
  if (!own) notFound();
  if (own.member) redirect(paths.desk(slug));
  const [only, ...others] = own.jobs;
  if (only && others.length === 0) redirect(paths.job(slug, only.id));
  return (
    <PortalFrame company={company}>
      {own.jobs.length === 0 ? (
        <EmptyState
          title="No kitchen is open to you here yet"
          contact={{ name: company.name, phone: company.phone }}
        >
          <p>
            Open the link in the invitation that {company.name} sent you. If it went to another mail address,
            sign in with that one.
          </p>
        </EmptyState>
      ) : (
        <>
          <PageTitle>Your kitchens</PageTitle>
          <ul className="grid gap-frame">
            {own.jobs.map((job) => (
              <li key={job.id}>
                <Panel as="article">
                  <h2 className="font-title text-part font-semibold">
                    <Link href={paths.job(slug, job.id)} className="text-brand underline">
                      {job.name}
                    </Link>
                  </h2>
                  <p className="text-quiet">
                    {job.address}. {JOB_STAGE_NAMES[job.stage]}.
                  </p>
                </Panel>
              </li>
            ))}
          </ul>
        </>
      )}
      <SignedInAs />
    </PortalFrame>
  );
}
