import { verifyToken } from '@clerk/nextjs/server';
import { verifyWebhook } from '@clerk/nextjs/webhooks';
import { NextRequest } from 'next/server';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import {
  at,
  Browser,
  codeOf,
  PUBLIC_KEY,
  SECRET_KEY,
  startScene,
  text,
  WEB_ORIGIN,
  WEBHOOK_SECRET,
  wrongCode,
  type Delivery,
  type Scene,
} from './fake';

let scene: Scene;
let browser: Browser;

beforeEach(async () => {
  scene = await startScene();
  browser = new Browser(scene);
});
afterEach(() => scene.stop());

const makeUser = (email: string, password?: string) =>
  scene.backend().users.createUser({
    emailAddress: [email],
    firstName: 'Ines',
    lastName: 'Aldaba',
    ...(password === undefined ? { skipPasswordRequirement: true } : { password }),
  });

const errorCode = (body: unknown) => at(body, 'errors', 0, 'code');

/** Begins a sign-in by code; its address, and the code that was mailed. */
async function askForCode(who: Browser, email: string): Promise<{ address: string; code: string }> {
  const begun = await who.send('POST', '/v1/client/sign_ins', { identifier: email });
  const address = `/v1/client/sign_ins/${text(at(begun.body, 'response', 'id'))}`;
  await who.send('POST', `${address}/prepare_first_factor`, { strategy: 'email_code' });
  const mail = await scene.mails.next();
  expect(mail.to).toBe(email);
  return { address, code: codeOf(mail) };
}

const attempt = (who: Browser, address: string, code: string) =>
  who.send('POST', `${address}/attempt_first_factor`, { strategy: 'email_code', code });

async function hook(address: string, fields: object): Promise<unknown> {
  const answer = await fetch(`${scene.origin}/test/${address}`, {
    method: 'POST',
    headers: { authorization: `Bearer ${SECRET_KEY}`, 'content-type': 'application/json' },
    body: JSON.stringify(fields),
  });
  return answer.json();
}

describe('a sign-in by code', () => {
  it('signs the browser in with the code that was mailed, and the token verifies with the public key alone', async () => {
    const user = await makeUser('ines@ternhollow.example');
    const { address, code } = await askForCode(browser, 'ines@ternhollow.example');
    const done = await attempt(browser, address, code);
    expect(at(done.body, 'response', 'status')).toBe('complete');
    const session = text(at(done.body, 'response', 'created_session_id'));

    const token = await browser.send('POST', `/v1/client/sessions/${session}/tokens`);
    const claims = await verifyToken(text(at(token.body, 'jwt')), {
      jwtKey: PUBLIC_KEY,
      authorizedParties: [WEB_ORIGIN],
    });
    expect(claims).toMatchObject({ sub: user.id, sid: session, azp: WEB_ORIGIN, v: 2 });
    expect(claims.exp - claims.iat).toBe(60);
  });

  it('refuses a wrong code, then takes the right one', async () => {
    await makeUser('ines@ternhollow.example');
    const { address, code } = await askForCode(browser, 'ines@ternhollow.example');
    const wrong = await attempt(browser, address, wrongCode(code));
    expect([wrong.status, errorCode(wrong.body)]).toEqual([422, 'form_code_incorrect']);
    expect(at((await attempt(browser, address, code)).body, 'response', 'status')).toBe('complete');
  });

  it('lets no code through after five wrong ones', async () => {
    await makeUser('ines@ternhollow.example');
    const { address, code } = await askForCode(browser, 'ines@ternhollow.example');
    for (let tries = 0; tries < 5; tries += 1) await attempt(browser, address, wrongCode(code));
    expect(errorCode((await attempt(browser, address, code)).body)).toBe('verification_failed');
  });

  it('lets no code through after its ten minutes', async () => {
    await makeUser('ines@ternhollow.example');
    const { address, code } = await askForCode(browser, 'ines@ternhollow.example');
    await hook('expire-codes', { email: 'ines@ternhollow.example' });
    expect(errorCode((await attempt(browser, address, code)).body)).toBe('verification_expired');
  });

  it('makes an earlier code worthless by a newer one', async () => {
    await makeUser('ines@ternhollow.example');
    const { address, code } = await askForCode(browser, 'ines@ternhollow.example');
    await browser.send('POST', `${address}/prepare_first_factor`, { strategy: 'email_code' });
    const newer = codeOf(await scene.mails.next());
    expect(errorCode((await attempt(browser, address, code)).body)).toBe('form_code_incorrect');
    expect(at((await attempt(browser, address, newer)).body, 'response', 'status')).toBe('complete');
  });

  it('mails four codes for one sign-in and says how long until the next', async () => {
    await makeUser('ines@ternhollow.example');
    const { address } = await askForCode(browser, 'ines@ternhollow.example');
    const again = () => browser.send('POST', `${address}/prepare_first_factor`, { strategy: 'email_code' });
    expect([(await again()).status, (await again()).status, (await again()).status]).toEqual([200, 200, 200]);
    const refused = await again();
    expect([refused.status, errorCode(refused.body)]).toEqual([429, 'too_many_requests']);
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
  });

  it('cannot be gone on with from another browser', async () => {
    await makeUser('ines@ternhollow.example');
    const { address, code } = await askForCode(browser, 'ines@ternhollow.example');
    expect((await attempt(new Browser(scene), address, code)).status).toBe(404);
  });

  it('knows nobody by an address that never signed up', async () => {
    const answer = await browser.send('POST', '/v1/client/sign_ins', { identifier: 'no@body.example' });
    expect([answer.status, errorCode(answer.body)]).toEqual([422, 'form_identifier_not_found']);
  });
});

