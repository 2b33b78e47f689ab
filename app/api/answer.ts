import { randomUUID } from 'node:crypto';
import type { Actor } from '@/lib/contracts/actor';
import { FAULT_STATUS, type Fault, type Result } from '@/lib/contracts/result';
import type { SignedIn } from '@/lib/contracts/sign-in';
import { isOwnOrigin } from '@/lib/services/session/is-own-origin';
import { resolveActor } from '@/lib/services/session/resolve-actor';
import { findSignedIn, findSignedInUserId } from '@/lib/services/session/signed-in';

const HEADERS = { 'cache-control': 'private, no-store' } as const;
const BODY_BYTES_MAX = 1_000_000;

const NOT_HERE: Fault = { code: 'notFound', sentence: 'There is nothing here by that address.' };
const SIGNED_OUT: Fault = { code: 'signedOut', sentence: 'You are signed out. Please sign in again.' };
const FOREIGN: Fault = { code: 'notAllowed', sentence: 'This can only be done from the pages themselves.' };
const UNREADABLE: Fault = { code: 'invalid', sentence: 'What was sent could not be read.' };

/** A service's answer as a response: the value itself, or `{ fault }` with the fault's status. */
export function respond(result: Result<unknown>): Response {
  if (result.ok) return Response.json(result.value ?? null, { headers: HEADERS });
  const { fault } = result;
  return Response.json({ fault }, { status: FAULT_STATUS[fault.code], headers: HEADERS });
}

const isRead = (request: Request) => request.method === 'GET' || request.method === 'HEAD';

/** The JSON body of a write from our own pages, or why it is not taken. */
async function readBody(request: Request): Promise<Result<unknown>> {
  if (isRead(request)) return { ok: true, value: undefined };
  if (!isOwnOrigin(request.headers.get('origin'))) return { ok: false, fault: FOREIGN };
  const text = await request.text();
  if (text === '') return { ok: true, value: {} };
  const isJson = (request.headers.get('content-type') ?? '').startsWith('application/json');
  if (!isJson || text.length > BODY_BYTES_MAX) return { ok: false, fault: UNREADABLE };
  try {
    return { ok: true, value: JSON.parse(text) };
  } catch {
    return { ok: false, fault: UNREADABLE };
  }
}

/** Does `work` for whoever is signed in; what nobody foresaw is logged under a number that the answer names. */
async function guarded<Who>(
  request: Request,
  find: () => Promise<Who | null>,
  work: (who: Who, body: unknown) => Promise<Result<unknown>>,
): Promise<Response> {
  try {
    const who = await find();
    if (who === null) return respond({ ok: false, fault: SIGNED_OUT });
    const body = await readBody(request);
    if (!body.ok) return respond(body);
    return respond(await work(who, body.value));
  } catch (error) {
    const number = randomUUID().slice(0, 8);
    console.error(`error ${number} at ${request.method} ${new URL(request.url).pathname}:`, error);
    const sentence = `That did not work. If you call about it, the number is ${number}.`;
    const fault: Fault = { code: 'unavailable', sentence };
    return Response.json({ fault }, { status: 500, headers: HEADERS });
  }
}

/**
 * Answers a request below `/api/[company]`: who asks is found by slug, sign-in and job; nobody gets 401, a stranger
 * 404. A write must come from our own origin. The service's result becomes the response.
 */
export function answer(
  request: Request,
  params: Promise<{ readonly company: string; readonly job?: string }>,
  work: (actor: Actor, body: unknown) => Promise<Result<unknown>>,
): Promise<Response> {
  return guarded(request, findSignedInUserId, async (clerkUserId, body) => {
    const { company, job } = await params;
    const actor = await resolveActor({ slug: company, clerkUserId, jobId: job });
    return actor ? work(actor, body) : { ok: false, fault: NOT_HERE };
  });
}

/** As {@link answer}, for somebody who is signed in but may be nobody here yet. */
export function answerVisitor(
  request: Request,
  work: (visitor: SignedIn, body: unknown) => Promise<Result<unknown>>,
): Promise<Response> {
  return guarded(request, findSignedIn, work);
}
