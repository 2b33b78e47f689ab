import type { Transaction } from '@/db/client';
import { audit } from '@/db/schema';
import type { Actor, Worker } from '@/lib/contracts/actor';

export interface AuditEntry {
  /** Noun and verb, such as `scheme.change`. */
  readonly verb: string;
  /** Id of the row it was done to. */
  readonly subject: string;
  readonly jobId: string | null;
  /** What a person would want to know later; never a secret. */
  readonly detail: Readonly<Record<string, unknown>>;
}

/** Writes who did what, in the transaction that does it. */
export async function writeAudit(tx: Transaction, actor: Actor | Worker, entry: AuditEntry): Promise<void> {
  await tx.insert(audit).values({
    companyId: actor.companyId,
    actor: actor.kind,
    personId: actor.kind === 'worker' ? null : actor.personId,
    ...entry,
  });
}
