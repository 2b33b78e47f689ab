import { cache } from 'react';
import { auth } from '@clerk/nextjs/server';
import { notFound, redirect } from 'next/navigation';
import type { Actor } from '@/lib/contracts/actor';
import { paths } from '@/lib/paths';
import { resolveActor } from '@/lib/services/session/resolve-actor';

/** The sign-in's id of who asks; somebody signed out is led to the contractor's sign-in. */
export async function requireUser(company: string): Promise<string> {
  const { userId } = await auth();
  if (!userId) redirect(paths.signIn(company));
  return userId;
}

const resolveOnce = cache((slug: string, clerkUserId: string, jobId: string) =>
  resolveActor({ slug, clerkUserId, jobId }),
);

/** Who asks for a job's page, once per request; another household's or contractor's job is not found. */
export async function requireActor(company: string, jobId: string): Promise<Actor> {
  const actor = await resolveOnce(company, await requireUser(company), jobId);
  if (!actor) notFound();
  return actor;
}