describe('a password', () => {
  const enter = (password: string, who = browser) =>
    who.send('POST', '/v1/client/sign_ins', { identifier: 'dov@quillback.example', password });

  it('signs in when it is right and not when it is wrong', async () => {
    await makeUser('dov@quillback.example', 'scribe-and-mullion');
    expect(errorCode((await enter('something-else')).body)).toBe('form_password_incorrect');
    expect(at((await enter('scribe-and-mullion')).body, 'response', 'status')).toBe('complete');
  });

  it('is not looked at after ten wrong ones in ten minutes, even when it is right', async () => {
    await makeUser('dov@quillback.example', 'scribe-and-mullion');
    for (let tries = 0; tries < 10; tries += 1) await enter(`wrong-password-${tries}`);
    expect(errorCode((await enter('scribe-and-mullion')).body)).toBe('user_locked');
  });

  it('is set anew with a mailed code, and the old one is worthless', async () => {
    await makeUser('dov@quillback.example', 'scribe-and-mullion');
    const begun = await browser.send('POST', '/v1/client/sign_ins', { identifier: 'dov@quillback.example' });
    const address = `/v1/client/sign_ins/${text(at(begun.body, 'response', 'id'))}`;
    const strategy = 'reset_password_email_code';
    const early = await browser.send('POST', `${address}/reset_password`, {
      password: 'light-rail-and-reveal',
    });
    expect(early.status).toBe(404);
    await browser.send('POST', `${address}/prepare_first_factor`, { strategy });
    const code = codeOf(await scene.mails.next());
    const right = await browser.send('POST', `${address}/attempt_first_factor`, { strategy, code });
    expect(at(right.body, 'response', 'status')).toBe('needs_new_password');
    const short = await browser.send('POST', `${address}/reset_password`, { password: 'short' });
    expect(errorCode(short.body)).toBe('form_password_length_too_short');
    const set = await browser.send('POST', `${address}/reset_password`, {
      password: 'light-rail-and-reveal',
    });
    expect(at(set.body, 'response', 'status')).toBe('complete');
    const other = new Browser(scene);
    expect(errorCode((await enter('scribe-and-mullion', other)).body)).toBe('form_password_incorrect');
    expect(at((await enter('light-rail-and-reveal', other)).body, 'response', 'status')).toBe('complete');
  });
});

describe('a first visit', () => {
  it('makes a user only when the address was shown to be theirs', async () => {
    const begun = await browser.send('POST', '/v1/client/sign_ups', {
      email_address: 'mara@winslade.example',
      first_name: 'Mara',
      last_name: 'Winslade',
    });
    expect(at(begun.body, 'response', 'unverified_fields')).toEqual(['email_address']);
    const address = `/v1/client/sign_ups/${text(at(begun.body, 'response', 'id'))}`;
    await browser.send('POST', `${address}/prepare_verification`, { strategy: 'email_code' });
    const code = codeOf(await scene.mails.next());
    const { users } = scene.backend();
    expect(await users.getCount()).toBe(0);
    const wrong = await browser.send('POST', `${address}/attempt_verification`, { code: wrongCode(code) });
    expect(errorCode(wrong.body)).toBe('form_code_incorrect');
    const done = await browser.send('POST', `${address}/attempt_verification`, { code });
    expect(at(done.body, 'response', 'status')).toBe('complete');
    const user = await users.getUser(text(at(done.body, 'response', 'created_user_id')));
    expect(user.emailAddresses[0]?.verification?.status).toBe('verified');
    expect(user.fullName).toBe('Mara Winslade');
  });

  it('is refused for an address that somebody has', async () => {
    await makeUser('mara@winslade.example');
    const begun = await browser.send('POST', '/v1/client/sign_ups', {
      email_address: 'MARA@winslade.example',
    });
    expect(errorCode(begun.body)).toBe('form_identifier_exists');
  });
});

