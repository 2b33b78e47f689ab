import { eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies } from '@/db/schema';
import { sendMail } from '@/lib/adapters/mail';
import type { MailJob } from '@/lib/contracts/jobs';
import { composeMail } from './compose';

/** Writes one mail in its contractor's brand and hands it to the mail server. Throws when it is not taken. */
export async function deliverMail(mail: MailJob, job: { readonly id: string }): Promise<void> {
  const sender = await withScope({ kind: 'worker', companyId: mail.companyId }, async (tx) => {
    const [row] = await tx.select().from(companies).where(eq(companies.id, mail.companyId));
    return row;
  });
  if (!sender) throw new Error(`There is no company ${mail.companyId}.`);
  await sendMail({
    id: job.id,
    fromName: sender.name,
    to: mail.to,
    subject: mail.subject,
    ...composeMail(mail, sender),
  });
}
