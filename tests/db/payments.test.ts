import { randomUUID } from 'node:crypto';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { POST } from '@/app/api/webhooks/stripe/route';
import { closePool, withScope } from '@/db/client';
import { audit, draws, ledger, webhookEvents } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { receiptJobShape, type PaymentStart } from '@/lib/contracts/payment';
import type { Result } from '@/lib/contracts/result';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { signPayload } from '@/lib/local/stripe/webhooks';
import { listDraws } from '@/lib/services/draw/list';
import { readBalance } from '@/lib/services/ledger/balance';
import { readPayment } from '@/lib/services/payment/read';
import { refundPayment } from '@/lib/services/payment/refund';
import { sendReceipt } from '@/lib/services/payment/send-receipt';
import { startPayment } from '@/lib/services/payment/start';
import {
  addContractor,
  addHousehold,
  deliver,
  readHeld,
  startService,
  type Contractor,
  type Household,
  type Service,
} from './payments-scene';

let database: TestDatabase;
let service: Service;
let tern: Contractor;
let quill: Contractor;

beforeAll(async () => {
  database = await cloneTestDatabase();
  service = await startService();
  tern = await addContractor('tern-hollow', 'acct_ternhollow');
  quill = await addContractor('quillback', 'acct_quillback');
});

afterAll(async () => {
  await closePool();
  await service.stop();
  await database.drop();
});

function valueOf<T>(result: Result<T>): T {
  if (!result.ok) throw new Error(`refused: ${result.fault.code} ${result.fault.sentence}`);
  return result.value;
}

const codeOf = (result: Result<unknown>) => (result.ok ? 'ok' : result.fault.code);
const intentOf = ({ clientSecret }: PaymentStart) => clientSecret.split('_secret_')[0] ?? '';
const first = ({ drawIds }: Household) => ({ drawId: drawIds[0] });

async function begin(household: Household): Promise<string> {
  return intentOf(valueOf(await startPayment(household.guests[0], first(household))));
}

async function deliverAll(intentId: string): Promise<void> {
  for (const event of await service.events(intentId)) expect(await deliver(event)).toBe(200);
}

describe('starting a payment', () => {
  it('both of a household, asking again and again at the same time, get one intent', async () => {
    const household = await addHousehold(tern);
    const [mara, teo] = household.guests;
    const starts = await Promise.all(
      [mara, teo, mara, teo, mara, teo].map((guest) => startPayment(guest, first(household))),
    );
    const later = await startPayment(teo, first(household));
    expect(new Set([...starts, later].map((one) => intentOf(valueOf(one)))).size).toBe(1);
    expect((await readHeld(tern, household)).payments).toHaveLength(1);
  });

  it("is asked of the company's own account and for the draw's sum", async () => {
    const household = await addHousehold(quill, [88_800]);
    const start = valueOf(await startPayment(household.guests[0], first(household)));
    expect(start.account).toBe('acct_quillback');
    const kept = await service.read('acct_quillback', `payment_intents/${intentOf(start)}`);
    expect(kept).toMatchObject({
      amount: 88_800,
      currency: 'usd',
      metadata: { draw_id: household.drawIds[0] },
    });
  });

  it('staff may not; of another household, another company, or nothing, there is no such payment', async () => {
    const household = await addHousehold(tern);
    const neighbours = await addHousehold(tern);
    const elsewhere = await addHousehold(quill);
    const outcomes: [Actor, unknown, string][] = [
      [tern.owner, first(household), 'notAllowed'],
      [neighbours.guests[0], first(household), 'notFound'],
      [elsewhere.guests[0], first(household), 'notFound'],
      [household.guests[0], { drawId: '00000000-0000-4000-8000-000000000000' }, 'notFound'],
      [household.guests[0], { drawId: 'x' }, 'notFound'],
    ];
    for (const [actor, input, code] of outcomes) expect(codeOf(await startPayment(actor, input))).toBe(code);
    for (const actor of [neighbours.guests[0], elsewhere.guests[0], quill.owner]) {
      expect(codeOf(await readPayment(actor, first(household)))).toBe('notFound');
      expect(codeOf(await listDraws(actor, { jobId: household.jobId }))).toBe('notFound');
      expect(codeOf(await readBalance(actor, { jobId: household.jobId }))).toBe('notFound');
    }
    expect((await readHeld(tern, household)).payments).toEqual([]);
  });

  it('a payment that is not due, or is paid, cannot be started', async () => {
    const household = await addHousehold(tern);
    const [mara] = household.guests;
    expect(codeOf(await startPayment(mara, { drawId: household.drawIds[1] }))).toBe('conflict');
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    // Paid at the service, and the webhook is still under way.
    expect(codeOf(await startPayment(mara, first(household)))).toBe('conflict');
    await deliverAll(intentId);
    expect(codeOf(await startPayment(mara, first(household)))).toBe('conflict');
  });

  it('after the sum has changed, the old sum can no longer be paid', async () => {
    const household = await addHousehold(tern);
    const old = await begin(household);
    await withScope(tern.worker, (tx) =>
      tx
        .update(draws)
        .set({ amountCents: 300_000 })
        .where(and(eq(draws.companyId, tern.companyId), eq(draws.id, household.drawIds[0] ?? ''))),
    );
    const fresh = await begin(household);
    expect(fresh).not.toBe(old);
    expect(await service.pay(tern.account, old)).toBe(400);
    expect(await service.pay(tern.account, fresh)).toBe(200);
    await deliverAll(old);
    await deliverAll(fresh);
    const held = await readHeld(tern, household);
    expect(held.draws[0]?.state).toBe('paid');
    expect(held.ledger.filter((entry) => entry.kind === 'payment').map((entry) => entry.amountCents)).toEqual(
      [-300_000],
    );
  });
});

