import type { Page } from '@playwright/test';
import { closePool, withScope } from '@/db/client';
import { paths } from '@/lib/paths';
import { expect, ready, test } from './base';
import { newHousehold, salesperson, type NewHousehold } from './household';
import { CARD, payByCard, paymentService } from './payment-service';
import { acceptInvitation } from './sign-in';

test.afterAll(() => closePool());

const COMPANY = 'tern-hollow';

/** Somebody alone who has signed; the deposit's id. */
async function signed(page: Page, { jobId, people }: NewHousehold): Promise<string> {
  const [person] = people;
  if (!person) throw new Error('Nobody is invited.');
  await acceptInvitation(page, person.link, person.email);
  await page.goto(paths.review(COMPANY, jobId));
  await ready(page);
  await page.getByRole('checkbox', { name: /I have read this and agree/ }).check();
  await page.getByLabel('Your signature').fill(person.name);
  const button = page.getByRole('button', { name: 'Sign this agreement' });
  // A second press while the first is on its way does nothing.
  await button.dblclick();
  await expect(page.getByText('Sealed as page 1 of the job book')).toBeVisible();
  await page.getByRole('link', { name: 'Go to the first payment' }).click();
  await page.waitForURL(/\/payments$/);
  await page.getByRole('link', { name: /^Pay payment 1/ }).click();
  await page.waitForURL(/\/payments\/[0-9a-f-]{36}$/);
  return new URL(page.url()).pathname.split('/').at(-1) ?? '';
}

/** What the ledger holds of a draw. */
async function paymentsOf(drawId: string): Promise<number[]> {
  return withScope(await salesperson(), async (tx) => {
    const rows = await tx.query.ledger.findMany({ where: (row, { eq }) => eq(row.drawId, drawId) });
    return rows.filter((row) => row.kind === 'payment').map((row) => row.amountCents);
  });
}

test('A declined card loses nothing; a good one pays, and its webhook counts once however often it comes', async ({
  visitor,
}) => {
  const page = await visitor('Guest');
  const drawId = await signed(page, await newHousehold(1));
  await payByCard(page, CARD.declined);
  await expect(page.getByRole('alert').filter({ hasText: 'did not go through' })).toBeVisible();
  expect(await paymentsOf(drawId)).toEqual([]);
  await payByCard(page, CARD.pays);
  await expect(page.getByText(/Received on/).first()).toBeVisible();
  const paid = await paymentsOf(drawId);
  expect(paid).toHaveLength(1);
  for (const { id, type } of await paymentService.eventsOf(drawId)) {
    expect((await paymentService.redeliver(id)).status, type).toBe(200);
  }
  expect(await paymentsOf(drawId)).toEqual(paid);
});

test('Webhooks that come late and in the wrong order leave one payment; the page waits for them and believes nothing else', async ({
  visitor,
}) => {
  const page = await visitor('Guest', { viewport: { width: 390, height: 844 } });
  const drawId = await signed(page, await newHousehold(1));
  await paymentService.hold(drawId);
  await payByCard(page, CARD.pays);
  await expect(page.getByText(/It is being confirmed/)).toBeVisible();
  expect(await paymentsOf(drawId)).toEqual([]);
  const delivered = await paymentService.release(drawId, 'reverse');
  expect(delivered.every(({ status }) => status === 200)).toBe(true);
  await expect(page.getByText(/Received on/).first()).toBeVisible();
  expect(await paymentsOf(drawId)).toHaveLength(1);
});
