import { requireMember } from '@/app/[company]/member';
import { JobsTable } from '@/components/desk/jobs-table';
import { PageTitle } from '@/components/ui/frame';
import { Panel } from '@/components/ui/panel';
import { NotAllowed } from '@/components/ui/states';
import { listJobs } from '@/lib/services/job/list';

export const metadata = { title: 'Jobs' };

export default async function JobsPage({ params }: { params: Promise<{ company: string }> }) {
  const { company } = await params;
  const jobs = await listJobs(await requireMember(company));
  if (!jobs.ok) return <NotAllowed reason={jobs.fault.sentence} />;
  return (
    <>
      <PageTitle>Jobs</PageTitle>
      <Panel>
        <JobsTable company={company} rows={jobs.value} />
      </Panel>
    </>
  );
}
