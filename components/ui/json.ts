import type { Fault, FaultCode, Result } from '@/lib/contracts/result';
import { FAULT_STATUS } from '@/lib/contracts/result';

/** What stands for an answer that never came. */
export const LOST: Fault = {
  code: 'unavailable',
  sentence: 'The connection is gone just now. Please try again.',
};
const LATER = 'That did not work just now. Please try again in a moment.';

const isCode = (code: unknown): code is FaultCode => typeof code === 'string' && code in FAULT_STATUS;

/** Reads a fault out of an answer's body, whatever it is. */
function faultOf(body: unknown): Fault {
  const fault: unknown =
    typeof body === 'object' && body !== null ? (Reflect.get(body, 'fault') ?? body) : null;
  if (typeof fault !== 'object' || fault === null) return { code: 'unavailable', sentence: LATER };
  const code: unknown = Reflect.get(fault, 'code');
  const sentence: unknown = Reflect.get(fault, 'sentence');
  return {
    code: isCode(code) ? code : 'unavailable',
    sentence: typeof sentence === 'string' ? sentence : LATER,
    detail: Reflect.get(fault, 'detail'),
    faults: faultsOf(Reflect.get(fault, 'faults')),
  };
}

/** Faults of single fields, where the answer names any. */
function faultsOf(list: unknown): Fault['faults'] {
  if (!Array.isArray(list)) return undefined;
  return list.flatMap((one: unknown) => {
    if (typeof one !== 'object' || one === null) return [];
    const path: unknown = Reflect.get(one, 'path');
    const message: unknown = Reflect.get(one, 'message');
    return typeof path === 'string' && typeof message === 'string' ? [{ path, message }] : [];
  });
}

let renew: (() => Promise<boolean>) | null = null;

/** Names what makes an expired session good again, answering whether it did; the answer ends the naming. */
export function renewSession(work: () => Promise<boolean>): () => void {
  renew = work;
  return () => {
    if (renew === work) renew = null;
  };
}

/** Asks, and once more with a renewed session when the first was answered as to somebody signed out. */
async function ask(address: string, request: RequestInit): Promise<Response> {
  const answer = await fetch(address, request);
  if (answer.status !== FAULT_STATUS.signedOut || !renew) return answer;
  const renewed = await renew().catch(() => false);
  return renewed ? fetch(address, request) : answer;
}

/** For SWR: the JSON of one of the program's own addresses; throws the fault. Its shape is the address's contract. */
export async function readJson<T>(address: string): Promise<T> {
  const answer = await ask(address, { cache: 'no-store' });
  const body: unknown = await answer.json();
  if (!answer.ok) throw faultOf(body);
  return body as T;
}

/** Sends JSON to one of the program's own addresses; a lost connection is a fault too (`unavailable`). */
export async function sendJson<T>(
  address: string,
  method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  body: unknown,
): Promise<Result<T>> {
  try {
    const answer = await ask(address, {
      method,
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
      cache: 'no-store',
    });
    const text = await answer.text();
    const parsed: unknown = text === '' ? null : JSON.parse(text);
    if (!answer.ok) return { ok: false, fault: faultOf(parsed) };
    return { ok: true, value: parsed as T };
  } catch {
    return { ok: false, fault: LOST };
  }
}
