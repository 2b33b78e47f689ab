import { randomBytes } from 'node:crypto';
import { DEBIT_TOKENS, findCard, METHOD_TOKENS, type CardOutcome, type Debit } from './cards';
import { ApiFault, invalid, missing } from './fault';
import { listAt, recordAt, textAt, type FormRecord } from './form';
import {
  API_VERSION,
  newAccount,
  newId,
  nowUnix,
  type ApiEvent,
  type Charge,
  type Customer,
  type PaymentIntent,
  type PaymentMethod,
  type Refund,
} from './objects';
import type { Book, Store } from './store';

export interface Asked {
  readonly method: string;
  readonly path: string;
  readonly form: FormRecord;
  /** The connected account, or '' for the platform itself. */
  readonly account: string;
  /** Asked by a browser with the publishable key, which only reaches intents whose secret it knows. */
  readonly publicly: boolean;
  readonly requestId: string;
  readonly idempotencyKey: string | null;
}

interface Call extends Asked {
  readonly book: Book;
  readonly id: string;
}

type Refusal = Extract<CardOutcome, { kind: 'declines' }>;
type Outcome = CardOutcome | ({ readonly kind: 'debits' } & Debit);
type Handler = (call: Call) => unknown;
type Route = readonly [method: string, pattern: RegExp, handler: Handler, publicly?: 'publicly'];

const CONFIRMABLE = new Set<string>(['requires_payment_method', 'requires_confirmation', 'requires_action']);
const CANCELABLE = new Set<string>([...CONFIRMABLE, 'processing', 'requires_capture']);

const need = (form: FormRecord, param: string): string => {
  const value = textAt(form, param);
  if (!value) throw invalid(`Missing required param: ${param}.`, { param, code: 'parameter_missing' });
  return value;
};

const wholeNumber = (text: string, param: string): number => {
  if (!/^\d{1,8}$/.test(text)) {
    throw invalid(`Invalid integer: ${text}`, { param, code: 'parameter_invalid_integer' });
  }
  return Number(text);
};

const unexpectedState = (intent: PaymentIntent, doing: string) =>
  new ApiFault(400, {
    type: 'invalid_request_error',
    code: 'payment_intent_unexpected_state',
    message: `You cannot ${doing} this PaymentIntent because it has a status of ${intent.status}.`,
    payment_intent: structuredClone(intent),
  });

/** The service's REST interface over a {@link Store}; `emit` is told of every event. */
export class Api {
  private readonly routes: readonly Route[];

  constructor(
    private readonly store: Store,
    private readonly emit: (event: ApiEvent) => void,
  ) {
    this.routes = [
      ['POST', /^\/v1\/accounts$/, (call) => this.createAccount(call)],
      ['GET', /^\/v1\/accounts\/([^/]+)$/, (call) => this.readAccount(call)],
      ['POST', /^\/v1\/customers$/, (call) => this.createCustomer(call)],
      ['GET', /^\/v1\/customers\/([^/]+)$/, ({ book, id }) => found(book.customers, id, 'customer')],
      ['POST', /^\/v1\/payment_intents$/, (call) => this.createIntent(call)],
      ['GET', /^\/v1\/payment_intents\/([^/]+)$/, (call) => expand(intentOf(call), call), 'publicly'],
      ['POST', /^\/v1\/payment_intents\/([^/]+)\/confirm$/, (call) => this.confirmIntent(call), 'publicly'],
      ['POST', /^\/v1\/payment_intents\/([^/]+)\/cancel$/, (call) => this.cancelIntent(call)],
      [
        'POST',
        /^\/v3\/payment_intents\/([^/]+)\/challenge$/,
        (call) => this.answerChallenge(call),
        'publicly',
      ],
      ['POST', /^\/_fake\/payment_intents\/([^/]+)\/arrive$/, (call) => this.arriveDebit(call)],
      ['POST', /^\/_fake\/refunds\/([^/]+)\/fail$/, (call) => this.failRefund(call)],
      ['GET', /^\/v1\/charges\/([^/]+)$/, ({ book, id }) => found(book.charges, id, 'charge')],
      ['POST', /^\/v1\/refunds$/, (call) => this.createRefund(call)],
      ['GET', /^\/v1\/refunds$/, (call) => listRefunds(call)],
      ['GET', /^\/v1\/refunds\/([^/]+)$/, ({ book, id }) => found(book.refunds, id, 'refund')],
      ['GET', /^\/v1\/events$/, (call) => this.listEvents(call)],
      ['GET', /^\/v1\/events\/([^/]+)$/, (call) => this.readEvent(call)],
    ];
  }