describe('posting', () => {
  it('a paid intent makes one ledger entry, a paid draw and one receipt, by the webhook alone', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    expect((await readHeld(tern, household)).draws[0]?.state).toBe('due');
    const [view] = [valueOf(await readPayment(household.guests[1], first(household)))];
    expect([view.draw.state, view.attempt?.status]).toEqual(['due', 'succeeded']);
    await deliverAll(intentId);
    const held = await readHeld(tern, household);
    expect(held.draws.map((draw) => draw.state)).toEqual(['paid', 'planned', 'planned', 'planned']);
    expect(held.payments).toEqual([{ intentId, status: 'succeeded', amountCents: 312_000 }]);
    expect(held.ledger).toMatchObject([
      { kind: 'agreement', amountCents: 1_040_000 },
      { kind: 'payment', amountCents: -312_000, memo: 'Payment 1 of 4, Visa ending in 4242' },
    ]);
    const { draws: list, balance } = valueOf(
      await listDraws(household.guests[1], { jobId: household.jobId }),
    );
    expect(list[0]).toMatchObject({
      number: 1,
      of: 4,
      state: 'paid',
      receivedCents: 312_000,
      refundedCents: 0,
    });
    expect(balance.balanceCents).toBe(728_000);
  });

  it('the same event, again and again and at the same time, counts once', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    const paid = (await service.events(intentId)).find((event) => event.type === 'payment_intent.succeeded');
    if (!paid) throw new Error('no such event');
    expect(await Promise.all(Array.from({ length: 8 }, () => deliver(paid)))).toEqual(Array(8).fill(200));
    const before = await readHeld(tern, household);
    expect(before.ledger.filter((entry) => entry.kind === 'payment')).toHaveLength(1);
    await deliver(paid);
    await deliverAll(intentId);
    expect(await readHeld(tern, household)).toEqual(before);
    const stored = await withScope(tern.worker, (tx) =>
      tx.select().from(webhookEvents).where(eq(webhookEvents.eventId, paid.id)),
    );
    expect(stored).toHaveLength(1);
  });

  it('declined, declined, paid, partly refunded: any order of the events, some twice, ends the same', async () => {
    const plays = fc.asyncProperty(fc.infiniteStream(fc.nat()), async (stream) => {
      const household = await addHousehold(tern);
      const intentId = await begin(household);
      expect(await service.pay(tern.account, intentId, 'pm_card_visa_chargeDeclined')).toBe(402);
      expect(await service.pay(tern.account, intentId, 'pm_card_chargeDeclinedExpiredCard')).toBe(402);
      expect(await service.pay(tern.account, intentId)).toBe(200);
      await service.refund(tern.account, intentId, 12_000);
      const events = await service.events(intentId);
      const left = [...events, ...events.slice(-3)];
      while (left.length > 0) {
        const [next] = left.splice((stream.next().value ?? 0) % left.length, 1);
        if (next) expect(await deliver(next)).toBe(200);
      }
      const held = await readHeld(tern, household);
      expect(held.draws[0]?.state).toBe('paid');
      expect(held.payments[0]?.status).toBe('succeeded');
      expect(held.ledger.map((entry) => [entry.kind, entry.amountCents])).toEqual([
        ['agreement', 1_040_000],
        ['payment', -312_000],
        ['refund', 12_000],
      ]);
    });
    await fc.assert(plays, { numRuns: 12 });
  });

  it('a declined card leaves the draw due and says why; the next card pays the same intent', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId, 'pm_card_visa_chargeDeclinedInsufficientFunds');
    await deliverAll(intentId);
    const refused = valueOf(await readPayment(household.guests[0], first(household)));
    expect(refused.draw.state).toBe('due');
    expect(refused.attempt?.decline).toContain('not enough money');
    expect(await begin(household)).toBe(intentId);
    await service.pay(tern.account, intentId);
    await deliverAll(intentId);
    expect((await readHeld(tern, household)).draws[0]?.state).toBe('paid');
  });

  it("an event that arrives under another company's account touches nothing", async () => {
    const household = await addHousehold(tern);
    const before = await begin(household);
    await service.pay(tern.account, before);
    const held = await readHeld(tern, household);
    for (const event of await service.events(before)) {
      const { account: _, ...platform } = event;
      for (const foreign of [
        { ...event, account: 'acct_quillback' },
        { ...event, account: 'acct_x' },
        platform,
      ]) {
        expect(await deliver({ ...foreign, id: `${event.id}${foreign === platform ? 'p' : ''}` })).toBe(200);
      }
    }
    expect(await readHeld(tern, household)).toEqual(held);
  });

  it("an event's content is not believed: what is posted is what the service holds", async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    const [created] = await service.events(intentId);
    if (!created) throw new Error('no such event');
    const object = { ...created.data.object, status: 'succeeded', amount_received: 312_000 };
    const told = { ...created, id: 'evt_untrue', type: 'payment_intent.succeeded', data: { object } };
    expect(await deliver(told)).toBe(200);
    const held = await readHeld(tern, household);
    expect(held.draws[0]?.state).toBe('due');
    expect(held.ledger.map((entry) => entry.kind)).toEqual(['agreement']);
  });
});

