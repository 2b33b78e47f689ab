import { cache } from 'react';
import { notFound } from 'next/navigation';
import type { Actor } from '@/lib/contracts/actor';
import type { JobView } from '@/lib/contracts/job';
import { readJob } from '@/lib/services/job/read';

const readOnce = cache((actor: Actor, jobId: string) => readJob(actor, { jobId }));

/** The job of the address, read once per request; not found when it is not the visitor's. */
export async function requireJob(actor: Actor, jobId: string): Promise<JobView> {
  const job = await readOnce(actor, jobId);
  if (!job.ok) notFound();
  return job.value;
}