  /** Does what is asked and returns the object. Throws {@link ApiFault}. */
  answer(asked: Asked): unknown {
    for (const [method, pattern, handler, publicly] of this.routes) {
      const match = pattern.exec(asked.path);
      if (method !== asked.method || !match) continue;
      if (asked.publicly && publicly !== 'publicly') {
        throw invalid('This API call cannot be made with a publishable API key.', { status: 403 });
      }
      if (asked.account !== '' && !this.store.state.accounts[asked.account]) {
        throw invalid(
          `The provided key does not have access to account '${asked.account}' (or that account does not exist).`,
          { code: 'account_invalid', status: 403 },
        );
      }
      const call = { ...asked, book: this.store.book(asked.account), id: match[1] ?? '' };
      return structuredClone(handler(call));
    }
    throw invalid(`Unrecognized request URL (${asked.method}: ${asked.path}).`, { status: 404 });
  }

  private tell(call: Call, type: string, object: object): void {
    const event: ApiEvent = {
      id: newId('evt'),
      object: 'event',
      ...(call.account === '' ? {} : { account: call.account }),
      api_version: API_VERSION,
      created: nowUnix(),
      data: { object: structuredClone({ ...object }) },
      livemode: false,
      pending_webhooks: 1,
      request: { id: call.requestId, idempotency_key: call.idempotencyKey },
      type,
    };
    this.store.state.events.push(event);
    this.emit(event);
  }

  private createAccount({ form, account }: Call) {
    if (account !== '') throw invalid('Accounts are created by the platform itself.', { status: 403 });
    const made = newAccount(newId('acct'), {
      type: textAt(form, 'type') ?? 'standard',
      country: textAt(form, 'country') ?? 'US',
      email: textAt(form, 'email') ?? null,
      metadata: recordAt(form, 'metadata'),
    });
    this.store.state.accounts[made.id] = made;
    return made;
  }

  private readAccount({ id, account }: Call) {
    if (account !== '' && account !== id) throw missing('account', id, 'account');
    return found(this.store.state.accounts, id, 'account');
  }

  private createCustomer(call: Call): Customer {
    const { form, book } = call;
    const customer: Customer = {
      id: newId('cus'),
      object: 'customer',
      created: nowUnix(),
      email: textAt(form, 'email') ?? null,
      name: textAt(form, 'name') ?? null,
      description: textAt(form, 'description') ?? null,
      livemode: false,
      metadata: recordAt(form, 'metadata'),
    };
    book.customers[customer.id] = customer;
    this.tell(call, 'customer.created', customer);
    return customer;
  }

  private createIntent(call: Call) {
    const { form, book } = call;
    const amount = wholeNumber(need(form, 'amount'), 'amount');
    const currency = need(form, 'currency');
    if (amount < 50) {
      throw invalid('Amount must be at least $0.50 usd', { param: 'amount', code: 'amount_too_small' });
    }
    const customer = textAt(form, 'customer') ?? null;
    if (customer) found(book.customers, customer, 'customer', 'customer');
    const id = newId('pi');
    const automatic = textAt(form, 'automatic_payment_methods', 'enabled');
    const intent: PaymentIntent = {
      id,
      object: 'payment_intent',
      amount,
      amount_capturable: 0,
      amount_received: 0,
      automatic_payment_methods: automatic
        ? {
            enabled: automatic === 'true',
            allow_redirects: textAt(form, 'automatic_payment_methods', 'allow_redirects') ?? 'always',
          }
        : null,
      canceled_at: null,
      cancellation_reason: null,
      capture_method: 'automatic_async',
      client_secret: `${id}_secret_${randomBytes(12).toString('hex')}`,
      confirmation_method: 'automatic',
      created: nowUnix(),
      currency,
      customer,
      description: textAt(form, 'description') ?? null,
      last_payment_error: null,
      latest_charge: null,
      livemode: false,
      metadata: recordAt(form, 'metadata'),
      next_action: null,
      payment_method: null,
      payment_method_types: ['card'],
      receipt_email: textAt(form, 'receipt_email') ?? null,
      status: 'requires_payment_method',
    };
    book.paymentIntents[id] = intent;
    this.tell(call, 'payment_intent.created', intent);
    if (textAt(form, 'confirm') === 'true') this.confirm(call, intent);
    return expand(intent, call);
  }

