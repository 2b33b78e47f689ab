import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { closePool, withScope } from '@/db/client';
import { invitations } from '@/db/schema';
import { paths } from '@/lib/paths';
import { findCompanyBySlug } from '@/lib/services/company/find-by-slug';
import { expect, linkIn, mailTo, newestMail, ready, stack, test } from './base';
import { acceptInvitation, codeTo, signInByCode, signInByPassword, signInService } from './sign-in';

// The demo's second contractor and its owner; every household below is of its own test.
const COMPANY = 'quillback';
const OWNER = 'dov@quillback.example';
const PASSWORD = 'veneer-and-stile-1974';

const newAddress = () => `guest-${randomUUID().slice(0, 8)}@household.example`;

async function askOwner<T>(method: 'POST' | 'DELETE', address: string, body: unknown = {}): Promise<T> {
  const answer = await fetch(stack.web + address, {
    method,
    headers: {
      authorization: `Bearer ${await signInService.token(OWNER)}`,
      origin: stack.web,
      'content-type': 'application/json',
    },
    body: JSON.stringify(body),
  });
  expect(answer.status, `${method} ${address}`).toBe(200);
  return (await answer.json()) as T;
}

interface Invited {
  readonly job: string;
  readonly invitation: string;
  readonly email: string;
  /** The link in the mail. */
  readonly link: string;
}

/** A job of its own with somebody invited to it, and the mail that came. */
async function invite(email = newAddress()): Promise<Invited> {
  const { id: job } = await askOwner<{ id: string }>('POST', paths.api.jobs(COMPANY), {
    name: 'Alder Court',
    address: '5 Alder Court, Lower Marsh, PA',
  });
  const before = await newestMail();
  const { id: invitation } = await askOwner<{ id: string }>('POST', paths.api.invitations(COMPANY, job), {
    email,
    name: 'Nell Ashdown',
    signer: true,
  });
  return { job, invitation, email, link: linkIn(await mailTo(email, 'Your kitchen at', before)) };
}

test.afterAll(() => closePool());

test('A page asked for by somebody signed out leads to the contractor’s sign-in, and back after it', async ({
  visitor,
}) => {
  const page = await visitor('Dov');
  const wanted = `${paths.home(COMPANY)}?from=mail`;
  await page.goto(wanted);
  await ready(page);
  expect(new URL(page.url()).pathname).toBe(paths.signIn(COMPANY));
  await expect(page.getByRole('banner')).toContainText('Quillback Kitchens');
  await expect(page.getByRole('link', { name: '(610) 555-0117' }).first()).toBeVisible();
  await signInByPassword(page, { company: COMPANY, email: OWNER, password: PASSWORD });
  expect(new URL(page.url()).pathname.startsWith(paths.home(COMPANY))).toBe(true);
});

test('A wrong code, an older code and a code that ran out let nobody in; a new one does', async ({
  visitor,
}) => {
  const page = await visitor('Dov');
  await page.clock.install();
  await page.goto(paths.signIn(COMPANY));
  await ready(page);
  await page.getByLabel('Mail address').fill('nobody@household.example');
  await page.getByRole('button', { name: 'Send me a code' }).click();
  await expect(page.getByLabel('Mail address')).toHaveAccessibleDescription(
    /Nobody signs in to Quillback Kitchens/,
  );

  let before = await newestMail();
  await page.getByLabel('Mail address').fill(OWNER);
  await page.getByRole('button', { name: 'Send me a code' }).click();
  const first = await codeTo(OWNER, before);
  const again = page.getByRole('button', { name: 'Send a new code' });
  await expect(again).toHaveAccessibleDescription(/Possible in \d+ seconds/);
  await page.clock.fastForward('00:31');
  await expect(again).toBeEnabled();
  before = await newestMail();
  await again.click();
  const second = await codeTo(OWNER, before);
  await expect(page.getByRole('status')).toContainText('A new code was sent');

  const field = page.getByLabel('Code from the mail');
  const signIn = page.getByRole('button', { name: 'Sign in', exact: true });
  await field.fill(first);
  await signIn.click();
  await expect(field).toHaveAccessibleDescription(/not the code of the newest mail/);
  await expect(field).toBeFocused();

  await signInService.expireCodes(OWNER);
  await field.fill(second);
  await signIn.click();
  await expect(page.getByRole('alert').filter({ hasText: 'too old' })).toBeVisible();
  expect(new URL(page.url()).pathname).toBe(paths.signIn(COMPANY));

  before = await newestMail();
  await again.click();
  await field.fill(await codeTo(OWNER, before));
  await signIn.click();
  await page.waitForURL((url) => url.pathname !== paths.signIn(COMPANY));
});