describe('bank debits', () => {
  it('a debit on its way shows as processing, cannot be paid beside, and is paid when it arrives', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId, 'pm_usBankAccount_success');
    await deliverAll(intentId);
    const held = await readHeld(tern, household);
    expect(held.draws[0]?.state).toBe('processing');
    expect(held.ledger.map((entry) => entry.kind)).toEqual(['agreement']);
    expect(codeOf(await startPayment(household.guests[1], first(household)))).toBe('conflict');
    await service.arrive(tern.account, intentId);
    // What told of the debit's start comes late, and twice.
    for (const event of (await service.events(intentId)).toReversed())
      await deliver({ ...event, id: `${event.id}late` });
    const after = await readHeld(tern, household);
    expect(after.draws[0]?.state).toBe('paid');
    expect(after.ledger.at(-1)).toMatchObject({
      kind: 'payment',
      memo: 'Payment 1 of 4, Bank account ending in 6789',
    });
  });

  it('a debit that comes back leaves the draw due and nothing in the ledger', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId, 'pm_usBankAccount_insufficientFunds');
    await deliverAll(intentId);
    await service.arrive(tern.account, intentId);
    await deliverAll(intentId);
    const held = await readHeld(tern, household);
    expect(held.draws[0]?.state).toBe('due');
    expect(held.ledger.map((entry) => entry.kind)).toEqual(['agreement']);
    expect(await begin(household)).toBe(intentId);
  });
});

describe("the webhook's door", () => {
  const knock = (body: string, signature: string | null) =>
    POST(
      new Request('http://localhost:4300/api/webhooks/stripe', {
        method: 'POST',
        body,
        headers: signature === null ? {} : { 'stripe-signature': signature },
      }),
    );

  it('opens to what is signed, byte for byte, and answers 400 to everything else', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    const before = await readHeld(tern, household);
    const [event] = (await service.events(intentId)).slice(-1);
    const body = JSON.stringify(event, null, 2);
    const signature = signPayload(body, process.env.STRIPE_WEBHOOK_SECRET ?? '');
    expect((await knock(`${body} `, signature)).status).toBe(400);
    expect((await knock(body, signPayload(body, 'whsec_other'))).status).toBe(400);
    expect((await knock(body, null)).status).toBe(400);
    expect(await readHeld(tern, household)).toEqual(before);
    expect((await knock(body, signature)).status).toBe(200);
    expect((await readHeld(tern, household)).draws[0]?.state).toBe('paid');
  });
});