  private confirmIntent(call: Call) {
    const intent = intentOf(call);
    this.confirm(call, intent);
    return expand(intent, call);
  }

  private confirm(call: Call, intent: PaymentIntent): void {
    if (!CONFIRMABLE.has(intent.status)) throw unexpectedState(intent, 'confirm');
    const { outcome, method } = methodOf(call);
    call.book.paymentMethods[method.id] = method;
    if (outcome.kind === 'debits') {
      const charge = this.newCharge(call, intent, method, 'pending');
      Object.assign(intent, {
        status: 'processing',
        payment_method: method.id,
        last_payment_error: null,
        next_action: null,
      });
      this.tell(call, 'charge.pending', charge);
      this.tell(call, 'payment_intent.processing', intent);
      return;
    }
    if (outcome.kind === 'asks') {
      Object.assign(intent, {
        status: 'requires_action',
        payment_method: method.id,
        last_payment_error: null,
        next_action: { type: 'use_stripe_sdk', use_stripe_sdk: { type: 'stripe_3ds2_challenge' } },
      });
      this.tell(call, 'payment_intent.requires_action', intent);
      return;
    }
    this.charge(call, intent, method, outcome.kind === 'declines' ? outcome : null);
  }

  /** A bank debit arrives, or comes back unpaid, as the account that was named decides. */
  private arriveDebit(call: Call) {
    const intent = intentOf(call);
    const method = call.book.paymentMethods[intent.payment_method ?? ''];
    const charge = call.book.charges[intent.latest_charge ?? ''];
    if (intent.status !== 'processing' || !method || !charge) throw unexpectedState(intent, 'complete');
    const debit = Object.values(DEBIT_TOKENS).find((one) => one.lastFour === method.us_bank_account?.last4);
    const refusal = debit?.refusal ?? null;
    Object.assign(charge, {
      status: refusal ? 'failed' : 'succeeded',
      paid: !refusal,
      captured: !refusal,
      amount_captured: refusal ? 0 : charge.amount,
      failure_code: refusal?.code ?? null,
      failure_message: refusal?.message ?? null,
    });
    this.conclude(call, intent, charge, method, refusal);
    return intent;
  }

  private answerChallenge(call: Call) {
    const intent = intentOf(call);
    if (intent.status !== 'requires_action') throw unexpectedState(intent, 'authenticate');
    const method = call.book.paymentMethods[intent.payment_method ?? ''];
    if (!method) throw missing('payment_method', intent.payment_method ?? '');
    if (textAt(call.form, 'outcome') === 'complete') {
      this.charge(call, intent, method, null);
      return intent;
    }
    const code = 'payment_intent_authentication_failure';
    const message =
      'We are unable to authenticate your payment method. Please choose a different payment method and try again.';
    Object.assign(intent, {
      status: 'requires_payment_method',
      payment_method: null,
      next_action: null,
      last_payment_error: { type: 'invalid_request_error', code, message, payment_method: method },
    });
    this.tell(call, 'payment_intent.payment_failed', intent);
    return intent;
  }

  private newCharge(
    call: Call,
    intent: PaymentIntent,
    method: PaymentMethod,
    status: Charge['status'],
    refusal: Refusal | null = null,
  ): Charge {
    const { card, us_bank_account } = method;
    const captured = status === 'succeeded';
    const charge: Charge = {
      id: newId('ch'),
      object: 'charge',
      amount: intent.amount,
      amount_captured: captured ? intent.amount : 0,
      amount_refunded: 0,
      captured,
      created: nowUnix(),
      currency: intent.currency,
      customer: intent.customer,
      description: intent.description,
      disputed: false,
      failure_code: refusal?.code ?? null,
      failure_message: refusal?.message ?? null,
      livemode: false,
      metadata: { ...intent.metadata },
      paid: status !== 'failed',
      payment_intent: intent.id,
      payment_method: method.id,
      payment_method_details: {
        type: method.type,
        ...(card
          ? {
              card: {
                brand: card.brand,
                last4: card.last4,
                exp_month: card.exp_month,
                exp_year: card.exp_year,
              },
            }
          : {}),
        ...(us_bank_account ? { us_bank_account } : {}),
      },
      receipt_email: intent.receipt_email,
      refunded: false,
      status,
    };
    call.book.charges[charge.id] = charge;
    intent.latest_charge = charge.id;
    return charge;
  }

