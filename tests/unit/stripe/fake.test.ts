import { mkdtempSync, rmSync } from 'node:fs';
import http from 'node:http';
import { tmpdir } from 'node:os';
import path from 'node:path';
import Stripe from 'stripe';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { startStripeFake, type StripeFake } from '@/lib/local/stripe/server';

const SECRET = 'sk_test_0123456789abcdef';
const PUBLISHABLE = 'pk_test_0123456789abcdef';
const SIGNING = 'whsec_0123456789abcdef';
const TERN = { stripeAccount: 'acct_ternhollow' };
const QUILL = { stripeAccount: 'acct_quillback' };

interface Received {
  readonly body: string;
  readonly signature: string;
}

/** A web server that takes webhooks; `statuses` are its next answers, 200 afterwards. */
async function startReceiver() {
  const received: Received[] = [];
  const statuses: number[] = [];
  const waiting: { count: number; tell: () => void }[] = [];
  const server = http.createServer((request, response) => {
    const chunks: Buffer[] = [];
    request.on('data', (chunk: Buffer) => chunks.push(chunk));
    request.on('end', () => {
      received.push({
        body: Buffer.concat(chunks).toString(),
        signature: String(request.headers['stripe-signature']),
      });
      response.writeHead(statuses.shift() ?? 200).end();
      for (const one of waiting) if (received.length >= one.count) one.tell();
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  if (typeof address !== 'object' || !address) throw new Error('no address');
  return {
    url: `http://127.0.0.1:${address.port}/hook`,
    received,
    statuses,
    until: async (count: number) => {
      if (received.length < count) {
        await new Promise<void>((resolve) => waiting.push({ count, tell: resolve }));
      }
    },
    stop: () => new Promise<void>((resolve) => server.close(() => resolve())),
  };
}

let folder: string;
let receiver: Awaited<ReturnType<typeof startReceiver>>;
let fake: StripeFake;

const start = () =>
  startStripeFake({
    port: 0,
    stateFile: path.join(folder, 'stripe.json'),
    secretKey: SECRET,
    publishableKey: PUBLISHABLE,
    webhookUrl: receiver.url,
    webhookSecret: SIGNING,
    webOrigin: 'http://localhost:4300',
  });

function sdk(more: { maxNetworkRetries?: number } = {}): Stripe {
  const at = new URL(fake.origin);
  return new Stripe(SECRET, {
    host: at.hostname,
    port: at.port,
    protocol: 'http',
    telemetry: false,
    maxNetworkRetries: 0,
    ...more,
  });
}

const hook = async (method: 'GET' | 'POST', address: string, body?: unknown): Promise<unknown> => {
  const answer = await fetch(`${fake.origin}/_fake/${address}`, {
    method,
    body: body === undefined ? undefined : JSON.stringify(body),
  });
  expect(answer.status, `${method} ${address}`).toBe(200);
  return answer.json();
};

const deposit = { amount: 123_400, currency: 'usd', metadata: { draw_id: 'd1' } } as const;

/** The fault of a call that must be refused. */
async function faultOf(work: Promise<unknown>): Promise<Stripe.errors.StripeError> {
  try {
    await work;
  } catch (error) {
    if (error instanceof Stripe.errors.StripeError) return error;
    throw error;
  }
  throw new Error('It was not refused.');
}

beforeEach(async () => {
  folder = mkdtempSync(path.join(tmpdir(), 'stripe-'));
  receiver = await startReceiver();
  fake = await start();
});

afterEach(async () => {
  await fake.stop();
  await receiver.stop();
  rmSync(folder, { recursive: true, force: true });
});

describe('accounts', () => {
  it('the two contractors of the demo are there from the start', async () => {
    expect((await sdk().accounts.retrieve('acct_ternhollow')).charges_enabled).toBe(true);
    expect((await sdk().accounts.retrieve('acct_quillback')).charges_enabled).toBe(true);
  });

  it('an account that is created can own payments', async () => {
    const made = await sdk().accounts.create({ type: 'standard', country: 'US' });
    const intent = await sdk().paymentIntents.create(deposit, { stripeAccount: made.id });
    expect(intent.status).toBe('requires_payment_method');
  });

  it("one account's intents, charges, refunds, customers and events are not found through another", async () => {
    const stripe = sdk();
    const customer = await stripe.customers.create({ email: 'mara@example.example' }, TERN);
    const intent = await stripe.paymentIntents.create({ ...deposit, customer: customer.id }, TERN);
    const paid = await stripe.paymentIntents.confirm(intent.id, { payment_method: 'pm_card_visa' }, TERN);
    const refund = await stripe.refunds.create({ payment_intent: intent.id, amount: 100 }, TERN);
    const [event] = (await stripe.events.list({ limit: 1 }, TERN)).data;
    const charge = String(paid.latest_charge);
    for (const other of [QUILL, undefined]) {
      for (const work of [
        () => stripe.paymentIntents.retrieve(intent.id, {}, other),
        () => stripe.paymentIntents.confirm(intent.id, { payment_method: 'pm_card_visa' }, other),
        () => stripe.paymentIntents.cancel(intent.id, {}, other),
        () => stripe.charges.retrieve(charge, {}, other),
        () => stripe.refunds.create({ payment_intent: intent.id }, other),
        () => stripe.refunds.retrieve(refund.id, {}, other),
        () => stripe.customers.retrieve(customer.id, {}, other),
        () => stripe.events.retrieve(event?.id ?? '', {}, other),
      ]) {
        expect((await faultOf(work())).statusCode).toBe(404);
      }
    }
    expect((await stripe.events.list({}, QUILL)).data).toEqual([]);
  });

  it('an unknown account is refused', async () => {
    const work = sdk().paymentIntents.create(deposit, { stripeAccount: 'acct_nobody' });
    expect((await faultOf(work)).statusCode).toBe(403);
  });
});

describe('cards', () => {
  // Source of the codes: the payment service's published list of test cards.
  const DECLINES: [string, string, string | undefined][] = [
    ['pm_card_visa_chargeDeclined', 'card_declined', 'generic_decline'],
    ['pm_card_visa_chargeDeclinedInsufficientFunds', 'card_declined', 'insufficient_funds'],
    ['pm_card_chargeDeclinedExpiredCard', 'expired_card', 'expired_card'],
    ['pm_card_chargeDeclinedIncorrectCvc', 'incorrect_cvc', 'incorrect_cvc'],
  ];
  it.each(DECLINES)('%s is refused as %s and can be tried again', async (token, code, declineCode) => {
    const stripe = sdk();
    const intent = await stripe.paymentIntents.create(deposit, TERN);
    const fault = await faultOf(stripe.paymentIntents.confirm(intent.id, { payment_method: token }, TERN));
    expect(fault).toBeInstanceOf(Stripe.errors.StripeCardError);
    expect([fault.statusCode, fault.code, fault.decline_code]).toEqual([402, code, declineCode]);
    const after = await stripe.paymentIntents.retrieve(intent.id, {}, TERN);
    expect([after.status, after.amount_received]).toEqual(['requires_payment_method', 0]);
    const paid = await stripe.paymentIntents.confirm(intent.id, { payment_method: 'pm_card_visa' }, TERN);
    expect([paid.status, paid.amount_received]).toEqual(['succeeded', deposit.amount]);
  });

  it('a paid intent is charged no second time', async () => {
    const stripe = sdk();
    const intent = await stripe.paymentIntents.create(deposit, TERN);
    await stripe.paymentIntents.confirm(intent.id, { payment_method: 'pm_card_visa' }, TERN);
    const fault = await faultOf(
      stripe.paymentIntents.confirm(intent.id, { payment_method: 'pm_card_visa' }, TERN),
    );
    expect(fault.code).toBe('payment_intent_unexpected_state');
    expect((await stripe.events.list({ type: 'charge.succeeded' }, TERN)).data).toHaveLength(1);
  });

  const challenge = (intent: Stripe.PaymentIntent, outcome: 'complete' | 'fail') =>
    fetch(`${fake.origin}/v3/payment_intents/${intent.id}/challenge`, {
      method: 'POST',
      body: new URLSearchParams({
        key: PUBLISHABLE,
        _stripe_account: 'acct_ternhollow',
        client_secret: intent.client_secret ?? '',
        outcome,
      }),
    });

  it('3-D Secure charges only after the bank has been answered', async () => {
    const stripe = sdk();
    const intent = await stripe.paymentIntents.create(deposit, TERN);
    const asked = await stripe.paymentIntents.confirm(
      intent.id,
      { payment_method: 'pm_card_authenticationRequired' },
      TERN,
    );
    expect([asked.status, asked.latest_charge]).toEqual(['requires_action', null]);
    expect((await challenge(intent, 'fail')).status).toBe(200);
    const failed = await stripe.paymentIntents.retrieve(intent.id, {}, TERN);
    expect(failed.status).toBe('requires_payment_method');
    expect(failed.last_payment_error?.code).toBe('payment_intent_authentication_failure');
    await stripe.paymentIntents.confirm(
      intent.id,
      { payment_method: 'pm_card_authenticationRequired' },
      TERN,
    );
    expect((await challenge(intent, 'complete')).status).toBe(200);
    expect((await stripe.paymentIntents.retrieve(intent.id, {}, TERN)).status).toBe('succeeded');
  });

  it('a browser reaches an intent only with its secret, and nothing else with the publishable key', async () => {
    const intent = await sdk().paymentIntents.create(deposit, TERN);
    const read = (clientSecret: string) =>
      fetch(
        `${fake.origin}/v1/payment_intents/${intent.id}?${new URLSearchParams({
          key: PUBLISHABLE,
          _stripe_account: 'acct_ternhollow',
          client_secret: clientSecret,
        }).toString()}`,
      );
    expect((await read(intent.client_secret ?? '')).status).toBe(200);
    expect((await read(`${intent.id}_secret_guess`)).status).toBe(400);
    const list = await fetch(`${fake.origin}/v1/events?key=${PUBLISHABLE}`);
    expect(list.status).toBe(403);
    expect((await fetch(`${fake.origin}/v1/events?key=sk_test_other`)).status).toBe(401);
  });
});

describe('refunds', () => {
  it('partial refunds add up to the charge and not beyond', async () => {
    const stripe = sdk();
    const intent = await stripe.paymentIntents.create(
      { ...deposit, confirm: true, payment_method: 'pm_card_visa' },
      TERN,
    );
    await stripe.refunds.create({ payment_intent: intent.id, amount: 23_400 }, TERN);
    const over = await faultOf(stripe.refunds.create({ payment_intent: intent.id, amount: 100_001 }, TERN));
    expect(over.param).toBe('amount');
    await stripe.refunds.create({ payment_intent: intent.id }, TERN);
    const charge = await stripe.charges.retrieve(String(intent.latest_charge), {}, TERN);
    expect([charge.amount_refunded, charge.refunded]).toEqual([deposit.amount, true]);
    const again = await faultOf(stripe.refunds.create({ payment_intent: intent.id }, TERN));
    expect(again.code).toBe('charge_already_refunded');
    const list = await stripe.refunds.list({ payment_intent: intent.id }, TERN);
    expect(list.data.map((one) => one.amount)).toEqual([100_000, 23_400]);
  });
});

describe('idempotency', () => {
  // Source: the payment service's guide to idempotent requests.
  const key = { ...TERN, idempotencyKey: 'draw/1' };

  it('the same key and body give the first answer again, and say so', async () => {
    const first = await sdk().paymentIntents.create(deposit, key);
    const second = await sdk().paymentIntents.create(deposit, key);
    expect(second.id).toBe(first.id);
    expect(second.lastResponse.headers['idempotent-replayed']).toBe('true');
    expect((await sdk().events.list({ type: 'payment_intent.created' }, TERN)).data).toHaveLength(1);
  });

  it('the same key with another body is refused with 400', async () => {
    await sdk().paymentIntents.create(deposit, key);
    const fault = await faultOf(sdk().paymentIntents.create({ ...deposit, amount: 99_900 }, key));
    expect(fault).toBeInstanceOf(Stripe.errors.StripeIdempotencyError);
    expect(fault.statusCode).toBe(400);
  });

  it('the same key of another account is another key', async () => {
    const first = await sdk().paymentIntents.create(deposit, key);
    const other = await sdk().paymentIntents.create(deposit, { ...QUILL, idempotencyKey: 'draw/1' });
    expect(other.id).not.toBe(first.id);
  });

  it('a key whose first request is under way is refused with 409', async () => {
    await hook('POST', 'requests/hold', { path: '/v1/payment_intents' });
    const first = sdk().paymentIntents.create(deposit, key);
    await hook('GET', 'requests/hanging?count=1');
    const fault = await faultOf(sdk().paymentIntents.create(deposit, key));
    expect([fault.statusCode, fault.code]).toEqual([409, 'idempotency_key_in_use']);
    await hook('POST', 'requests/release');
    expect((await first).status).toBe('requires_payment_method');
  });

  it('an answer that gets lost is asked for again and nothing is made twice', async () => {
    await hook('POST', 'requests/drop-answer', { path: '/v1/payment_intents', times: 1 });
    const intent = await sdk({ maxNetworkRetries: 1 }).paymentIntents.create(deposit, key);
    expect(intent.lastResponse.headers['idempotent-replayed']).toBe('true');
    expect((await sdk().events.list({ type: 'payment_intent.created' }, TERN)).data).toHaveLength(1);
  });

  it('a restart forgets neither intents nor keys', async () => {
    const first = await sdk().paymentIntents.create(deposit, key);
    await fake.stop();
    fake = await start();
    expect((await sdk().paymentIntents.create(deposit, key)).id).toBe(first.id);
    expect((await sdk().paymentIntents.retrieve(first.id, {}, TERN)).client_secret).toBe(first.client_secret);
  });
});

describe('webhooks', () => {
  const verify = ({ body, signature }: Received) => sdk().webhooks.constructEvent(body, signature, SIGNING);

  it("an event's signature holds for the service's own library and names the account", async () => {
    const intent = await sdk().paymentIntents.create(deposit, TERN);
    await receiver.until(1);
    const [first] = receiver.received;
    if (!first) throw new Error('nothing came');
    const event = verify(first);
    expect([event.type, event.account]).toEqual(['payment_intent.created', 'acct_ternhollow']);
    expect(event.data.object).toMatchObject({ id: intent.id });
  });

  it('one changed byte, another secret, or an old time does not pass', async () => {
    await sdk().paymentIntents.create(deposit, TERN);
    await receiver.until(1);
    const [first] = receiver.received;
    if (!first) throw new Error('nothing came');
    const changed = { ...first, body: first.body.replace('123400', '123401') };
    expect(changed.body).not.toBe(first.body);
    expect(() => verify(changed)).toThrow(Stripe.errors.StripeSignatureVerificationError);
    expect(() => sdk().webhooks.constructEvent(first.body, first.signature, 'whsec_other')).toThrow(
      Stripe.errors.StripeSignatureVerificationError,
    );
    const tenMinutesOn = Date.now() + 600_000;
    expect(() =>
      sdk().webhooks.constructEvent(first.body, first.signature, SIGNING, 300, undefined, tenMinutesOn),
    ).toThrow(Stripe.errors.StripeSignatureVerificationError);
  });

  it('an event that is refused is delivered again until it is taken', async () => {
    receiver.statuses.push(500, 503);
    await sdk().paymentIntents.create(deposit, TERN);
    await receiver.until(3);
    const ids = receiver.received.map((one) => verify(one).id);
    expect(new Set(ids).size).toBe(1);
  });

  it('an event that nobody took before a stop is delivered after the next start', async () => {
    receiver.statuses.push(500);
    await sdk().paymentIntents.create(deposit, TERN);
    await receiver.until(1);
    await fake.stop();
    fake = await start();
    await receiver.until(2);
    const [first, second] = receiver.received;
    expect(first && second && verify(first).id === verify(second).id).toBe(true);
  });

  it('held events come on release, newest first when reversed, and any can be delivered again', async () => {
    await hook('POST', 'deliveries/hold', { account: 'acct_ternhollow', metadata: { draw_id: 'd1' } });
    await sdk().paymentIntents.create({ ...deposit, confirm: true, payment_method: 'pm_card_visa' }, TERN);
    await sdk().paymentIntents.create({ ...deposit, metadata: { draw_id: 'd2' } }, TERN);
    await receiver.until(1);
    expect(receiver.received).toHaveLength(1);
    const about = { metadata: { draw_id: 'd1' } };
    await hook('POST', 'deliveries/release', { order: 'reverse', account: 'acct_quillback', ...about });
    expect(receiver.received).toHaveLength(1);
    await hook('POST', 'deliveries/release', { order: 'reverse', account: 'acct_ternhollow', ...about });
    const types = receiver.received.map((one) => verify(one).type);
    expect(types).toEqual([
      'payment_intent.created',
      'payment_intent.succeeded',
      'charge.succeeded',
      'payment_intent.created',
    ]);
    const [, succeeded] = receiver.received;
    if (!succeeded) throw new Error('nothing came');
    const { id } = verify(succeeded);
    expect(await hook('POST', `events/${id}/redeliver`)).toEqual({
      event: id,
      type: 'payment_intent.succeeded',
      status: 200,
    });
    expect(receiver.received).toHaveLength(5);
  });

  it('the hooks of tests are closed to pages', async () => {
    const answer = await fetch(`${fake.origin}/_fake/events`, {
      headers: { origin: 'http://localhost:4300' },
    });
    expect(answer.status).toBe(403);
  });
});

describe('pages', () => {
  it('only pages of the web origin may frame the card form', async () => {
    const answer = await fetch(`${fake.origin}/v3/payment.html`);
    expect(answer.headers.get('content-security-policy')).toContain('frame-ancestors http://localhost:4300');
    expect(answer.headers.get('x-frame-options')).toBeNull();
  });
});
