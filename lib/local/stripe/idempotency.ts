import { createHash } from 'node:crypto';
import { ApiFault } from './fault';
import type { KeptAnswer, Store } from './store';

/** What to do with a request that carries an idempotency key. */
export type Claim =
  | { readonly kind: 'go'; keep(status: number, body: unknown, requestId: string): void; release(): void }
  | { readonly kind: 'replay'; readonly answer: KeptAnswer };

/** Gives a request with a known key its first answer again. Keys count within one account. */
export class IdempotencyKeys {
  private readonly inFlight = new Set<string>();

  constructor(private readonly store: Store) {}

  /** Throws a 400 when the key was used for something else, a 409 while its first request is still under way. */
  claim(key: string, account: string, method: string, path: string, body: string): Claim {
    const slot = `${account}:${key}`;
    const asked = createHash('sha256').update(`${method} ${path} ${account} ${body}`).digest('hex');
    if (this.inFlight.has(slot)) {
      throw new ApiFault(409, {
        type: 'idempotency_error',
        code: 'idempotency_key_in_use',
        message: `There is currently another in-progress request using this Idempotent Key: ${key}.`,
      });
    }
    const kept = this.store.state.answers[slot];
    if (kept && kept.asked !== asked) {
      throw new ApiFault(400, {
        type: 'idempotency_error',
        message: `Keys for idempotent requests can only be used with the same parameters they were first used with. Try using a key other than '${key}' if you meant to execute a different request.`,
      });
    }
    if (kept) return { kind: 'replay', answer: kept };
    this.inFlight.add(slot);
    return {
      kind: 'go',
      keep: (status, answer, requestId) => {
        this.store.state.answers[slot] = {
          asked,
          status,
          body: structuredClone(answer),
          requestId,
          at: Math.floor(Date.now() / 1000),
        };
      },
      release: () => this.inFlight.delete(slot),
    };
  }
}
