import type { z } from 'zod';

/** What an address answered: the value, a refusal with its sentence, or nothing because it was not reached. */
export type Asked<T> =
  | { readonly kind: 'value'; readonly value: T }
  | { readonly kind: 'refused'; readonly status: number; readonly sentence: string }
  | { readonly kind: 'lost' };

const LATER = 'That did not work just now. Please try again in a moment.';

function sentenceOf(body: unknown): string {
  if (typeof body !== 'object' || body === null) return LATER;
  const fault: unknown = Reflect.get(body, 'fault') ?? body;
  if (typeof fault !== 'object' || fault === null) return LATER;
  const sentence: unknown = Reflect.get(fault, 'sentence');
  return typeof sentence === 'string' ? sentence : LATER;
}

/** Asks one of the program's own addresses and checks the answer against `shape`. */
export async function ask<T>(
  shape: z.ZodType<T>,
  address: string,
  method: 'GET' | 'POST' = 'GET',
): Promise<Asked<T>> {
  try {
    const answer = await fetch(address, {
      method,
      headers: method === 'POST' ? { 'content-type': 'application/json' } : {},
      body: method === 'POST' ? '{}' : undefined,
      cache: 'no-store',
    });
    const body: unknown = await answer.json();
    if (!answer.ok) return { kind: 'refused', status: answer.status, sentence: sentenceOf(body) };
    return { kind: 'value', value: shape.parse(body) };
  } catch {
    return { kind: 'lost' };
  }
}