describe('a session', () => {
  async function signedIn() {
    await makeUser('ines@ternhollow.example');
    const { address, code } = await askForCode(browser, 'ines@ternhollow.example');
    const done = await attempt(browser, address, code);
    return text(at(done.body, 'response', 'created_session_id'));
  }
  const tokenOf = (session: string, who = browser) =>
    who.send('POST', `/v1/client/sessions/${session}/tokens`);

  it('gives no token after the browser signed out', async () => {
    const session = await signedIn();
    await browser.send('DELETE', '/v1/client/sessions');
    expect((await tokenOf(session)).status).toBe(401);
  });

  it('gives no token to another browser', async () => {
    const session = await signedIn();
    expect((await tokenOf(session, new Browser(scene))).status).toBe(401);
  });

  it('gives no token after the user was deleted', async () => {
    const session = await signedIn();
    const { users } = scene.backend();
    const { data } = await users.getUserList();
    await users.deleteUser(data[0]?.id ?? '');
    expect((await tokenOf(session)).status).toBe(401);
  });

  it('outlives a restart, as everything else that is remembered', async () => {
    const session = await signedIn();
    const { organizations, users } = scene.backend();
    const { data } = await users.getUserList();
    const createdBy = data[0]?.id ?? '';
    await organizations.createOrganization({ name: 'Tern Hollow', slug: 'tern-hollow', createdBy });
    await scene.restart();
    expect((await tokenOf(session)).status).toBe(200);
    expect((await scene.backend().users.getUserList()).data[0]?.id).toBe(createdBy);
    const organization = await scene.backend().organizations.getOrganization({ slug: 'tern-hollow' });
    expect(organization.name).toBe('Tern Hollow');
  });

  it('does not begin by a form on a page of somebody else', async () => {
    await makeUser('ines@ternhollow.example');
    const answer = await fetch(`${scene.origin}/v1/client/sign_ins`, {
      method: 'POST',
      headers: { origin: 'https://elsewhere.example', 'content-type': 'application/x-www-form-urlencoded' },
      body: 'identifier=ines@ternhollow.example',
    });
    expect(answer.status).toBe(400);
  });
});

describe('the tests’ own addresses', () => {
  it('give a bearer token that verifies, and none without the secret key', async () => {
    const user = await makeUser('ines@ternhollow.example');
    const made = await hook('token', { email: 'ines@ternhollow.example' });
    const claims = await verifyToken(text(at(made, 'jwt')), { jwtKey: PUBLIC_KEY });
    expect(claims.sub).toBe(user.id);
    const stranger = await fetch(`${scene.origin}/test/token`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'clerk-secret-key': SECRET_KEY },
      body: JSON.stringify({ email: 'ines@ternhollow.example' }),
    });
    expect(stranger.status).toBe(401);
  });

  it('give a token that has run out, which does not verify', async () => {
    await makeUser('ines@ternhollow.example');
    const made = await hook('token', { email: 'ines@ternhollow.example', expired: true });
    await expect(verifyToken(text(at(made, 'jwt')), { jwtKey: PUBLIC_KEY })).rejects.toThrow(/expired/i);
  });
});

