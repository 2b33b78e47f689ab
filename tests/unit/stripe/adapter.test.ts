import { createHmac } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import {
  cancelPaymentIntent,
  createPaymentIntent,
  createRefund,
  listRefunds,
  retrievePaymentIntent,
  verifyStripeWebhook,
} from '@/lib/adapters/stripe';
import { startStripeFake, type StripeFake } from '@/lib/local/stripe/server';

const SECRET = 'sk_test_0123456789abcdef';
const SIGNING = 'whsec_0123456789abcdef';
const account = 'acct_ternhollow';
let folder: string;
let fake: StripeFake;

beforeAll(async () => {
  folder = mkdtempSync(path.join(tmpdir(), 'stripe-'));
  fake = await startStripeFake({
    port: 0,
    stateFile: path.join(folder, 'stripe.json'),
    secretKey: SECRET,
    publishableKey: 'pk_test_0123456789abcdef',
    webhookUrl: '',
    webhookSecret: SIGNING,
    webOrigin: 'http://localhost:4300',
  });
  const variables = {
    APP_ORIGIN: 'http://localhost:4300',
    DATABASE_URL: 'postgres://app_user@127.0.0.1/none',
    CLERK_PUBLISHABLE_KEY: 'pk_live_x',
    CLERK_SECRET_KEY: 'sk_live_x',
    CLERK_JWT_KEY: '-----BEGIN PUBLIC KEY-----',
    CLERK_WEBHOOK_SIGNING_SECRET: 'whsec_x',
    STRIPE_SECRET_KEY: SECRET,
    STRIPE_PUBLISHABLE_KEY: 'pk_test_0123456789abcdef',
    STRIPE_WEBHOOK_SECRET: SIGNING,
    STRIPE_API_BASE: fake.origin,
    SMTP_URL: 'smtp://127.0.0.1:2500',
    MAIL_DOMAIN: 'mail.stilewright.example',
  };
  for (const [name, value] of Object.entries(variables)) vi.stubEnv(name, value);
});

afterAll(async () => {
  vi.unstubAllEnvs();
  await fake.stop();
  rmSync(folder, { recursive: true, force: true });
});

let made = 0;
const asked = () => ({
  account,
  amountCents: 312_000,
  drawId: 'd1',
  idempotencyKey: `key-${(made += 1)}`,
  description: 'Sorrel Lane, payment 1 of 4',
  receiptEmail: null,
  metadata: { job_id: 'j1' },
});

const pay = (intentId: string, method: string) =>
  fetch(`${fake.origin}/v1/payment_intents/${intentId}/confirm`, {
    method: 'POST',
    headers: { authorization: `Bearer ${SECRET}`, 'stripe-account': account },
    body: new URLSearchParams({ payment_method: method }),
  });

describe('payment intents', () => {
  it('the same key and words give the same intent', async () => {
    const words = asked();
    const first = await createPaymentIntent(words);
    expect(first).toMatchObject({ status: 'open', amountCents: 312_000, receivedCents: 0, charge: null });
    expect(first.metadata).toEqual({ job_id: 'j1', draw_id: 'd1' });
    expect((await createPaymentIntent(words)).id).toBe(first.id);
  });

  it('a refused card is told by its codes, and the charge that paid afterwards by its own', async () => {
    const { id: intentId } = await createPaymentIntent(asked());
    expect((await pay(intentId, 'pm_card_visa_chargeDeclinedInsufficientFunds')).status).toBe(402);
    const refused = await retrievePaymentIntent({ account, intentId });
    expect(refused).toMatchObject({
      status: 'open',
      receivedCents: 0,
      charge: null,
      decline: { code: 'card_declined', declineCode: 'insufficient_funds' },
    });
    await pay(intentId, 'pm_card_visa');
    const paid = await retrievePaymentIntent({ account, intentId });
    expect(paid).toMatchObject({
      status: 'succeeded',
      receivedCents: 312_000,
      decline: null,
      charge: { refundedCents: 0, by: { name: 'Visa', lastFour: '4242' } },
    });
  });

  it("another account's intent is not found", async () => {
    const { id: intentId } = await createPaymentIntent(asked());
    await expect(retrievePaymentIntent({ account: 'acct_quillback', intentId })).rejects.toMatchObject({
      kind: 'notFound',
    });
  });

  it('a canceled intent is canceled once and cannot be paid', async () => {
    const { id: intentId } = await createPaymentIntent(asked());
    expect((await cancelPaymentIntent({ account, intentId })).status).toBe('canceled');
    expect((await cancelPaymentIntent({ account, intentId })).status).toBe('canceled');
    expect((await pay(intentId, 'pm_card_visa')).status).toBe(400);
  });

  it('a refund asked for twice with one key gives back once', async () => {
    const { id: intentId } = await createPaymentIntent(asked());
    await pay(intentId, 'pm_card_visa');
    const words = { account, intentId, amountCents: 12_000, idempotencyKey: 'refund-1', metadata: {} };
    const first = await createRefund(words);
    expect((await createRefund(words)).id).toBe(first.id);
    expect((await listRefunds({ account, intentId })).map((one) => one.amountCents)).toEqual([12_000]);
    await expect(
      createRefund({ ...words, amountCents: 312_000, idempotencyKey: 'refund-2' }),
    ).rejects.toMatchObject({ kind: 'refused' });
  });
});

describe('webhooks', () => {
  // Signed here by the published scheme, not by the code that is tested: HMAC-SHA256 over "t.body".
  const sign = (body: string, at = Math.floor(Date.now() / 1000), secret = SIGNING) =>
    `t=${at},v1=${createHmac('sha256', secret).update(`${at}.${body}`).digest('hex')}`;
  const body = JSON.stringify({
    id: 'evt_1',
    object: 'event',
    type: 'charge.refunded',
    account,
    data: { object: { id: 'ch_1', object: 'charge', payment_intent: 'pi_1' } },
  });

  it('a signed event is read as whose object to look at', () => {
    expect(verifyStripeWebhook(body, sign(body))).toEqual({
      id: 'evt_1',
      type: 'charge.refunded',
      account,
      objectId: 'ch_1',
      intentId: 'pi_1',
    });
  });

  it('a changed byte, another secret, an old time, no signature: nothing is read', () => {
    expect(verifyStripeWebhook(body.replace('pi_1', 'pi_2'), sign(body))).toBeNull();
    expect(verifyStripeWebhook(body, sign(body, undefined, 'whsec_other'))).toBeNull();
    expect(verifyStripeWebhook(body, sign(body, Math.floor(Date.now() / 1000) - 3600))).toBeNull();
    expect(verifyStripeWebhook(body, '')).toBeNull();
    expect(verifyStripeWebhook('not json', sign('not json'))).toBeNull();
  });

  it("an event of the platform's own account names none", () => {
    const own = JSON.stringify({
      id: 'evt_2',
      object: 'event',
      type: 'payment_intent.succeeded',
      data: { object: { id: 'pi_9', object: 'payment_intent' } },
    });
    expect(verifyStripeWebhook(own, sign(own))).toMatchObject({ account: null, intentId: 'pi_9' });
  });
});