test('A forgotten password is set anew with a code, and the old one is worthless', async ({ visitor }) => {
  const invited = await invite();
  const page = await visitor('Nell');
  await acceptInvitation(page, invited.link, invited.email);
  // A homeowner has no password, and is told so.
  await page.context().clearCookies();
  await page.goto(paths.signIn(COMPANY));
  await ready(page);
  await page.getByRole('button', { name: 'I have a password' }).click();
  await page.getByLabel('Mail address').fill(invited.email);
  await page.getByRole('button', { name: 'I forgot my password' }).click();
  await expect(page.getByRole('alert').filter({ hasText: 'no password here' })).toBeVisible();

  await page.getByLabel('Mail address').fill(OWNER);
  await page.getByLabel('Password', { exact: true }).fill('not-the-password');
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByLabel('Password', { exact: true })).toHaveAccessibleDescription(/does not go with/);
  const before = await newestMail();
  await page.getByRole('button', { name: 'I forgot my password' }).click();
  const code = await codeTo(OWNER, before, 'is your code to set a new password');
  await page.getByLabel('Code from the mail').fill(code);
  await page.getByRole('button', { name: 'Go on' }).click();
  await page.getByLabel('New password').fill(PASSWORD);
  await page.getByRole('button', { name: 'Set it and sign in' }).click();
  await page.waitForURL((url) => url.pathname !== paths.signIn(COMPANY));
});

test('The invited get in on their first visit and after it, and to their own kitchen alone', async ({
  visitor,
}) => {
  const [own, other] = [await invite(), await invite()];
  const page = await visitor('Nell');
  await page.goto(own.link);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Your kitchen at Alder Court');
  await expect(
    page.getByText('Dov Lindqvist of Quillback Kitchens invites you, Nell Ashdown,'),
  ).toBeVisible();
  await acceptInvitation(page, own.link, own.email);
  expect(new URL(page.url()).pathname).toBe(paths.job(COMPANY, own.job));
  expect((await page.goto(paths.job(COMPANY, other.job)))?.status()).toBe(404);

  await page.goto(own.link);
  await page.getByRole('link', { name: 'Open my kitchen' }).click();
  await page.waitForURL(`**${paths.job(COMPANY, own.job)}`);

  await page.context().clearCookies();
  await page.goto(own.link);
  await page.getByRole('link', { name: 'Sign in' }).click();
  await page.waitForURL((url) => url.pathname === paths.signIn(COMPANY));
  await expect(page.getByLabel('Mail address')).toHaveValue(own.email);
  await signInByCode(page, { company: COMPANY, email: own.email });
  expect(new URL(page.url()).pathname).toBe(paths.job(COMPANY, own.job));
});

test('An invitation opened by somebody else says for whom it is, and lets them go on as that one', async ({
  visitor,
}) => {
  const [own, other] = [await invite(), await invite()];
  const page = await visitor('Nell');
  await acceptInvitation(page, own.link, own.email);
  await page.goto(other.link);
  await ready(page);
  await expect(page.getByText('This invitation is for another address')).toBeVisible();
  await expect(page.getByText(`signed in as ${own.email}`)).toBeVisible();
  await page.getByRole('button', { name: `Go on as ${other.email}` }).click();
  await page.getByRole('button', { name: 'Send me the code' }).waitFor();
  await acceptInvitation(page, other.link, other.email);
  expect(new URL(page.url()).pathname).toBe(paths.job(COMPANY, other.job));
});

