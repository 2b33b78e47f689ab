import { expect, test as base, type Browser, type BrowserContext, type Page } from '@playwright/test';

/** Addresses of the stack under test, given by the test runner. */
export const stack = {
  web: required('APP_ORIGIN'),
  mailbox: required('MAILBOX_ORIGIN'),
  stripe: required('STRIPE_API_BASE'),
  clerk: required('CLERK_API_URL'),
};

function required(name: string): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set; run the browser tests with npm test.`);
  return value.replace(/\/$/, '');
}

const LOOPBACK = new Set(['localhost', '127.0.0.1', '[::1]']);

/** Watches every request of a context; `strangers` lists those that left this machine. */
export function watchRequests(context: BrowserContext): { strangers: string[] } {
  const strangers: string[] = [];
  context.on('request', (request) => {
    const url = new URL(request.url());
    if (['data:', 'blob:', 'about:'].includes(url.protocol)) return;
    if (!LOOPBACK.has(url.hostname)) strangers.push(request.url());
  });
  return { strangers };
}

/** What went wrong in a page without anyone seeing: thrown errors and refused content. */
export function watchFaults(page: Page): { faults: string[] } {
  const faults: string[] = [];
  page.on('pageerror', (error) => faults.push(error.message));
  page.on('console', (message) => {
    if (message.type() === 'error' && message.text().includes('Content Security Policy')) {
      faults.push(message.text());
    }
  });
  return { faults };
}

interface Visitors {
  /** A person with a browser of their own. */
  visitor: (name: string, options?: Parameters<Browser['newContext']>[0]) => Promise<Page>;
}

/** Every test gets visitors; none of their browsers may reach beyond loopback or break the page's policy. */
export const test = base.extend<Visitors>({
  visitor: async ({ browser }, use) => {
    const open: { name: string; context: BrowserContext; strangers: string[]; faults: string[] }[] = [];
    await use(async (name, options) => {
      const context = await browser.newContext({ baseURL: stack.web, ...options });
      const page = await context.newPage();
      open.push({ name, context, ...watchRequests(context), ...watchFaults(page) });
      return page;
    });
    for (const { name, context, strangers, faults } of open) {
      expect(strangers, `${name}'s browser called beyond loopback`).toEqual([]);
      expect(faults, `${name}'s pages threw or broke the policy`).toEqual([]);
      await context.close();
    }
  },
});

export { expect };

/** Waits until the page has taken over from the server's markup. */
export async function ready(page: Page): Promise<void> {
  await expect(page.locator('html')).toHaveAttribute('data-ready', 'yes');
}

export interface Mail {
  readonly id: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly links: readonly string[];
}

/** The newest mail's id, to wait for one that comes after it. */
export async function newestMail(): Promise<string> {
  const answer = (await (await fetch(`${stack.mailbox}/api/mails`)).json()) as { newest: number | string };
  return String(answer.newest);
}

/** Waits for a mail to `to` whose subject contains `subject`; the mailbox holds the request open meanwhile. */
export async function mailTo(to: string, subject: string, after?: string): Promise<Mail> {
  const query = new URLSearchParams({ to, subject, ...(after === undefined ? {} : { after }) });
  const answer = await fetch(`${stack.mailbox}/api/wait?${query.toString()}`);
  expect(answer.ok, `a mail to ${to} about "${subject}" arrives`).toBe(true);
  return ((await answer.json()) as { mail: Mail }).mail;
}

/** The first link of a mail that leads into this program. */
export function linkIn(mail: Mail): string {
  const link = mail.links.find((one) => one.startsWith(stack.web));
  if (!link) throw new Error(`The mail "${mail.subject}" has no link to ${stack.web}.`);
  return link;
}