  /** Charges the card. Throws a 402 with the card's refusal when it declines. */
  private charge(call: Call, intent: PaymentIntent, method: PaymentMethod, refusal: Refusal | null): void {
    const charge = this.newCharge(call, intent, method, refusal ? 'failed' : 'succeeded', refusal);
    this.conclude(call, intent, charge, method, refusal);
    if (refusal && intent.last_payment_error) {
      throw new ApiFault(402, {
        ...intent.last_payment_error,
        type: 'card_error',
        payment_intent: structuredClone(intent),
      });
    }
  }

  private conclude(
    call: Call,
    intent: PaymentIntent,
    charge: Charge,
    method: PaymentMethod,
    refusal: Refusal | null,
  ): void {
    intent.next_action = null;
    if (!refusal) {
      Object.assign(intent, {
        status: 'succeeded',
        amount_received: intent.amount,
        payment_method: method.id,
        last_payment_error: null,
      });
      this.tell(call, 'charge.succeeded', charge);
      this.tell(call, 'payment_intent.succeeded', intent);
      return;
    }
    Object.assign(intent, {
      status: 'requires_payment_method',
      payment_method: null,
      last_payment_error: {
        type: 'card_error',
        code: refusal.code,
        ...(refusal.declineCode ? { decline_code: refusal.declineCode } : {}),
        message: refusal.message,
        charge: charge.id,
        payment_method: method,
      },
    });
    this.tell(call, 'payment_intent.payment_failed', intent);
    this.tell(call, 'charge.failed', charge);
  }

  private cancelIntent(call: Call) {
    const intent = intentOf(call);
    if (!CANCELABLE.has(intent.status)) throw unexpectedState(intent, 'cancel');
    Object.assign(intent, {
      status: 'canceled',
      canceled_at: nowUnix(),
      cancellation_reason: textAt(call.form, 'cancellation_reason') ?? null,
      next_action: null,
    });
    this.tell(call, 'payment_intent.canceled', intent);
    return intent;
  }

  private createRefund(call: Call): Refund {
    const { form, book } = call;
    const intentId = textAt(form, 'payment_intent');
    const intent = intentId ? found(book.paymentIntents, intentId, 'payment_intent', 'payment_intent') : null;
    const chargeId = intent ? intent.latest_charge : textAt(form, 'charge');
    if (intent && intent.status !== 'succeeded') {
      throw invalid(`This PaymentIntent (${intent.id}) does not have a successful charge to refund.`, {
        param: 'payment_intent',
      });
    }
    if (!chargeId) throw invalid('One of payment_intent or charge is needed.', { code: 'parameter_missing' });
    const charge = found(book.charges, chargeId, 'charge', 'charge');
    const left = charge.amount_captured - charge.amount_refunded;
    if (left === 0) {
      throw invalid(`Charge ${charge.id} has already been refunded.`, { code: 'charge_already_refunded' });
    }
    const wanted = textAt(form, 'amount');
    const amount = wanted ? wholeNumber(wanted, 'amount') : left;
    if (amount < 1) throw invalid('Invalid positive integer', { param: 'amount' });
    if (amount > left) {
      throw invalid(
        `Refund amount ($${(amount / 100).toFixed(2)}) is greater than unrefunded amount on charge ($${(left / 100).toFixed(2)})`,
        { param: 'amount' },
      );
    }
    const refund: Refund = {
      id: newId('re'),
      object: 'refund',
      amount,
      charge: charge.id,
      created: nowUnix(),
      currency: charge.currency,
      metadata: recordAt(form, 'metadata'),
      payment_intent: charge.payment_intent,
      reason: textAt(form, 'reason') ?? null,
      status: 'succeeded',
    };
    book.refunds[refund.id] = refund;
    charge.amount_refunded += amount;
    charge.refunded = charge.amount_refunded === charge.amount_captured;
    this.tell(call, 'refund.created', refund);
    this.tell(call, 'charge.refunded', charge);
    return refund;
  }

  /** A bank sends a refund back: the money stays with the contractor. */
  private failRefund(call: Call): Refund {
    const refund = found(call.book.refunds, call.id, 'refund');
    const charge = found(call.book.charges, refund.charge, 'charge');
    if (refund.status === 'failed') throw invalid('The refund has failed already.');
    refund.status = 'failed';
    charge.amount_refunded -= refund.amount;
    charge.refunded = false;
    this.tell(call, 'refund.failed', refund);
    return refund;
  }

  private listEvents({ account, form }: Call) {
    const type = textAt(form, 'type');
    const own = this.store.state.events
      .filter((event) => (event.account ?? '') === account && (!type || event.type === type))
      .toReversed();
    return page(own, form, '/v1/events');
  }

