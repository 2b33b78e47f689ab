import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';
import {
  accountShape,
  chargeShape,
  customerShape,
  eventShape,
  newAccount,
  paymentIntentShape,
  paymentMethodShape,
  refundShape,
} from './objects';

const byId = <T extends z.ZodType>(shape: T) => z.record(z.string(), shape);

/** What one account owns. Nothing of it can be reached through another account. */
const bookShape = z.object({
  customers: byId(customerShape),
  paymentIntents: byId(paymentIntentShape),
  paymentMethods: byId(paymentMethodShape),
  charges: byId(chargeShape),
  refunds: byId(refundShape),
});
export type Book = z.infer<typeof bookShape>;

const answerShape = z.object({
  /** SHA-256 of method, address, account and body. */
  asked: z.string(),
  status: z.number(),
  body: z.unknown(),
  requestId: z.string(),
  at: z.number(),
});
export type KeptAnswer = z.infer<typeof answerShape>;

const stateShape = z.object({
  version: z.literal(1),
  accounts: byId(accountShape),
  /** By account id; the platform's own book has the key ''. */
  books: z.record(z.string(), bookShape),
  /** By account and idempotency key. */
  answers: z.record(z.string(), answerShape),
  events: z.array(eventShape),
});
export type State = z.infer<typeof stateShape>;

/** Accounts that are there from the start, one for each contractor of the demo. */
export const ACCOUNTS_AT_START = ['acct_ternhollow', 'acct_quillback'] as const;

const EVENTS_KEPT = 5000;
const ANSWERS_KEPT_SECONDS = 24 * 3600;

const emptyBook = (): Book => ({
  customers: {},
  paymentIntents: {},
  paymentMethods: {},
  charges: {},
  refunds: {},
});

function firstState(): State {
  return {
    version: 1,
    accounts: Object.fromEntries(ACCOUNTS_AT_START.map((id) => [id, newAccount(id)])),
    books: {},
    answers: {},
    events: [],
  };
}

/** The fake's memory, kept in one file so that a restart forgets nothing. */
export class Store {
  readonly state: State;

  /** Reads `file` when it is there. Throws when it holds something else than a state. */
  constructor(private readonly file: string) {
    this.state = existsSync(file) ? stateShape.parse(JSON.parse(readFileSync(file, 'utf8'))) : firstState();
  }

  book(account: string): Book {
    return (this.state.books[account] ??= emptyBook());
  }

  /** Writes the state to a neighbour of the file and puts it in place in one step. */
  save(): void {
    const { state } = this;
    if (state.events.length > EVENTS_KEPT) state.events.splice(0, state.events.length - EVENTS_KEPT);
    const oldest = Date.now() / 1000 - ANSWERS_KEPT_SECONDS;
    for (const [key, answer] of Object.entries(state.answers)) {
      if (answer.at < oldest) delete state.answers[key];
    }
    mkdirSync(path.dirname(this.file), { recursive: true });
    const beside = `${this.file}.${process.pid}.new`;
    writeFileSync(beside, JSON.stringify(state), { mode: 0o600 });
    renameSync(beside, this.file);
  }
}
