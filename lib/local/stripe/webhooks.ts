import { createHmac } from 'node:crypto';
import { isDeepStrictEqual } from 'node:util';
import { nowUnix, type ApiEvent } from './objects';
import type { Store } from './store';

/** Attempts at one delivery, and the pauses between them in milliseconds. */
const PAUSES = [250, 500, 1000, 2000, 4000, 8000, 15000, 30000] as const;
const ANSWER_WITHIN_MS = 15_000;

/** Value of the `Stripe-Signature` header: HMAC-SHA256 over `t.payload`. Source: the service's webhook guide. */
export function signPayload(payload: string, secret: string, at: number = nowUnix()): string {
  const digest = createHmac('sha256', secret).update(`${at}.${payload}`).digest('hex');
  return `t=${at},v1=${digest}`;
}

/** Which events a test wants to hold back: all of an account, or those whose object carries these metadata. */
export interface HoldFilter {
  readonly account?: string;
  readonly metadata?: Readonly<Record<string, string>>;
}

export interface Delivered {
  readonly event: string;
  readonly type: string;
  /** HTTP status of the answer; 0 when there was none. */
  readonly status: number;
}

const plain = ({ account, metadata = {} }: HoldFilter) => ({ account: account ?? null, metadata });

/** Whether an event's object has these metadata. */
export function carries(event: ApiEvent, wanted: Readonly<Record<string, string>>): boolean {
  const { metadata } = event.data.object;
  const carried: Record<string, unknown> = typeof metadata === 'object' && metadata ? { ...metadata } : {};
  return Object.entries(wanted).every(([key, value]) => carried[key] === value);
}

const matches = (event: ApiEvent, filter: HoldFilter): boolean =>
  (filter.account === undefined || event.account === filter.account) && carries(event, filter.metadata ?? {});

/** Delivers events, again when they are refused, and at other times or in other orders when a test asks. */
export class Deliveries {
  private readonly timers = new Set<NodeJS.Timeout>();
  private readonly underWay = new Set<Promise<unknown>>();
  private holds: HoldFilter[] = [];
  private held: ApiEvent[] = [];
  private stopped = false;

  constructor(
    private readonly store: Store,
    private readonly url: string,
    private readonly secret: string,
  ) {}

  /** Takes up what an earlier run had not delivered. */
  resume(): void {
    for (const event of this.store.state.events) if (event.pending_webhooks > 0) this.schedule(event, 0);
  }

  /** Delivers in a moment, unless the event is held back. */
  add(event: ApiEvent): void {
    if (this.holds.some((filter) => matches(event, filter))) this.held.push(event);
    else this.schedule(event, 0);
  }

  hold(filter: HoldFilter): void {
    this.holds.push(filter);
  }

  listHeld(): readonly ApiEvent[] {
    return this.held;
  }

  /**
   * Ends the holds that were asked for in these words (all, without a filter) and delivers what no other holds,
   * one after another, newest first when reversed.
   */
  async release(order: 'forward' | 'reverse', filter: HoldFilter = {}): Promise<Delivered[]> {
    const all = filter.account === undefined && filter.metadata === undefined;
    this.holds = all ? [] : this.holds.filter((hold) => !isDeepStrictEqual(plain(hold), plain(filter)));
    const stays = (event: ApiEvent) => this.holds.some((hold) => matches(event, hold));
    const events = this.held.filter((event) => !stays(event));
    this.held = this.held.filter(stays);
    if (order === 'reverse') events.reverse();
    const delivered: Delivered[] = [];
    for (const event of events) delivered.push(await this.deliverOnce(event));
    return delivered;
  }

  /** Delivers once, now, and waits for the answer. */
  async deliverOnce(event: ApiEvent): Promise<Delivered> {
    const status = await this.post(event);
    if (status >= 200 && status < 300 && event.pending_webhooks !== 0) {
      event.pending_webhooks = 0;
      this.store.save();
    }
    return { event: event.id, type: event.type, status };
  }

  async stop(): Promise<void> {
    this.stopped = true;
    for (const timer of this.timers) clearTimeout(timer);
    this.timers.clear();
    await Promise.allSettled(this.underWay);
  }

  private schedule(event: ApiEvent, attempt: number): void {
    if (this.stopped || this.url === '') return;
    const timer = setTimeout(
      () => {
        this.timers.delete(timer);
        const work = this.attempt(event, attempt).finally(() => this.underWay.delete(work));
        this.underWay.add(work);
      },
      attempt === 0 ? 5 : PAUSES[attempt - 1],
    );
    this.timers.add(timer);
  }

  private async attempt(event: ApiEvent, attempt: number): Promise<void> {
    const { status } = await this.deliverOnce(event);
    if (status >= 200 && status < 300) return;
    if (attempt < PAUSES.length) this.schedule(event, attempt + 1);
    else console.log(`webhook ${event.type} ${event.id}: given up after ${attempt + 1} attempts`);
  }

  private async post(event: ApiEvent): Promise<number> {
    const payload = JSON.stringify(event, null, 2);
    try {
      const answer = await fetch(this.url, {
        method: 'POST',
        body: payload,
        headers: {
          'content-type': 'application/json; charset=utf-8',
          'stripe-signature': signPayload(payload, this.secret),
        },
        redirect: 'manual',
        signal: AbortSignal.timeout(ANSWER_WITHIN_MS),
      });
      await answer.arrayBuffer();
      return answer.status;
    } catch {
      return 0;
    }
  }
}
