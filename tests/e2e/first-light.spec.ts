import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Page } from '@playwright/test';
import { paths } from '@/lib/paths';
import { expect, linkIn, mailTo, newestMail, ready, stack, test } from './base';
import { CARD, payByCard } from './payment-service';
import { acceptInvitation, signInByPassword } from './sign-in';

// The demo scenario itself, from the invitation to the second sealed page.
const COMPANY = 'tern-hollow';
const PASSWORD = 'veneer-and-stile-1974';
const MARA = { email: 'mara@winslade.example', name: 'Mara Winslade' };
const TEO = { email: 'teo@winslade.example', name: 'Teo Winslade' };

/** The total in cents, as it is read out. */
async function readTotal(page: Page): Promise<number> {
  const text = await page
    .getByRole('region', { name: 'Price', exact: true })
    .getByRole('status')
    .textContent();
  const [, dollars] = /total is \$([\d,.]+)/.exec(text ?? '') ?? [];
  if (!dollars) throw new Error(`No total in "${text ?? ''}".`);
  return Math.round(Number(dollars.replaceAll(',', '')) * 100);
}

/** The difference in cents that an option's block shows. */
async function readDifference(page: Page, option: RegExp): Promise<number> {
  const text = await page.getByRole('radio', { name: option }).innerText();
  if (/same price/.test(text)) return 0;
  const [, sign, dollars] = /([+−]) ?\$([\d,.]+)/.exec(text) ?? [];
  if (!dollars) throw new Error(`No difference in "${text}".`);
  return Math.round(Number(dollars.replaceAll(',', '')) * 100) * (sign === '−' ? -1 : 1);
}

async function turnTo(page: Page, part: string): Promise<void> {
  await page.getByRole('button', { name: /of \d+ decided/ }).click();
  await page.getByRole('dialog').getByRole('button', { name: part }).click();
  await expect(page.getByRole('region', { name: `Options: ${part}` })).toBeVisible();
}

/** Picks an option and checks that the total moves by exactly the difference that its block showed. */
async function choose(page: Page, part: string, option: RegExp): Promise<void> {
  await turnTo(page, part);
  const before = await readTotal(page);
  const difference = await readDifference(page, option);
  await page.getByRole('radio', { name: option }).click();
  await expect(page.getByRole('radio', { name: option })).toBeChecked();
  await expect.poll(() => readTotal(page)).toBe(before + difference);
}

async function sign(page: Page, name: string, what: 'this agreement' | 'this change order'): Promise<void> {
  await page.getByRole('checkbox', { name: /I have read this and agree/ }).check();
  await page.getByLabel('Your signature').fill(name);
  await page.getByRole('button', { name: `Sign ${what}` }).click();
}

/** Runs the verifier on a book with no server. */
function verify(book: string): { code: number; output: string } {
  const folder = mkdtempSync(path.join(tmpdir(), 'book-'));
  const file = path.join(folder, 'book.json');
  writeFileSync(file, book);
  try {
    const output = execFileSync('npm', ['run', '-s', 'verify-book', '--', file], {
      encoding: 'utf8',
      env: { NODE_ENV: 'test', PATH: process.env.PATH, HOME: process.env.HOME },
    });
    return { code: 0, output };
  } catch (error) {
    const { status, stdout } = error as { status: number; stdout: string };
    return { code: status, output: stdout };
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** Saves the job book from its page and answers the file's text. */
async function saveBook(page: Page): Promise<string> {
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: 'Save the book as a file' }).click(),
  ]);
  return readFileSync(await download.path(), 'utf8');
}

