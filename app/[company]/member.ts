import { cache } from 'react';
import { notFound } from 'next/navigation';
import type { Member } from '@/lib/contracts/actor';
import { resolveActor } from '@/lib/services/session/resolve-actor';
import { requireUser } from './visitor';

const resolveOnce = cache((slug: string, clerkUserId: string) => resolveActor({ slug, clerkUserId }));

/** The member of the contractor's staff who asks, once per request; to everybody else the desk is not found. */
export async function requireMember(company: string): Promise<Member> {
  const actor = await resolveOnce(company, await requireUser(company));
  if (actor?.kind !== 'member') notFound();
  return actor;
}
