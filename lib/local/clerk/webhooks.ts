import { createHmac } from 'node:crypto';
import { newId, type Store, type WebhookEvent } from './store';

/** Pauses between attempts at one delivery, in milliseconds; the long ones outlast a build of the web server. */
const PAUSES = [250, 500, 1000, 2000, 4000, 8000, 15_000, 30_000, 60_000, 60_000, 60_000, 60_000] as const;
const ANSWER_WITHIN_MS = 15_000;

export interface Delivered {
  readonly event: string;
  readonly type: string;
  /** HTTP status of the answer; 0 when there was none. */
  readonly status: number;
}

/**
 * The headers of a signed delivery: HMAC-SHA256 with the base64 after `whsec_` over `id.timestamp.payload`.
 * Source: the Standard Webhooks specification, whose names these headers carry in their older form.
 */
export function signDelivery(
  id: string,
  payload: string,
  secret: string,
  atSeconds: number = Math.floor(Date.now() / 1000),
): Record<string, string> {
  const key = Buffer.from(secret.replace(/^whsec_/, ''), 'base64');
  const digest = createHmac('sha256', key).update(`${id}.${atSeconds}.${payload}`).digest('base64');
  return { 'svix-id': id, 'svix-timestamp': String(atSeconds), 'svix-signature': `v1,${digest}` };
}

/** The body of an event's deliveries. */
export const payloadOf = (event: WebhookEvent): string =>
  JSON.stringify({
    object: 'event',
    type: event.type,
    data: event.data,
    event_attributes: { http_request: { client_ip: '127.0.0.1', user_agent: '' } },
    timestamp: event.at,
    instance_id: 'ins_local',
  });

/** Tells the program what changed, again while it is not taken. */
export class Deliveries {
  private readonly timers = new Set<NodeJS.Timeout>();
  private readonly underWay = new Set<Promise<unknown>>();
  private stopped = false;

  constructor(
    private readonly store: Store,
    private readonly url: string,
    private readonly secret: string,
  ) {}

  /** Takes up what an earlier run had not delivered. */
  resume(): void {
    for (const event of this.store.state.events) if (event.pending) this.schedule(event, 0);
  }

  /** Stores an event and delivers it in a moment. */
  emit(type: string, data: Record<string, unknown>): WebhookEvent {
    const event = { id: newId('msg'), type, data, at: Date.now(), pending: this.url !== '' };
    this.store.state.events.push(event);
    this.schedule(event, 0);
    return event;
  }

  /** Delivers once, now, and waits for the answer. */
  async deliverOnce(event: WebhookEvent): Promise<Delivered> {
    const payload = payloadOf(event);
    const status = await this.post(payload, signDelivery(event.id, payload, this.secret));
    if (status >= 200 && status < 300 && event.pending) {
      event.pending = false;
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

  private schedule(event: WebhookEvent, attempt: number): void {
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

  private async attempt(event: WebhookEvent, attempt: number): Promise<void> {
    const { status } = await this.deliverOnce(event);
    if (status >= 200 && status < 300) return;
    if (attempt < PAUSES.length) this.schedule(event, attempt + 1);
    else console.log(`webhook ${event.type} ${event.id}: given up after ${attempt + 1} attempts`);
  }

  private async post(body: string, headers: Record<string, string>): Promise<number> {
    try {
      const answer = await fetch(this.url, {
        method: 'POST',
        body,
        headers: { 'content-type': 'application/json', ...headers },
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