  private readEvent({ account, id }: Call): ApiEvent {
    const event = this.store.state.events.find((one) => one.id === id && (one.account ?? '') === account);
    if (!event) throw missing('event', id);
    return event;
  }
}

function found<T>(objects: Record<string, T>, id: string, kind: string, param = 'id'): T {
  const object = Object.hasOwn(objects, id) ? objects[id] : undefined;
  if (object === undefined) throw missing(kind, id, param);
  return object;
}

function intentOf({ book, id, publicly, form }: Call): PaymentIntent {
  const intent = found(book.paymentIntents, id, 'payment_intent', 'intent');
  if (publicly && textAt(form, 'client_secret') !== intent.client_secret) {
    throw invalid('The client_secret provided does not match any associated PaymentIntent on this account.', {
      param: 'client_secret',
      code: 'payment_intent_invalid_parameter',
    });
  }
  return intent;
}

/** Replaces an intent's charge id by the charge where `expand[]=latest_charge` asks for it. */
function expand(intent: PaymentIntent, { form, book }: Call): unknown {
  if (!listAt(form, 'expand').includes('latest_charge') || !intent.latest_charge) return intent;
  return { ...intent, latest_charge: found(book.charges, intent.latest_charge, 'charge') };
}

/** A list as the service pages it: newest first, `limit` (10 unless told, at most 100) after `starting_after`. */
function page<T extends { readonly id: string }>(newestFirst: readonly T[], form: FormRecord, url: string) {
  const limit = Math.min(100, Math.max(1, Number(textAt(form, 'limit') ?? '10') || 10));
  const after = textAt(form, 'starting_after');
  const start = after ? newestFirst.findIndex((one) => one.id === after) + 1 : 0;
  return {
    object: 'list',
    url,
    data: newestFirst.slice(start, start + limit),
    has_more: newestFirst.length > start + limit,
  };
}

function listRefunds({ book, form }: Call) {
  const intent = textAt(form, 'payment_intent');
  const charge = textAt(form, 'charge');
  const own = Object.values(book.refunds)
    .filter((one) => (!intent || one.payment_intent === intent) && (!charge || one.charge === charge))
    .toReversed();
  return page(own, form, '/v1/refunds');
}

/** What a confirmation names: by token from a server, by a card's number from the card form. */
function methodOf({ form, publicly, book }: Call): { outcome: Outcome; method: PaymentMethod } {
  const token = textAt(form, 'payment_method');
  const typed = textAt(form, 'payment_method_data', 'card', 'number');
  if (!publicly && typed) {
    throw invalid('Sending credit card numbers directly to the API is generally unsafe.', { status: 402 });
  }
  if (!token && !typed) {
    throw invalid('You must provide a payment method to confirm this PaymentIntent.', {
      param: 'payment_method',
      code: 'parameter_missing',
    });
  }
  const billing_details = {
    name: textAt(form, 'payment_method_data', 'billing_details', 'name') ?? null,
    email: textAt(form, 'payment_method_data', 'billing_details', 'email') ?? null,
  };
  const base = {
    id: newId('pm'),
    object: 'payment_method' as const,
    created: nowUnix(),
    livemode: false as const,
    billing_details,
  };
  const debit = DEBIT_TOKENS[token ?? ''];
  if (debit) {
    const us_bank_account = { bank_name: 'TEST BANK', last4: debit.lastFour };
    return {
      outcome: { kind: 'debits', ...debit },
      method: { ...base, type: 'us_bank_account', us_bank_account },
    };
  }
  const number = typed ?? METHOD_TOKENS[token ?? ''];
  if (number === undefined && token) found(book.paymentMethods, token, 'PaymentMethod', 'payment_method');
  const card = findCard(number ?? '');
  if (!card) {
    throw new ApiFault(402, {
      type: 'card_error',
      code: 'incorrect_number',
      param: 'number',
      message: 'Your card number is incorrect.',
    });
  }
  const at = (key: string) => textAt(form, 'payment_method_data', 'card', key);
  const method: PaymentMethod = {
    ...base,
    type: 'card',
    card: {
      brand: card.brand,
      last4: card.number.slice(-4),
      exp_month: Number(at('exp_month') ?? '12'),
      exp_year: Number(at('exp_year') ?? '2040'),
      country: 'US',
      funding: 'credit',
    },
  };
  return { outcome: card.outcome, method };
}
