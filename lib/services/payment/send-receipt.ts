import { and, eq, isNull } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies, guests, ledger, people } from '@/db/schema';
import { environment } from '@/lib/adapters/environment';
import { enqueue } from '@/lib/adapters/queue';
import type { JobPayload } from '@/lib/contracts/jobs';
import { paths } from '@/lib/paths';
import { calendarDate, readSchedule } from '../draw/schedule';
import { sumLedger } from '../ledger/balance';
import { composeReceipt } from './compose-receipt';

/** Writes the receipt of one posted payment to everyone of the household. */
export async function sendReceipt({ companyId, ledgerId }: JobPayload<'paymentReceipt'>): Promise<void> {
  await withScope({ kind: 'worker', companyId }, async (tx) => {
    const [entry] = await tx
      .select()
      .from(ledger)
      .where(and(eq(ledger.companyId, companyId), eq(ledger.id, ledgerId)));
    const [company] = await tx.select().from(companies).where(eq(companies.id, companyId));
    if (!entry || !company) throw new Error(`There is no ledger entry ${ledgerId}.`);
    const schedule = await readSchedule(tx, companyId, entry.jobId);
    const draw = schedule?.draws.find((one) => one.id === entry.drawId);
    if (!schedule || !draw) throw new Error(`Ledger entry ${ledgerId} belongs to no payment.`);
    const household = await tx
      .select({ name: people.name, email: people.email })
      .from(guests)
      .innerJoin(people, and(eq(people.companyId, guests.companyId), eq(people.id, guests.personId)))
      .where(and(eq(guests.companyId, companyId), eq(guests.jobId, entry.jobId), isNull(guests.revokedAt)));
    const words = composeReceipt({
      contractor: company,
      jobName: schedule.jobName,
      draw,
      receivedCents: -entry.amountCents,
      receivedOn: calendarDate(entry.at, company.timeZone),
      memo: entry.memo,
      balance: await sumLedger(tx, companyId, entry.jobId),
    });
    const url = environment().APP_ORIGIN + paths.payment(company.slug, entry.jobId, draw.id);
    for (const to of household) {
      await enqueue(tx, 'mail', { companyId, to, ...words, action: { label: 'See the receipt', url } });
    }
  });
}