test('A household chooses, signs, pays and changes its mind; the owner approves; the door order follows the sealed pages alone', async ({
  visitor,
}) => {
  test.setTimeout(600_000);
  const mara = await visitor('Mara');
  const teo = await visitor('Teo', { viewport: { width: 390, height: 844 } });
  const rowan = await visitor('Rowan');
  const ines = await visitor('Ines');
  let job = '';

  await test.step('Mara opens the invitation and sees her kitchen with its price', async () => {
    await acceptInvitation(mara, linkIn(await mailTo(MARA.email, 'Your kitchen at Sorrel Lane')), MARA.email);
    await expect(mara.getByRole('heading', { name: 'Sorrel Lane', level: 1 })).toBeVisible();
    job = /jobs\/([0-9a-f-]{36})/.exec(mara.url())?.[1] ?? '';
    await mara.getByRole('link', { name: 'Go on choosing' }).click();
    await mara.waitForURL(/\/choose$/);
    await expect(mara.getByRole('region', { name: 'Your kitchen' })).toBeVisible();
    expect(await readTotal(mara)).toBeGreaterThan(1_000_000);
  });

  await test.step('she changes door style, wood, finish, crown and base; each moves the price by what its block showed', async () => {
    await choose(mara, 'Door style', /^Raised square panel/);
    await choose(mara, 'Wood', /cherry/i);
    await choose(mara, 'Finish', /stain 1/i);
    await choose(mara, 'Base moulding', /^Curved base, 5 in/);
    await turnTo(mara, 'Crown');
    await mara.getByRole('radio', { name: /^None/ }).click();
    await expect(mara.getByText(/filler strips/)).toHaveCount(0);
    await choose(mara, 'Crown', /4 1\/4 in/);
    // A taller crown tight under the ceiling: filler strips, as a fit note and as a priced line (rule C3).
    await expect(mara.getByText(/filler strips/).first()).toBeVisible();
    await mara.getByRole('button', { name: /See why/ }).click();
    await expect(
      mara
        .getByRole('region', { name: 'What the total is made of' })
        .getByText(/filler strip/i)
        .first(),
    ).toBeVisible();
    await mara.keyboard.press('Escape');
    await expect(mara.getByText('Saved', { exact: true })).toBeVisible();
  });
  const signed = await readTotal(mara);

  await test.step('she reviews and signs; the page is not sealed before Teo has signed too', async () => {
    await mara.getByRole('link', { name: 'Review and sign' }).first().click();
    await mara.waitForURL(/\/review/);
    await expect(mara.getByRole('heading', { name: 'Review and sign' })).toBeVisible();
    await sign(mara, MARA.name, 'this agreement');
    await expect(mara.getByText('You have signed')).toBeVisible();
    await expect(mara.getByText(/once Teo Winslade has signed too/)).toBeVisible();
  });

  await test.step('Teo signs on his telephone, and both see the sealed page', async () => {
    await acceptInvitation(teo, linkIn(await mailTo(TEO.email, 'Your kitchen at Sorrel Lane')), TEO.email);
    await teo.goto(paths.review(COMPANY, job));
    await ready(teo);
    await sign(teo, TEO.name, 'this agreement');
    await expect(teo.getByText('Sealed as page 1 of the job book')).toBeVisible();
    await expect(mara.getByText('Sealed as page 1 of the job book')).toBeVisible();
    const mail = await mailTo(TEO.email, 'Page 1 of the job book');
    expect(mail.text).toMatch(/[0-9a-f]{64}/);
  });

  await test.step('the deposit is paid with a test card, posted by the webhook, and a receipt comes', async () => {
    const before = await newestMail();
    await mara.getByRole('link', { name: 'Go to the first payment' }).click();
    await mara.waitForURL(/\/payments$/);
    await mara.getByRole('link', { name: /^Pay payment 1/ }).click();
    await mara.waitForURL(/\/payments\/[0-9a-f-]{36}$/);
    await payByCard(mara, CARD.pays);
    await expect(mara.getByText(/Received on/).first()).toBeVisible();
    await mailTo(MARA.email, 'Payment 1', before);
  });

  await test.step('the door order is the sealed page’s, and not of what is chosen since', async () => {
    await signInByPassword(rowan, {
      company: COMPANY,
      email: 'rowan@ternhollow.example',
      password: PASSWORD,
    });
    await expect(
      rowan.getByRole('row', { name: /Sorrel Lane/ }).getByText('Signed', { exact: true }),
    ).toBeVisible();
    await rowan.getByRole('link', { name: 'Sorrel Lane' }).click();
    await rowan.waitForURL(/\/desk\/jobs\/[0-9a-f-]{36}$/);
    await rowan.getByRole('link', { name: 'Door order' }).click();
    await rowan.waitForURL(/\/door-order$/);
    await expect(rowan.getByText('Page 1 of the job book')).toBeVisible();
    const rows = await rowan.getByRole('row').allInnerTexts();
    expect(rows.length).toBeGreaterThan(31);
    expect(rows.slice(1).every((row) => /Raised square panel/.test(row) && /cherry/i.test(row))).toBe(true);
  });

  await test.step('after signing, another finish is a change order against the signed sum', async () => {
    await mara.goto(paths.choose(COMPANY, job));
    await ready(mara);
    expect(await readTotal(mara)).toBe(signed);
    await turnTo(mara, 'Finish');
    const difference = await readDifference(mara, /^Clear/);
    await mara.getByRole('radio', { name: /^Clear/ }).click();
    await expect.poll(() => readTotal(mara)).toBe(signed + difference);
    await expect(mara.getByText('Saved', { exact: true })).toBeVisible();
    await mara.getByRole('button', { name: 'Ask for this change' }).first().click();
    await mara.getByRole('dialog').getByRole('textbox').fill('We would like it darker.');
    await mara.getByRole('button', { name: 'Prepare the change order' }).click();
    await mara.waitForURL(/\/changes\/[0-9a-f-]{36}$/);
    await ready(mara);
    await sign(mara, MARA.name, 'this change order');
    await teo.goto(new URL(mara.url()).pathname);
    await ready(teo);
    await sign(teo, TEO.name, 'this change order');
    await expect(teo.getByText(/The contractor decides next/)).toBeVisible();

    // The shop still has page 1 alone.
    await rowan.reload();
    await expect(rowan.getByText('Page 1 of the job book')).toBeVisible();

    await signInByPassword(ines, { company: COMPANY, email: 'ines@ternhollow.example', password: PASSWORD });
    await ines.getByRole('link', { name: 'Approvals' }).click();
    await ines.waitForURL(/\/approvals$/);
    const order = ines.getByRole('listitem').filter({ hasText: 'Sorrel Lane' });
    await expect(order.getByText('Margin after')).toBeVisible();
    await order.getByRole('button', { name: 'Approve and seal' }).click();
    await expect(order).toHaveCount(0);
    await expect(mara.getByText('Sealed as page 2 of the job book')).toBeVisible();

    await mara.getByRole('link', { name: 'See the payments' }).click();
    await mara.waitForURL(/\/payments$/);
    const dollars = ((signed + difference) / 100).toLocaleString('en-US', {
      style: 'currency',
      currency: 'USD',
    });
    await expect(mara.getByText(dollars).first()).toBeVisible();
  });

  await test.step('the door order follows page 2 and says what changed', async () => {
    await rowan.reload();
    await expect(rowan.getByText('Page 2 of the job book')).toBeVisible();
    await expect(rowan.getByText('Against page 1')).toBeVisible();
  });

  await test.step('Rowan opens the same room view from the desk', async () => {
    await rowan.goto(paths.deskRoom(COMPANY, job));
    await ready(rowan);
    await expect(rowan.getByRole('region', { name: 'Your kitchen' })).toBeVisible();
  });

  await test.step('the book verifies with no server, and a changed one is found out by page and field', async () => {
    await mara.goto(paths.book(COMPANY, job));
    await ready(mara);
    const book = await saveBook(mara);
    expect(verify(book)).toMatchObject({ code: 0, output: expect.stringContaining('Page 2: holds.') });
    const cheaper = JSON.parse(book) as { pages: { offer: string }[] };
    const [first] = cheaper.pages;
    if (!first) throw new Error('The book is empty.');
    first.offer = first.offer.replace(/"totalCents":(\d+)/, '"totalCents":1');
    const verdict = verify(JSON.stringify(cheaper));
    expect(verdict.code).toBe(1);
    expect(verdict.output).toContain('Page 1, envelope.offerSha256');
    expect(verdict.output).toContain('Page 1, offer.totalCents');
    expect(stack.web).toContain('localhost');
  });
});
