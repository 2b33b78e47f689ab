import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { schemes } from '@/db/schema';
import { SCHEME_LETTERS, type SchemeView } from '@/lib/contracts/scheme';

type Scheme = typeof schemes.$inferSelect;

export function schemeView(row: Scheme): SchemeView {
  const letter = SCHEME_LETTERS.find((one) => one === row.letter);
  if (!letter) throw new Error(`Scheme ${row.id} has the letter ${row.letter}.`);
  return {
    id: row.id,
    jobId: row.jobId,
    letter,
    name: row.name,
    choices: row.choices,
    decided: row.decided,
    unsure: row.unsure,
    version: row.version,
    totalCents: row.totalCents,
    proposed: row.proposed,
    updatedAt: row.updatedAt.toISOString(),
  };
}

/** A job's schemes that were not thrown away, by letter. */
export async function readSchemes(tx: Transaction, companyId: string, jobId: string): Promise<SchemeView[]> {
  const rows = await tx
    .select()
    .from(schemes)
    .where(and(eq(schemes.companyId, companyId), eq(schemes.jobId, jobId), isNull(schemes.archivedAt)))
    .orderBy(asc(schemes.letter));
  return rows.map(schemeView);
}
