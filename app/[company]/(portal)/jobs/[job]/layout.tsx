import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { readCompany } from '@/app/[company]/read-company';
import { requireActor } from '@/app/[company]/visitor';
import { PortalFrame } from '@/components/portal/portal-frame';
import { requireJob } from './read-job';

/** The frame of a job's pages: whose kitchen it is and whom to ask. */
export default async function JobLayout({
  params,
  children,
}: {
  params: Promise<{ company: string; job: string }>;
  children: ReactNode;
}) {
  const { company: slug, job: jobId } = await params;
  const company = await readCompany(slug);
  if (!company) notFound();
  const actor = await requireActor(slug, jobId);
  const job = await requireJob(actor, jobId);
  return (
    <PortalFrame company={company} job={job} salesperson={job.salesperson.name.split(' ')[0]}>
      {children}
    </PortalFrame>
  );
}