describe('the servers’ addresses', () => {
  it('are closed without the secret key, also through the program’s proxy', async () => {
    const headers = { 'clerk-secret-key': SECRET_KEY };
    for (const address of ['/v1/users', '/v1/organizations']) {
      expect((await fetch(`${scene.origin}${address}`, { headers })).status).toBe(401);
    }
  });

  it('keep organisations, members and roles; the creator owns, and the token says so', async () => {
    const { organizations } = scene.backend();
    const ines = await makeUser('ines@ternhollow.example', 'scribe-and-mullion');
    const rowan = await makeUser('rowan@ternhollow.example');
    const organization = await organizations.createOrganization({
      name: 'Tern Hollow Cabinet Refacing',
      slug: 'tern-hollow',
      createdBy: ines.id,
    });
    const organizationId = organization.id;
    await organizations.createOrganizationMembership({
      organizationId,
      userId: rowan.id,
      role: 'org:salesperson',
    });
    const { data } = await organizations.getOrganizationMembershipList({ organizationId });
    const roles = data.map((one) => [one.publicUserData?.identifier, one.role]);
    expect(roles).toEqual([
      ['ines@ternhollow.example', 'org:owner'],
      ['rowan@ternhollow.example', 'org:salesperson'],
    ]);
    await expect(
      organizations.createOrganizationMembership({ organizationId, userId: rowan.id, role: 'org:owner' }),
    ).rejects.toMatchObject({ status: 400 });
    await expect(
      organizations.updateOrganizationMembership({ organizationId, userId: rowan.id, role: 'org:admin' }),
    ).rejects.toMatchObject({ status: 422 });

    const made = await hook('token', { user_id: ines.id });
    const claims = await verifyToken(text(at(made, 'jwt')), { jwtKey: PUBLIC_KEY });
    expect(at(claims, 'o')).toEqual({ id: organizationId, slg: 'tern-hollow', rol: 'owner' });
    await organizations.deleteOrganizationMembership({ organizationId, userId: rowan.id });
    expect((await organizations.getOrganizationMembershipList({ organizationId })).totalCount).toBe(1);
  });

  it('find a user by mail address whatever its case, and no second one of that address is made', async () => {
    const user = await makeUser('ines@ternhollow.example');
    const { users } = scene.backend();
    const found = await users.getUserList({ emailAddress: ['INES@ternhollow.example'] });
    expect(found.data.map((one) => one.id)).toEqual([user.id]);
    await expect(makeUser('Ines@TernHollow.example')).rejects.toMatchObject({ status: 422 });
  });
});

describe('a webhook', () => {
  const verify = ({ headers, body }: Delivery, changedBody = body) =>
    verifyWebhook(new NextRequest('http://localhost/hook', { method: 'POST', headers, body: changedBody }), {
      signingSecret: WEBHOOK_SECRET,
    });

  it('verifies with the service’s library as it came, and not with one byte changed', async () => {
    const user = await makeUser('ines@ternhollow.example');
    const delivery = await scene.deliveries.next();
    const event = await verify(delivery);
    expect([event.type, event.data.id]).toEqual(['user.created', user.id]);
    const changed = delivery.body.replace('Aldaba', 'Aldabb');
    expect(changed).not.toBe(delivery.body);
    await expect(verify(delivery, changed)).rejects.toThrow(/verify/i);
    const otherId = { ...delivery, headers: { ...delivery.headers, 'svix-id': 'msg_other' } };
    await expect(verify(otherId)).rejects.toThrow(/verify/i);
  });

  it('comes again with the same id until it is taken', async () => {
    scene.answers.push(500, 503);
    await makeUser('ines@ternhollow.example');
    const tries = [
      await scene.deliveries.next(),
      await scene.deliveries.next(),
      await scene.deliveries.next(),
    ];
    const [first] = tries;
    expect(new Set(tries.map((one) => one.headers['svix-id']))).toEqual(new Set([first?.headers['svix-id']]));
    expect(tries.map((one) => one.body)).toEqual([first?.body, first?.body, first?.body]);
  });

  it('tells of each change of a user and of a membership', async () => {
    const { organizations, users } = scene.backend();
    const user = await makeUser('ines@ternhollow.example');
    await users.updateUser(user.id, { firstName: 'Inez' });
    const organization = await organizations.createOrganization({
      name: 'Tern Hollow',
      slug: 'tern-hollow',
      createdBy: user.id,
    });
    const member = { organizationId: organization.id, userId: user.id };
    await organizations.updateOrganizationMembership({ ...member, role: 'org:salesperson' });
    await users.deleteUser(user.id);
    const types: string[] = [];
    for (let taken = 0; taken < 7; taken += 1) {
      types.push((await verify(await scene.deliveries.next())).type);
    }
    expect(types.sort()).toEqual([
      'organization.created',
      'organizationMembership.created',
      'organizationMembership.deleted',
      'organizationMembership.updated',
      'user.created',
      'user.deleted',
      'user.updated',
    ]);
  });

  it('that was not taken before a stop is delivered after the next start', async () => {
    scene.answers.push(500);
    await makeUser('ines@ternhollow.example');
    const first = await scene.deliveries.next();
    await scene.restart();
    const second = await scene.deliveries.next();
    expect(second.headers['svix-id']).toBe(first.headers['svix-id']);
  });
});
