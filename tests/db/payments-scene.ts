import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { z } from 'zod';
import { withScope } from '@/db/client';
import { companies, draws, guests, jobs, ledger, members, people } from '@/db/schema';
import type { Guest, Member, Worker } from '@/lib/contracts/actor';
import type { DrawState } from '@/lib/contracts/states';
import { eventShape, refundShape, type ApiEvent } from '@/lib/local/stripe/objects';
import { startStripeFake, type StripeFake } from '@/lib/local/stripe/server';
import { signPayload } from '@/lib/local/stripe/webhooks';
import { takePaymentWebhook } from '@/lib/services/payment/take-webhook';

export interface Household {
  readonly jobId: string;
  readonly guests: readonly [Guest, Guest];
  readonly drawIds: readonly string[];
}

export interface Contractor {
  readonly companyId: string;
  readonly account: string;
  readonly worker: Worker;
  readonly owner: Member;
}

export async function addContractor(slug: string, account: string): Promise<Contractor> {
  const companyId = randomUUID();
  const worker: Worker = { kind: 'worker', companyId };
  const personId = randomUUID();
  const email = `owner@${slug}.example`;
  await withScope(worker, async (tx) => {
    await tx.insert(companies).values({
      id: companyId,
      slug,
      name: slug,
      phone: '(555) 010-0100',
      timeZone: 'America/New_York',
      state: 'NY',
      brand: { light: '#0b5d63', dark: '#5fb6ba', markSvg: null },
      settings: {
        drawPlan: [{ label: 'Deposit', share: 1_000_000, due: 'signing' }],
        ruleSet: 'none',
        terms: null,
        warrantyYears: 5,
        insurance: '',
        permits: '',
        disconnects: '',
        startWindow: '',
        salespersonLimitCents: 0,
      },
      clerkOrganizationId: `org_${slug}`,
      stripeAccountId: account,
    });
    await tx.insert(people).values({ companyId, id: personId, email, name: 'Ines Aldaba' });
    await tx.insert(members).values({ companyId, personId, role: 'owner', clerkMembershipId: `mem_${slug}` });
  });
  const owner: Member = { kind: 'member', companyId, personId, role: 'owner', name: 'Ines Aldaba', email };
  return { companyId, account, worker, owner };
}

const refundsShape = z.object({ data: z.array(refundShape) });

let jobNumber = 0;

/** A signed job with payments of the given sums, the first of them due. */
export async function addHousehold(
  { companyId, worker, owner }: Contractor,
  amountsCents: readonly number[] = [312_000, 312_000, 312_000, 104_000],
): Promise<Household> {
  const jobId = randomUUID();
  const number = (jobNumber += 1);
  const guest = (name: string): Guest => ({
    kind: 'guest',
    companyId,
    jobId,
    personId: randomUUID(),
    role: 'homeowner',
    name,
    email: `${name.toLowerCase().replace(/\W/g, '.')}.${number}@household.example`,
    signer: true,
  });
  const pair = [guest('Mara Winslade'), guest('Teo Winslade')] as const;
  const drawIds = amountsCents.map(() => randomUUID());
  await withScope(worker, async (tx) => {
    await tx.insert(jobs).values({
      companyId,
      id: jobId,
      number,
      name: 'Sorrel Lane',
      address: '14 Sorrel Lane',
      stage: 'signed',
      salespersonId: owner.personId,
    });
    for (const { personId, email, name, signer } of pair) {
      await tx.insert(people).values({ companyId, id: personId, email, name });
      await tx.insert(guests).values({ companyId, jobId, personId, signer });
    }
    await tx.insert(draws).values(
      amountsCents.map((amountCents, index) => ({
        companyId,
        id: drawIds[index],
        jobId,
        number: index + 1,
        label: index === 0 ? 'Deposit' : `Part ${index + 1}`,
        due: index === 0 ? ('signing' as const) : ('installing' as const),
        amountCents,
        state: index === 0 ? ('due' as const) : ('planned' as const),
      })),
    );
    await tx.insert(ledger).values({
      companyId,
      jobId,
      kind: 'agreement',
      amountCents: amountsCents.reduce((sum, cents) => sum + cents, 0),
      pageSequence: 1,
      memo: 'Agreement, page 1',
      at: new Date('2026-11-20T15:00:00Z'),
    });
  });
  return { jobId, guests: pair, drawIds };
}

