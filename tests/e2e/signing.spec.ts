import { closePool } from '@/db/client';
import { paths } from '@/lib/paths';
import { expect, ready, test } from './base';
import { newHousehold } from './household';
import { acceptInvitation } from './sign-in';

test.afterAll(() => closePool());

const COMPANY = 'tern-hollow';

test('Whatever moves between review and signature is shown before anything is signed; the second then signs first', async ({
  visitor,
}) => {
  test.setTimeout(240_000);
  const { jobId, people } = await newHousehold(2);
  const [one, two] = people;
  if (!one || !two) throw new Error('Two people are invited.');
  const first = await visitor('First');
  const second = await visitor('Second', { viewport: { width: 1024, height: 800 } });
  await acceptInvitation(first, one.link, one.email);
  await acceptInvitation(second, two.link, two.email);

  await first.goto(paths.review(COMPANY, jobId));
  await ready(first);
  await expect(first.getByRole('button', { name: 'Sign this agreement' })).toBeVisible();

  // Meanwhile the other picks another door style.
  await second.goto(paths.choose(COMPANY, jobId));
  await ready(second);
  await second.getByRole('radio', { name: /^Broad flat panel/ }).click();
  await expect(second.getByRole('radio', { name: /^Broad flat panel/ })).toBeChecked();
  await expect(second.getByText('Saved', { exact: true })).toBeVisible();

  await first.getByRole('checkbox', { name: /I have read this and agree/ }).check();
  await first.getByLabel('Your signature').fill(one.name);
  await first.getByRole('button', { name: 'Sign this agreement' }).click();
  await expect(first.getByText('Something moved since you opened this')).toBeVisible();
  await expect(first.getByText('Door style: Broad flat panel instead of Square flat panel.')).toBeVisible();
  await expect(first.getByText('not signed yet')).toHaveCount(2);

  await second.goto(paths.review(COMPANY, jobId));
  await ready(second);
  await second.getByRole('checkbox', { name: /I have read this and agree/ }).check();
  await second.getByLabel('Your signature').fill(two.name);
  await second.getByRole('button', { name: 'Sign this agreement' }).click();
  await expect(second.getByText('You have signed')).toBeVisible();

  await first.getByRole('checkbox', { name: /I have read this and agree/ }).check();
  await first.getByLabel('Your signature').fill(one.name);
  await first.getByRole('button', { name: 'Sign this agreement' }).click();
  await expect(first.getByText('Sealed as page 1 of the job book')).toBeVisible();
  await expect(second.getByText('Sealed as page 1 of the job book')).toBeVisible();
});