describe('when the service cannot be asked', () => {
  it('nothing of the event is stored, and its next delivery posts it', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    const before = await readHeld(tern, household);
    const paid = (await service.events(intentId)).find((event) => event.type === 'payment_intent.succeeded');
    if (!paid) throw new Error('no such event');
    // The library asks three times in all.
    await service.loseAnswers(intentId, 3);
    expect(await deliver(paid)).toBe(503);
    expect(await readHeld(tern, household)).toEqual(before);
    expect(await deliver(paid)).toBe(200);
    expect((await readHeld(tern, household)).draws[0]?.state).toBe('paid');
  });

  it('an answer to the start that gets lost makes no second intent', async () => {
    const household = await addHousehold(tern);
    await service.loseAnswers(null, 1);
    const intentId = await begin(household);
    expect(await begin(household)).toBe(intentId);
    const created = (await service.events(intentId)).filter(
      (event) => event.type === 'payment_intent.created',
    );
    expect(created).toHaveLength(1);
  });
});

describe('refunds', () => {
  it('only the owner gives back, never more than is left, and a second click gives nothing', async () => {
    const household = await addHousehold(tern);
    const ask = (actor: Actor, amountCents: number, requestId: string) =>
      refundPayment(actor, { ...first(household), amountCents, reason: 'Pull was scratched', requestId });
    const [one, two] = [randomUUID(), randomUUID()];
    expect(codeOf(await ask(tern.owner, 1_000, one))).toBe('conflict');
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    await deliverAll(intentId);
    expect(codeOf(await ask(household.guests[0], 1_000, one))).toBe('notAllowed');
    expect(codeOf(await ask(quill.owner, 1_000, one))).toBe('notFound');
    expect(codeOf(await ask(tern.owner, 312_001, two))).toBe('conflict');
    const refund = valueOf(await ask(tern.owner, 1_000, one));
    expect(valueOf(await ask(tern.owner, 1_000, one))).toEqual(refund);
    await deliverAll(intentId);
    const held = await readHeld(tern, household);
    expect(held.ledger.at(-1)).toMatchObject({
      kind: 'refund',
      amountCents: 1_000,
      externalId: refund.refundId,
    });
  });

  it('a refund that the bank sends back is taken back in the ledger', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    await service.refund(tern.account, intentId);
    await deliverAll(intentId);
    expect((await readHeld(tern, household)).draws[0]?.state).toBe('due');
    await service.failRefund(tern.account, intentId);
    await deliverAll(intentId);
    const held = await readHeld(tern, household);
    expect(held.draws[0]?.state).toBe('paid');
    expect(held.ledger.map((entry) => [entry.kind, entry.amountCents])).toEqual([
      ['agreement', 1_040_000],
      ['payment', -312_000],
      ['refund', 312_000],
      ['reversal', -312_000],
    ]);
    const { balance } = valueOf(await listDraws(household.guests[0], { jobId: household.jobId }));
    expect([balance.refundedCents, balance.balanceCents]).toEqual([0, 728_000]);
  });

  it('partial: the draw stays paid; all of it: the draw falls due and can be paid anew', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    await service.refund(tern.account, intentId, 100_000);
    await deliverAll(intentId);
    const partly = valueOf(await listDraws(household.guests[0], { jobId: household.jobId }));
    expect(partly.draws[0]).toMatchObject({ state: 'paid', receivedCents: 312_000, refundedCents: 100_000 });
    expect(partly.balance.balanceCents).toBe(1_040_000 - 312_000 + 100_000);
    await service.refund(tern.account, intentId);
    await deliverAll(intentId);
    const all = valueOf(await listDraws(household.guests[0], { jobId: household.jobId }));
    expect(all.draws[0]).toMatchObject({ state: 'due', receivedCents: 312_000, refundedCents: 312_000 });
    expect(all.balance.balanceCents).toBe(1_040_000);
    const again = await begin(household);
    expect(again).not.toBe(intentId);
    await service.pay(tern.account, again);
    await deliverAll(again);
    const held = await readHeld(tern, household);
    expect(held.draws[0]?.state).toBe('paid');
    expect(held.payments.map((payment) => payment.status)).toEqual(['succeeded', 'succeeded']);
  });
});

