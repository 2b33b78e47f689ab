import { randomBytes } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type * as Adapter from '@/lib/adapters/clerk';
import { payloadOf, signDelivery } from '@/lib/local/clerk/webhooks';
import { PUBLIC_KEY, SECRET_KEY, startScene, WEB_ORIGIN, WEBHOOK_SECRET, type Scene } from './fake';

let scene: Scene;
let clerk: typeof Adapter;

beforeAll(async () => {
  scene = await startScene();
  // The service's library reads these when it is loaded.
  const variables = {
    APP_ORIGIN: WEB_ORIGIN,
    DATABASE_URL: 'postgres://nobody@localhost:1/none',
    CLERK_PUBLISHABLE_KEY: scene.options.publishableKey,
    CLERK_SECRET_KEY: SECRET_KEY,
    CLERK_JWT_KEY: PUBLIC_KEY,
    CLERK_WEBHOOK_SIGNING_SECRET: WEBHOOK_SECRET,
    CLERK_API_URL: scene.origin,
    STRIPE_SECRET_KEY: 'sk_test_x',
    STRIPE_PUBLISHABLE_KEY: 'pk_test_x',
    STRIPE_WEBHOOK_SECRET: 'whsec_x',
    SMTP_URL: 'smtp://127.0.0.1:1',
    MAIL_DOMAIN: 'mail.example',
  };
  for (const [name, value] of Object.entries(variables)) vi.stubEnv(name, value);
  vi.resetModules();
  clerk = await import('@/lib/adapters/clerk');
});

afterAll(async () => {
  vi.unstubAllEnvs();
  await scene.stop();
});

describe('users and organisations', () => {
  it('are found again after they were made, and nobody is found by another address', async () => {
    const email = 'Ines@TernHollow.example';
    const { userId } = await clerk.createUser({
      name: 'Ines Maria Aldaba',
      email,
      password: 'scribe-and-stile',
    });
    const found = { userId, name: 'Ines Maria Aldaba', email: 'ines@ternhollow.example' };
    expect(await clerk.findUserByEmail(email)).toEqual(found);
    expect(await clerk.findUserByEmail('other@ternhollow.example')).toBeNull();
    const { organizationId } = await clerk.createOrganization({
      name: 'Tern Hollow',
      slug: 'tern-hollow',
      createdBy: userId,
    });
    expect(await clerk.findOrganizationBySlug('tern-hollow')).toEqual({ organizationId });
    expect(await clerk.findOrganizationBySlug('nobody')).toBeNull();
  });

  it('refuse a second user of one address with the service’s reason', async () => {
    const one = { name: 'Dov Lindqvist', email: 'dov@quillback.example' };
    await clerk.createUser(one);
    await expect(clerk.createUser(one)).rejects.toMatchObject({
      kind: 'refused',
      code: 'form_identifier_exists',
    });
  });

  it('make somebody a member once, with the role that was named last', async () => {
    const { userId: owner } = await clerk.createUser({ name: 'Ona Reed', email: 'ona@reed.example' });
    const { userId } = await clerk.createUser({ name: 'Rowan Petrie', email: 'rowan@ternhollow.example' });
    const { organizationId } = await clerk.createOrganization({ name: 'R', slug: 'reed', createdBy: owner });
    const first = await clerk.addMember({ organizationId, userId, role: 'salesperson' });
    const second = await clerk.addMember({ organizationId, userId, role: 'owner' });
    expect(second).toEqual(first);
    const { organizations } = scene.backend();
    const { data } = await organizations.getOrganizationMembershipList({ organizationId, userId: [userId] });
    expect(data.map((one) => one.role)).toEqual(['org:owner']);
  });
});

/** A delivery of an event as the service would send it. */
function delivery(type: string, data: Record<string, unknown>, atSeconds?: number, secret = WEBHOOK_SECRET) {
  const id = `msg_${randomBytes(6).toString('hex')}`;
  const body = payloadOf({ id, type, data, at: Date.now(), pending: true });
  const headers = signDelivery(id, body, secret, atSeconds);
  return { id, request: new Request(`${WEB_ORIGIN}/api/webhooks/clerk`, { method: 'POST', headers, body }) };
}

const membership = (role: string) => ({
  object: 'organization_membership',
  id: 'orgmem_1',
  role,
  organization: { id: 'org_1' },
  public_user_data: {
    user_id: 'user_1',
    identifier: 'Rowan@TernHollow.example',
    first_name: 'Rowan',
    last_name: null,
  },
});

describe('a webhook', () => {
  it('of a user tells id, main address and name', async () => {
    const { id, request } = delivery('user.updated', {
      object: 'user',
      id: 'user_1',
      first_name: 'Mara',
      last_name: 'Winslade',
      primary_email_address_id: 'idn_2',
      email_addresses: [
        { id: 'idn_1', email_address: 'old@winslade.example' },
        { id: 'idn_2', email_address: 'Mara@Winslade.example' },
      ],
    });
    expect(await clerk.verifyClerkWebhook(request)).toEqual({
      id,
      type: 'userSaved',
      userId: 'user_1',
      email: 'mara@winslade.example',
      name: 'Mara Winslade',
    });
  });

  it('of a membership tells the role in our words; a role that is not ours shuts the door', async () => {
    const known = delivery('organizationMembership.created', membership('org:salesperson'));
    expect(await clerk.verifyClerkWebhook(known.request)).toEqual({
      id: known.id,
      type: 'membershipSaved',
      membershipId: 'orgmem_1',
      organizationId: 'org_1',
      userId: 'user_1',
      role: 'salesperson',
      email: 'rowan@ternhollow.example',
      name: 'Rowan',
    });
    const stranger = delivery('organizationMembership.updated', membership('org:admin'));
    expect(await clerk.verifyClerkWebhook(stranger.request)).toMatchObject({ type: 'membershipShut' });
  });

  it('of anything else is named and nothing more', async () => {
    const { id, request } = delivery('session.created', { id: 'sess_1' });
    expect(await clerk.verifyClerkWebhook(request)).toEqual({ id, type: 'other', name: 'session.created' });
  });

  it('is nothing when another secret signed it, when it is an hour old, or when it is unsigned', async () => {
    const data = { object: 'user', id: 'user_1', deleted: true };
    const other = `whsec_${randomBytes(24).toString('base64')}`;
    const hourAgo = Math.floor(Date.now() / 1000) - 3600;
    expect(await clerk.verifyClerkWebhook(delivery('user.deleted', data).request)).not.toBeNull();
    expect(
      await clerk.verifyClerkWebhook(delivery('user.deleted', data, undefined, other).request),
    ).toBeNull();
    expect(await clerk.verifyClerkWebhook(delivery('user.deleted', data, hourAgo).request)).toBeNull();
    const unsigned = new Request(WEB_ORIGIN, {
      method: 'POST',
      body: JSON.stringify({ type: 'user.deleted', data }),
    });
    expect(await clerk.verifyClerkWebhook(unsigned)).toBeNull();
  });
});