export interface Service {
  readonly fake: StripeFake;
  /** Pays as the card form does, with one of the service's test cards. */
  pay(account: string, intentId: string, method?: string): Promise<number>;
  refund(account: string, intentId: string, amountCents?: number): Promise<void>;
  /** A bank debit that is on its way arrives, or comes back. */
  arrive(account: string, intentId: string): Promise<void>;
  /** The bank sends an intent's newest refund back. */
  failRefund(account: string, intentId: string): Promise<void>;
  /** The next `times` answers about an intent, or about any, get lost on the way. */
  loseAnswers(intentId: string | null, times: number): Promise<void>;
  /** All events about an intent so far, oldest first. */
  events(intentId: string): Promise<ApiEvent[]>;
  read(account: string, address: string): Promise<unknown>;
  stop(): Promise<void>;
}

/** Starts the payment service's stand-in on a port of its own and points the program at it; it delivers nothing by itself. */
export async function startService(): Promise<Service> {
  const folder = mkdtempSync(path.join(tmpdir(), 'payments-'));
  const secretKey = process.env.STRIPE_SECRET_KEY ?? '';
  const fake = await startStripeFake({
    port: 0,
    stateFile: path.join(folder, 'stripe.json'),
    secretKey,
    publishableKey: process.env.STRIPE_PUBLISHABLE_KEY ?? '',
    webhookUrl: '',
    webhookSecret: process.env.STRIPE_WEBHOOK_SECRET ?? '',
    webOrigin: 'http://localhost:4300',
  });
  process.env.STRIPE_API_BASE = fake.origin;
  const call = (account: string, address: string, form?: Record<string, string>, root = 'v1') =>
    fetch(`${fake.origin}/${root}/${address}`, {
      method: form ? 'POST' : 'GET',
      headers: { authorization: `Bearer ${secretKey}`, 'stripe-account': account },
      body: form ? new URLSearchParams(form) : undefined,
    });
  return {
    fake,
    pay: async (account, intentId, method = 'pm_card_visa') =>
      (await call(account, `payment_intents/${intentId}/confirm`, { payment_method: method })).status,
    refund: async (account, intentId, amountCents) => {
      const form = { payment_intent: intentId, ...(amountCents ? { amount: String(amountCents) } : {}) };
      const answer = await call(account, 'refunds', form);
      if (answer.status !== 200) throw new Error(`refused: ${await answer.text()}`);
    },
    arrive: async (account, intentId) => {
      const answer = await call(account, `payment_intents/${intentId}/arrive`, {}, '_fake');
      if (answer.status !== 200) throw new Error(`refused: ${await answer.text()}`);
    },
    failRefund: async (account, intentId) => {
      const list = await call(account, `refunds?payment_intent=${intentId}`);
      const [refund] = refundsShape.parse(await list.json()).data;
      const answer = await call(account, `refunds/${refund?.id ?? ''}/fail`, {}, '_fake');
      if (answer.status !== 200) throw new Error(`refused: ${await answer.text()}`);
    },
    loseAnswers: async (intentId, times) => {
      const body = JSON.stringify({ path: `/v1/payment_intents${intentId ? `/${intentId}` : ''}`, times });
      await fetch(`${fake.origin}/_fake/requests/drop-answer`, { method: 'POST', body });
    },
    events: async (intentId) => {
      const answer = await fetch(`${fake.origin}/_fake/events?intent=${intentId}`);
      return eventShape.array().parse(await answer.json());
    },
    read: async (account, address) => (await call(account, address)).json(),
    stop: async () => {
      await fake.stop();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

/** Delivers an event as the service does: signed, by way of the webhook's own door. */
export function deliver(event: ApiEvent): Promise<200 | 400 | 503> {
  const body = JSON.stringify(event);
  return takePaymentWebhook(body, signPayload(body, process.env.STRIPE_WEBHOOK_SECRET ?? ''));
}

export interface Held {
  readonly draws: readonly { number: number; state: DrawState; amountCents: number }[];
  readonly ledger: readonly { kind: string; amountCents: number; externalId: string | null; memo: string }[];
  readonly payments: readonly { intentId: string; status: string; amountCents: number }[];
}

/** What the database holds of a household's money, read as the company itself. */
export function readHeld({ worker }: Contractor, { jobId }: Household): Promise<Held> {
  return withScope(worker, async (tx) => ({
    draws: await tx.query.draws.findMany({
      columns: { number: true, state: true, amountCents: true },
      where: (draw, { eq }) => eq(draw.jobId, jobId),
      orderBy: (draw, { asc }) => asc(draw.number),
    }),
    ledger: await tx.query.ledger.findMany({
      columns: { kind: true, amountCents: true, externalId: true, memo: true },
      where: (entry, { eq }) => eq(entry.jobId, jobId),
      orderBy: (entry, { asc }) => [asc(entry.kind), asc(entry.externalId)],
    }),
    payments: await tx.query.payments.findMany({
      columns: { intentId: true, status: true, amountCents: true },
      where: (payment, { eq }) => eq(payment.jobId, jobId),
      orderBy: (payment, { asc }) => asc(payment.createdAt),
    }),
  }));
}
