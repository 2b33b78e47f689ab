import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { closePool } from '@/db/client';
import { POST } from '@/app/api/[company]/invitations/[token]/acceptance/route';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { issueInvitation } from '@/lib/services/invitation/send';
import { resolveActor } from '@/lib/services/session/resolve-actor';
import { addContractor, addHousehold, valueOf, type Contractor, type Household } from './scene';

interface Address {
  readonly emailAddress: string;
  readonly verification: { readonly status: string } | null;
}

// Who is signed in, and which addresses are theirs, is the sign-in service's to say.
const visitor = vi.hoisted(() => ({ id: 'user_mara', emailAddresses: [] as Address[] }));
vi.mock('@clerk/nextjs/server', () => ({
  auth: () => Promise.resolve({ userId: visitor.id }),
  clerkClient: () =>
    Promise.resolve({
      users: {
        getUser: () =>
          Promise.resolve({ ...visitor, firstName: 'Mara', lastName: null, primaryEmailAddressId: null }),
      },
    }),
}));

let database: TestDatabase;
let tern: Contractor;
let lane: Household;

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addContractor('tern-hollow');
  lane = await addHousehold(tern);
});

afterAll(async () => {
  await closePool();
  await database.drop();
});

const accept = (token: string) =>
  POST(
    new Request('http://localhost:4300/api/x', {
      method: 'POST',
      headers: { origin: process.env.APP_ORIGIN ?? '' },
    }),
    { params: Promise.resolve({ company: 'tern-hollow', token }) },
  );

describe('the acceptance of an invitation', () => {
  it('counts an address only once the sign-in service has seen it verified', async () => {
    const email = 'mara@winslade.example';
    const { token } = valueOf(await issueInvitation(tern.owner, { jobId: lane.jobId, email, name: 'Mara' }));
    const whoIs = () => resolveActor({ slug: 'tern-hollow', clerkUserId: visitor.id, jobId: lane.jobId });
    for (const verification of [null, { status: 'unverified' }, { status: 'expired' }]) {
      visitor.id = `user_${verification?.status}`;
      visitor.emailAddresses = [{ emailAddress: email, verification }];
      expect((await accept(token)).status).toBe(403);
      expect(await whoIs()).toBeNull();
    }
    visitor.id = 'user_mara';
    visitor.emailAddresses = [
      { emailAddress: 'other@winslade.example', verification: { status: 'unverified' } },
      { emailAddress: email, verification: { status: 'verified' } },
    ];
    const accepted = await accept(token);
    expect(await accepted.json()).toEqual({ jobId: lane.jobId, company: 'tern-hollow' });
    expect(await whoIs()).toMatchObject({ kind: 'guest', name: 'Mara', email });
  });
});
