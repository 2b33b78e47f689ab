import { and, eq, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { schemeHistory, schemes } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import type { Kitchen } from '../job/load-kitchen';
import { priceChoices } from './price';

/**
 * Computes a job's schemes again after its survey or edition changed; each that comes to another total gets a new
 * version. One whose choices the edition no longer has keeps its total until somebody chooses anew.
 */
export async function repriceSchemes(tx: Transaction, actor: Actor, kitchen: Kitchen): Promise<void> {
  const { companyId } = actor;
  const jobId = kitchen.job.id;
  const rows = await tx
    .select()
    .from(schemes)
    .where(and(eq(schemes.companyId, companyId), eq(schemes.jobId, jobId), isNull(schemes.archivedAt)))
    .for('update');
  const at = now();
  for (const row of rows) {
    const priced = priceChoices(kitchen, row.choices);
    if (!priced.ok || priced.value === row.totalCents) continue;
    const version = row.version + 1;
    await tx
      .update(schemes)
      .set({ totalCents: priced.value, version, updatedAt: at })
      .where(and(eq(schemes.companyId, companyId), eq(schemes.id, row.id)));
    await tx.insert(schemeHistory).values({
      companyId,
      jobId,
      schemeId: row.id,
      version,
      change: [],
      choices: row.choices,
      totalCents: priced.value,
      personId: actor.personId,
      createdAt: at,
    });
  }
}