test('An expired, a revoked and an unknown invitation let nobody in and say whom to call', async ({
  visitor,
}) => {
  const [expired, revoked] = [await invite(), await invite()];
  const company = await findCompanyBySlug(COMPANY);
  if (!company) throw new Error('The demo has no Quillback.');
  await withScope({ kind: 'worker', companyId: company.id }, (tx) =>
    tx
      .update(invitations)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(invitations.id, expired.invitation)),
  );
  await askOwner('DELETE', paths.api.invitation(COMPANY, revoked.job, revoked.invitation));

  const page = await visitor('Nell');
  await page.goto(expired.link);
  await expect(page.getByText('has run out')).toBeVisible();
  await expect(page.getByRole('button', { name: 'Send me the code' })).toHaveCount(0);
  await page.goto(revoked.link);
  await expect(page.getByText('took this invitation back')).toBeVisible();
  await expect(page.getByRole('main').getByRole('link', { name: '(610) 555-0117' }).first()).toBeVisible();
  const unknown = await page.goto(paths.invitation(COMPANY, 'A'.repeat(43)));
  expect(unknown?.status()).toBe(404);
  const elsewhere = new URL(expired.link).pathname.replace(COMPANY, 'tern-hollow');
  expect((await page.goto(elsewhere))?.status()).toBe(404);
});

test('A session that ended elsewhere is said to be over, and what signing in again leads back to', async ({
  visitor,
}) => {
  const { link, email, job } = await invite();
  const page = await visitor('Nell');
  await page.clock.install();
  await acceptInvitation(page, link, email);
  await expect(page.getByText(`Signed in as ${email}`)).toBeVisible();
  await signInService.endSessions(email);
  // A token is good for a minute; the page asks for the next before that.
  await page.clock.fastForward('01:00');
  await page.getByRole('link', { name: 'Sign in again' }).click();
  await signInByCode(page, { company: COMPANY, email });
  expect(new URL(page.url()).pathname).toBe(paths.job(COMPANY, job));
});

test('Signing out shuts the pages, also those that the browser remembers', async ({ visitor }) => {
  const { link, email, job } = await invite();
  const page = await visitor('Nell');
  await acceptInvitation(page, link, email);
  await page.getByRole('button', { name: 'Sign out' }).click();
  await page.getByRole('button', { name: 'Send me a code' }).waitFor();
  await page.goto(paths.job(COMPANY, job));
  expect(new URL(page.url()).pathname).toBe(paths.signIn(COMPANY));
  expect((await page.request.get(paths.api.job(COMPANY, job))).status()).toBe(401);
});

test('Every page carries a policy with a nonce of its own and no origin beyond this machine', async ({
  visitor,
}) => {
  const page = await visitor('a stranger');
  const policies: string[] = [];
  for (let visit = 0; visit < 2; visit += 1) {
    const headers = (await page.goto(paths.signIn(COMPANY)))?.headers() ?? {};
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['referrer-policy']).toBe('strict-origin-when-cross-origin');
    expect(headers['permissions-policy']).toContain('camera=()');
    // Plain http here; a browser that was told so would refuse it for years.
    expect(headers['strict-transport-security']).toBeUndefined();
    policies.push(headers['content-security-policy'] ?? '');
  }
  const [first = '', second = ''] = policies;
  const nonceOf = (policy: string) => /'nonce-([^']+)'/.exec(policy)?.[1] ?? '';
  expect(nonceOf(first)).not.toBe('');
  expect(nonceOf(first)).not.toBe(nonceOf(second));
  expect(first).toContain("frame-ancestors 'none'");
  const hosts = [...first.matchAll(/(?:https?|wss?):\/\/([^\s;:]+)/g)].map(([, host]) => host);
  expect(new Set(hosts)).toEqual(new Set(['localhost']));
});
