import { expect, type Page } from '@playwright/test';
import { paths } from '@/lib/paths';
import { mailTo, newestMail, ready, stack } from './base';

interface Who {
  /** The contractor's slug. */
  readonly company: string;
  readonly email: string;
}

/** The six digits that a mail to this address carries, of the first that came after `after`. */
export async function codeTo(
  email: string,
  after: string,
  subject = 'is your sign-in code',
): Promise<string> {
  const mail = await mailTo(email, subject, after);
  const [code] = /^\d{6}/.exec(mail.subject) ?? [];
  if (!code) throw new Error(`The mail "${mail.subject}" begins with no code.`);
  return code;
}

/** Opens the contractor's sign-in, or stays when the page is there already. */
async function atSignIn(page: Page, company: string): Promise<void> {
  const address = new URL(paths.signIn(company), stack.web);
  if (!page.url().startsWith(address.href)) await page.goto(address.pathname);
  await ready(page);
}

async function leftSignIn(page: Page, company: string): Promise<void> {
  await page.waitForURL((url) => url.pathname !== paths.signIn(company));
  await ready(page);
}

/** Signs in as everybody can: a code to the mail address, read out of the mailbox. Ends where the sign-in leads. */
export async function signInByCode(page: Page, { company, email }: Who): Promise<void> {
  await atSignIn(page, company);
  await page.getByLabel('Mail address').fill(email);
  const before = await newestMail();
  await page.getByRole('button', { name: 'Send me a code' }).click();
  const code = await codeTo(email, before);
  await page.getByLabel('Code from the mail').fill(code);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await leftSignIn(page, company);
}

/** Signs in as staff with a password can. */
export async function signInByPassword(
  page: Page,
  { company, email, password }: Who & { readonly password: string },
): Promise<void> {
  await atSignIn(page, company);
  await page.getByRole('button', { name: 'I have a password' }).click();
  await page.getByLabel('Mail address').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await leftSignIn(page, company);
}

/** Opens the invitation that `link` leads to and gets in with a code; ends at the kitchen. */
export async function acceptInvitation(page: Page, link: string, email: string): Promise<void> {
  await page.goto(link);
  await ready(page);
  const before = await newestMail();
  await page.getByRole('button', { name: 'Send me the code' }).click();
  const code = await codeTo(email, before);
  await page.getByLabel('Code from the mail').fill(code);
  await page.getByRole('button', { name: 'Open my kitchen' }).click();
  await page.waitForURL(/\/jobs\/[0-9a-f-]{36}$/);
  await ready(page);
}

async function hook<T>(address: string, fields: Readonly<Record<string, unknown>>): Promise<T> {
  const answer = await fetch(`${stack.clerk}/test/${address}`, {
    method: 'POST',
    headers: {
      authorization: `Bearer ${process.env.CLERK_SECRET_KEY ?? ''}`,
      'content-type': 'application/json',
    },
    body: JSON.stringify(fields),
  });
  expect(answer.status, `POST /test/${address}`).toBe(200);
  return (await answer.json()) as T;
}

/** What a test may ask of the sign-in service's stand-in. */
export const signInService = {
  /** A session token for calls of the API without a browser, as `Authorization: Bearer`. */
  token: async (email: string): Promise<string> => (await hook<{ jwt: string }>('token', { email })).jwt,
  /** Lets the codes mailed to an address run out. */
  expireCodes: (email: string) => hook<unknown>('expire-codes', { email }),
  /** Signs somebody out in all browsers. */
  endSessions: (email: string) => hook<unknown>('end-sessions', { email }),
};