describe('the ledger', () => {
  const chargesShape = z.object({ amount_received: z.number(), latest_charge: z.string().nullable() });
  const refundsShape = z.object({ data: z.array(z.object({ amount: z.number(), status: z.string() })) });

  /** Recomputes what is owed from what was agreed and from the service's own objects, one by one. */
  async function owedByService(agreedCents: number, intentIds: readonly string[]): Promise<number> {
    let owed = agreedCents;
    for (const intentId of intentIds) {
      const intent = chargesShape.parse(await service.read(tern.account, `payment_intents/${intentId}`));
      const refunds = refundsShape.parse(
        await service.read(tern.account, `refunds?payment_intent=${intentId}&limit=100`),
      );
      owed -= intent.amount_received;
      for (const refund of refunds.data) if (refund.status === 'succeeded') owed += refund.amount;
    }
    return owed;
  }

  it("a random course of payments, declines and refunds leaves the balance that the service's objects add up to", async () => {
    const step = fc.record({
      card: fc.constantFrom('pm_card_visa', 'pm_card_visa', 'pm_card_visa_chargeDeclined'),
      refundCents: fc.option(fc.integer({ min: 1, max: 312_000 }), { nil: null }),
      deliver: fc.boolean(),
    });
    const plays = fc.asyncProperty(fc.array(step, { minLength: 1, maxLength: 5 }), async (steps) => {
      const household = await addHousehold(tern);
      const intents = new Set<string>();
      for (const { card, refundCents, deliver: now } of steps) {
        const start = await startPayment(household.guests[0], first(household));
        if (!start.ok) continue;
        const intentId = intentOf(start.value);
        intents.add(intentId);
        const paid = (await service.pay(tern.account, intentId, card)) === 200;
        if (paid && refundCents !== null) await service.refund(tern.account, intentId, refundCents);
        if (now) await deliverAll(intentId);
      }
      for (const intentId of intents) await deliverAll(intentId);
      const balance = valueOf(await readBalance(tern.owner, { jobId: household.jobId }));
      expect(balance.balanceCents).toBe(await owedByService(1_040_000, [...intents]));
      const { agreedCents, changesCents, paidCents, refundedCents, balanceCents } = balance;
      expect(agreedCents + changesCents - paidCents + refundedCents).toBe(balanceCents);
    });
    await fc.assert(plays, { numRuns: 10 });
  });
});

describe('the receipt', () => {
  const jobRow = z.object({ name: z.string(), data: z.record(z.string(), z.unknown()) });
  const queued = (queue: string, key: string, value: string) =>
    withScope(tern.worker, async (tx) =>
      z
        .array(jobRow)
        .parse([
          ...(await tx.execute(
            sql`select name, data from pgboss.job where name = ${queue} and data #>> string_to_array(${key}, '.') = ${value}`,
          )),
        ]),
    );

  it('is ordered once however often the event comes, and goes to each of the household in words of their payment', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    await deliverAll(intentId);
    for (const event of await service.events(intentId)) await deliver({ ...event, id: `${event.id}again` });
    const [entry] = await withScope(tern.worker, (tx) =>
      tx
        .select({ id: ledger.id })
        .from(ledger)
        .where(and(eq(ledger.jobId, household.jobId), eq(ledger.kind, 'payment'))),
    );
    const ordered = await queued('paymentReceipt', 'ledgerId', entry?.id ?? '');
    expect(ordered).toHaveLength(1);
    await sendReceipt(receiptJobShape.parse(ordered[0]?.data));
    for (const guest of household.guests) {
      const mails = await queued('mail', 'to.email', guest.email);
      expect(mails.map((mail) => mail.data.subject)).toEqual(['Payment 1 of 4 received']);
      expect(mails[0]?.data.text).toContain('$3,120.00');
      expect(mails[0]?.data.action).toMatchObject({
        url: `${process.env.APP_ORIGIN}/tern-hollow/jobs/${household.jobId}/payments/${household.drawIds[0]}`,
      });
    }
  });
});

describe('audit', () => {
  it('who started is named; what came by webhook is the worker’s', async () => {
    const household = await addHousehold(tern);
    const intentId = await begin(household);
    await service.pay(tern.account, intentId);
    await deliverAll(intentId);
    const rows = await withScope(tern.worker, (tx) =>
      tx
        .select()
        .from(audit)
        .where(and(eq(audit.companyId, tern.companyId), eq(audit.jobId, household.jobId))),
    );
    const said = rows.map((row) => [row.verb, row.actor, row.personId]).sort();
    expect(said).toEqual([
      ['draw.move', 'worker', null],
      ['payment.payment', 'worker', null],
      ['payment.start', 'guest', household.guests[0].personId],
    ]);
  });
});
