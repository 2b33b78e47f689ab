import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { answer } from '@/app/api/answer';
import { closePool } from '@/db/client';
import { FAULT_STATUS, ok, refuse, type FaultCode } from '@/lib/contracts/result';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { addContractor, addHousehold, type Contractor, type Household } from './scene';

// Who is signed in is the sign-in service's to say; everything behind it is real.
const signedIn = vi.hoisted(() => ({ userId: null as string | null }));
vi.mock('@clerk/nextjs/server', () => ({ auth: () => Promise.resolve(signedIn) }));

let database: TestDatabase;
let tern: Contractor;
let lane: Household;
let race: Household;

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addContractor('tern-hollow');
  await addContractor('quillback');
  lane = await addHousehold(tern);
  race = await addHousehold(tern);
});

afterEach(() => {
  signedIn.userId = null;
  vi.restoreAllMocks();
});

afterAll(async () => {
  await closePool();
  await database.drop();
});

const OWN = () => process.env.APP_ORIGIN ?? '';
const post = (body: string, headers: Record<string, string> = {}) =>
  new Request('http://localhost:4300/api/x', {
    method: 'POST',
    body,
    headers: { origin: OWN(), 'content-type': 'application/json', ...headers },
  });
const get = () => new Request('http://localhost:4300/api/x');
const params = (company: string, job?: string) => Promise.resolve({ company, job });
const faultShape = z.object({ fault: z.object({ code: z.string(), sentence: z.string() }) });
const codeOf = async (response: Response) => faultShape.parse(await response.json()).fault.code;

describe('an address below a company', () => {
  it('answers 401 to somebody signed out and 404 to a stranger, whatever they ask', async () => {
    const work = vi.fn(() => Promise.resolve(ok('secret')));
    expect((await answer(get(), params('tern-hollow', lane.jobId), work)).status).toBe(401);
    for (const [userId, company, job] of [
      ['user_owner_quillback', 'tern-hollow', lane.jobId],
      ['user_owner_tern-hollow', 'quillback', undefined],
      [race.clerkUserId, 'tern-hollow', lane.jobId],
      [lane.clerkUserId, 'tern-hollow', undefined],
      [lane.clerkUserId, 'nowhere', lane.jobId],
    ] as const) {
      signedIn.userId = userId;
      expect((await answer(get(), params(company, job), work)).status).toBe(404);
    }
    expect(work).not.toHaveBeenCalled();
  });

  it('hands the actor and the body on, and answers the value, never kept by anybody on the way', async () => {
    signedIn.userId = lane.clerkUserId;
    const response = await answer(post('{"a":1}'), params('tern-hollow', lane.jobId), (actor, body) =>
      Promise.resolve(ok({ actor, body })),
    );
    expect(response.status).toBe(200);
    expect(response.headers.get('cache-control')).toContain('no-store');
    expect(await response.json()).toEqual({ actor: lane.guest, body: { a: 1 } });
  });

  it('takes a write from our own origin alone', async () => {
    signedIn.userId = lane.clerkUserId;
    const work = vi.fn(() => Promise.resolve(ok('done')));
    const withoutOrigin = new Request('http://localhost:4300/api/x', { method: 'POST', body: '{}' });
    for (const request of [
      post('{}', { origin: 'https://elsewhere.example' }),
      post('{}', { origin: 'null' }),
      post('{}', { origin: `${OWN()}.elsewhere.example` }),
      withoutOrigin,
    ]) {
      const response = await answer(request, params('tern-hollow', lane.jobId), work);
      expect([response.status, await codeOf(response)]).toEqual([403, 'notAllowed']);
    }
    expect(work).not.toHaveBeenCalled();
  });

  it('refuses a body that is not JSON, or not said to be', async () => {
    signedIn.userId = lane.clerkUserId;
    const work = vi.fn(() => Promise.resolve(ok('done')));
    for (const request of [
      post('{'),
      post('a=1', { 'content-type': 'text/plain' }),
      post(`"${'x'.repeat(1_000_001)}"`),
    ]) {
      expect((await answer(request, params('tern-hollow', lane.jobId), work)).status).toBe(422);
    }
    expect(work).not.toHaveBeenCalled();
  });

  it.each(Object.keys(FAULT_STATUS) as FaultCode[])('turns the refusal %s into its status', async (code) => {
    signedIn.userId = 'user_owner_tern-hollow';
    const response = await answer(get(), params('tern-hollow'), () =>
      Promise.resolve(refuse(code, 'A sentence.', { detail: { more: 1 } })),
    );
    expect(response.status).toBe(FAULT_STATUS[code]);
    expect(await response.json()).toEqual({ fault: { code, sentence: 'A sentence.', detail: { more: 1 } } });
  });

  it('logs what nobody foresaw under a number that the answer names, and tells nothing else', async () => {
    signedIn.userId = 'user_owner_tern-hollow';
    const log = vi.spyOn(console, 'error').mockImplementation(() => undefined);
    const response = await answer(get(), params('tern-hollow'), () => {
      throw new Error('password=hunter2');
    });
    expect(response.status).toBe(500);
    const { sentence } = faultShape.parse(await response.json()).fault;
    const [, number] = /the number is ([0-9a-f]{8})\./.exec(sentence) ?? [];
    expect(log.mock.calls[0]?.[0]).toContain(number);
    expect(sentence).not.toContain('hunter2');
  });
});
