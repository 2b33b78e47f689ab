import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { closePool, withScope } from '@/db/client';
import { enqueue, workQueues, type Handlers } from '@/lib/adapters/queue';
import type { MailJob } from '@/lib/contracts/jobs';
import { startMailFake } from '@/lib/local/mail/server';
import { freePort } from '@/lib/local/ports';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { deliverMail } from '@/lib/services/mail/deliver';
import { addContractor, type Contractor } from './scene';

let database: TestDatabase;
let owner: postgres.Sql;
let tern: Contractor;
let mailbox: Awaited<ReturnType<typeof startMailFake>>;
const folder = mkdtempSync(path.join(tmpdir(), 'mails-'));

beforeAll(async () => {
  database = await cloneTestDatabase();
  owner = postgres(database.ownerUrl, { max: 1 });
  const smtpPort = await freePort(4700 + (process.pid % 400) * 2);
  const mailboxPort = await freePort(smtpPort + 1, new Set([smtpPort]));
  mailbox = await startMailFake({ smtpPort, mailboxPort, stateFolder: folder });
  process.env.SMTP_URL = `smtp://127.0.0.1:${smtpPort}`;
  tern = await addContractor('tern-hollow');
});

afterAll(async () => {
  await closePool();
  await owner.end();
  await mailbox.stop();
  await database.drop();
  rmSync(folder, { recursive: true, force: true });
});

const mail = (subject: string): MailJob => ({
  companyId: tern.companyId,
  to: { name: 'Mara <b>Winslade</b>', email: 'mara@winslade.example' },
  subject,
  text: 'The first paragraph.\n\nThe second & last.',
  action: { label: 'Open it', url: 'http://localhost:4300/tern-hollow?a=1&b=2' },
});

const put = (payload: MailJob, then: () => void = () => undefined) =>
  withScope(tern.worker, async (tx) => {
    const id = await enqueue(tx, 'mail', payload);
    then();
    return id;
  });

const stateOf = async (id: string) => {
  const [row] = await owner`select state, retry_count, dead_letter from pgboss.job where id = ${id}`;
  return row && { ...row };
};

/** Runs a worker until `handle` has been called for the job, then stops it; what it was doing is finished first. */
async function workUntilDone(id: string, handle: Handlers['mail']): Promise<void> {
  const nothing = () => Promise.resolve();
  let done: () => void = nothing;
  const called = new Promise<void>((resolve) => (done = resolve));
  const worker = await workQueues({
    mail: async (payload, job) => {
      try {
        await handle(payload, job);
      } finally {
        if (job.id === id) done();
      }
    },
    paymentReceipt: nothing,
    pageSealed: nothing,
  });
  await called;
  await worker.stop();
}

const waitShape = z.object({
  mail: z.object({
    from: z.string(),
    subject: z.string(),
    text: z.string(),
    html: z.string(),
    links: z.array(z.string()),
  }),
});

describe('a job put in a queue', () => {
  it('is there when its transaction is kept and not when it is taken back', async () => {
    await expect(
      put(mail('Taken back'), () => {
        throw new Error('changed my mind');
      }),
    ).rejects.toThrow('changed my mind');
    const kept = await put(mail('Kept'));
    const rows = await owner`select id, data from pgboss.job where name = 'mail'`;
    expect(rows.map((row) => row.id)).toEqual([kept]);
    expect(rows[0]?.data).toEqual(mail('Kept'));
  });

  it('whose payload is not what the queue takes is refused at once', async () => {
    await expect(put({ ...mail('x'), companyId: 'nobody' })).rejects.toThrow();
  });

  it('that fails is kept for another try and knows where it goes after the last', async () => {
    const id = await put(mail('Fails'));
    await workUntilDone(id, () => Promise.reject(new Error('the mail server is away')));
    expect(await stateOf(id)).toEqual({ state: 'retry', retry_count: 0, dead_letter: 'failed' });
  });

  it('is done by a worker that connects as the program does: the mail arrives in the contractor’s name', async () => {
    const id = await put(mail('Your kitchen'));
    await workUntilDone(id, deliverMail);
    expect(await stateOf(id)).toMatchObject({ state: 'completed' });
    const answer = await fetch(`${mailbox.origin}/api/wait?to=mara@winslade.example&subject=Your%20kitchen`);
    const { mail: arrived } = waitShape.parse(await answer.json());
    expect(arrived.from).toBe(`no-reply@${process.env.MAIL_DOMAIN}`);
    expect(arrived.text).toContain('tern-hollow, (555) 010-0100');
    expect(arrived.text).toContain('The first paragraph.\n\nThe second & last.');
    expect(arrived.html).toContain('Mara &lt;b&gt;Winslade&lt;/b&gt;');
    expect(arrived.html).toContain('#0b5d63');
    expect(arrived.links).toContain('http://localhost:4300/tern-hollow?a=1&b=2');
  });
});
