import { expect, type FrameLocator, type Page } from '@playwright/test';
import { stack } from './base';

/** Test cards by what happens to them. Source: the payment service's published list. */
export const CARD = {
  pays: '4242 4242 4242 4242',
  declined: '4000 0000 0000 0002',
  insufficientFunds: '4000 0000 0000 9995',
  expired: '4000 0000 0000 0069',
  wrongCode: '4000 0000 0000 0127',
  asksTheBank: '4000 0025 0000 3155',
} as const;

const cardForm = (page: Page): FrameLocator =>
  page.frameLocator('iframe[title="Secure payment input frame"]');

/** Fills the card form of a pay page and presses the button that names the sum. */
export async function payByCard(page: Page, number: string): Promise<void> {
  const form = cardForm(page);
  await form.getByLabel('Card number').fill(number);
  await form.getByLabel('Expiration date').fill('12 / 34');
  await form.getByLabel('Security code').fill('123');
  await page.getByRole('button', { name: /^Pay \$/ }).click();
}

/** Answers the bank's question (3-D Secure). */
export async function answerBank(page: Page, answer: 'Complete' | 'Fail'): Promise<void> {
  const bank = page.frameLocator('iframe[title="Secure authentication frame"]');
  await bank.getByRole('button', { name: `${answer} authentication` }).click();
}

export interface ServiceEvent {
  readonly id: string;
  readonly type: string;
  readonly account?: string;
}

async function hook<T>(method: 'GET' | 'POST', address: string, body?: unknown): Promise<T> {
  const answer = await fetch(`${stack.stripe}/_fake/${address}`, {
    method,
    body: body === undefined ? undefined : JSON.stringify(body),
  });
  expect(answer.status, `${method} ${address}`).toBe(200);
  return (await answer.json()) as T;
}

export interface Delivered {
  readonly event: string;
  readonly type: string;
  readonly status: number;
}

/** What a test may ask of the payment service's stand-in. */
export const paymentService = {
  /** All events about a draw so far, oldest first. */
  eventsOf: (drawId: string) => hook<ServiceEvent[]>('GET', `events?draw=${encodeURIComponent(drawId)}`),
  /** Delivers an event once more and tells how it was answered. */
  redeliver: (eventId: string) => hook<Delivered>('POST', `events/${eventId}/redeliver`),
  /** Keeps back the events of one draw alone, so that tests beside it are not disturbed. */
  hold: (drawId: string) => hook<unknown>('POST', 'deliveries/hold', { metadata: { draw_id: drawId } }),
  /** Delivers what was held of a draw, one after another, and stops holding it. */
  release: (drawId: string, order: 'forward' | 'reverse') =>
    hook<Delivered[]>('POST', 'deliveries/release', { order, metadata: { draw_id: drawId } }),
};
