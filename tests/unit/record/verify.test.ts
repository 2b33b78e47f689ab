import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { OfferBody } from '@/lib/contracts/offer';
import type { BookFile, PageEnvelope } from '@/lib/contracts/page';
import { canonicalJson } from '@/lib/record/canonical';
import { sha256Hex } from '@/lib/record/hash';
import { sealPage } from '@/lib/record/seal';
import { consentText, noticeText, verifyBook } from '@/lib/record/verify';

const JOB = '5f0b6f5e-6a3a-4c58-9d3e-0c6c2f1c9a01';
const MARA = '5f0b6f5e-6a3a-4c58-9d3e-0c6c2f1c9a02';
const TEO = '5f0b6f5e-6a3a-4c58-9d3e-0c6c2f1c9a03';
const ZERO = '0'.repeat(64);

/** A body of one line over a total, in the arithmetic of a standard change-order form. */
async function body(
  kind: OfferBody['kind'],
  number: number,
  original: number,
  before: number,
  amount: number,
): Promise<OfferBody> {
  const after = before + amount;
  const notice = { title: 'Notice', text: 'Text.', source: 'Source.' };
  const consent = { title: 'Consent', paragraphs: ['One.', 'Two.'] };
  return {
    version: 1,
    kind,
    company: { name: 'Tern Hollow', phone: '1', licence: null },
    job: { id: JOB, number: 1, name: 'Sorrel Lane', address: '14 Sorrel Lane' },
    survey: { sha256: ZERO },
    edition: { number: 1, title: 'First', sha256: ZERO },
    order: kind === 'changeOrder' ? { number, basedOn: number } : null,
    reason: null,
    scope: [],
    choices: {
      version: 1,
      kitchen: {
        style: 'a',
        species: 'b',
        finish: 'c',
        overlay: 'd',
        pull: 'e',
        crown: 'f',
        base: 'g',
        lightRail: 'h',
        ends: 'i',
        drawerBox: 'j',
        counter: 'k',
      },
      zones: {},
      inside: {},
    },
    choicesNamed: [],
    fronts: [],
    parts: [],
    lines: [
      {
        code: 'fronts.wall',
        label: 'Doors',
        zone: 'wall',
        quantity: 1,
        quantityText: '1',
        unitPriceCents: after,
        amountCents: after,
        parts: [],
        because: '',
      },
    ],
    subtotalCents: after,
    discountCents: 0,
    taxCents: 0,
    totalCents: after,
    sum: {
      originalCents: original,
      previousOrdersCents: before === 0 ? 0 : before - original,
      beforeCents: before,
      thisPageCents: amount,
      afterCents: after,
    },
    schedule: [{ number: 1, label: 'All', due: 'signing', dueText: '', amountCents: after }],
    fitNotes: [],
    stays: [],
    responsibilities: [],
    place: { sale: 'Home', language: 'English' },
    preparedOn: '2026-12-01',
    dates: [],
    notices: [{ code: 'n', ...notice, sha256: await sha256Hex(noticeText(notice)) }],
    consent: { ...consent, sha256: await sha256Hex(consentText(consent)) },
    requiredSigners: [
      { personId: MARA, name: 'Mara', role: 'homeowner' },
      { personId: TEO, name: 'Teo', role: 'homeowner' },
    ],
  };
}

/** A book of these bodies, all signed by both. */
async function bind(bodies: readonly OfferBody[]): Promise<BookFile> {
  const pages: BookFile['pages'] = [];
  for (const [index, one] of bodies.entries()) {
    const offer = canonicalJson(one);
    const offerSha256 = await sha256Hex(offer);
    const envelope: PageEnvelope = {
      version: 1,
      job: JOB,
      sequence: index + 1,
      kind: one.kind,
      previousSha256: pages[index - 1]?.sha256 ?? null,
      offerSha256,
      signatures: one.requiredSigners.map((signer, order) => ({
        personId: signer.personId,
        name: signer.name,
        role: 'homeowner',
        offerSha256,
        consentSha256: one.consent.sha256,
        means: { kind: 'typed', text: signer.name },
        signedAt: `2026-12-0${index + 1}T10:0${order}:00.000Z`,
      })),
      sealedAt: `2026-12-0${index + 1}T10:30:00.000Z`,
    };
    const sealed = await sealPage(envelope);
    pages.push({ sequence: index + 1, sha256: sealed.sha256, envelope: sealed.text, offer });
  }
  return { format: 'job-book', version: 1, company: 'Tern Hollow', job: JOB, jobName: 'Sorrel Lane', pages };
}

let book: BookFile;
const copy = (): BookFile => JSON.parse(JSON.stringify(book)) as BookFile;

beforeAll(async () => {
  // AIA G701, worked example: 18,750.00 − 425.00 = 18,325.00; + 1,260.00 = 19,585.00.
  book = await bind([
    await body('agreement', 0, 1_875_000, 0, 1_875_000),
    await body('changeOrder', 1, 1_875_000, 1_875_000, -42_500),
    await body('changeOrder', 2, 1_875_000, 1_832_500, 126_000),
  ]);
});

const page = (of: BookFile, index: number) => {
  const found = of.pages[index];
  if (!found) throw new Error(`The book has no page ${index + 1}.`);
  return found;
};

describe('R3 the verifier', () => {
  it('passes a book whose sums run as the standard form’s example', async () => {
    const verdict = await verifyBook(book);
    expect(verdict).toMatchObject({ ok: true, pages: 3, findings: [] });
    expect(verdict.seal).toBe(page(book, 2).sha256);
    expect((JSON.parse(page(book, 2).offer) as OfferBody).sum.afterCents).toBe(1_958_500);
  });

  it('finds any character that was changed, on its page or the next one that names it', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.nat(2),
        fc.constantFrom('envelope', 'offer', 'sha256'),
        fc.nat(),
        fc.string({ minLength: 1, maxLength: 1 }),
        async (index, field, at, letter) => {
          const changed = copy();
          const own = page(changed, index);
          const text = own[field];
          const place = at % text.length;
          fc.pre(text[place] !== letter);
          own[field] = text.slice(0, place) + letter + text.slice(place + 1);
          const verdict = await verifyBook(changed);
          expect(verdict.ok).toBe(false);
          expect(verdict.findings.some((finding) => finding.page === index + 1)).toBe(true);
        },
      ),
      { numRuns: 300 },
    );
  });

  it('finds pages that were swapped, left out, doubled or moved to another job', async () => {
    const [one, two, three] = [page(book, 0), page(book, 1), page(book, 2)];
    for (const pages of [[two, one, three], [one, three], [one, one, two, three], [two, three], []]) {
      expect((await verifyBook({ ...book, pages })).ok, pages.map((each) => each.sequence).join()).toBe(
        false,
      );
    }
    expect((await verifyBook({ ...book, job: MARA })).findings[0]).toMatchObject({ page: 1 });
  });

  it('finds a page that nobody could have agreed to, although all of its hashes are right', async () => {
    const wrong = await body('changeOrder', 1, 1_875_000, 1_875_000, -42_500);
    const first = await body('agreement', 0, 1_875_000, 0, 1_875_000);
    const bad: [string, OfferBody][] = [
      ['offer.sum.afterCents', { ...wrong, sum: { ...wrong.sum, afterCents: 1 } }],
      ['offer.sum.beforeCents', { ...wrong, sum: { ...wrong.sum, beforeCents: 5, originalCents: 5 } }],
      ['offer.totalCents', { ...wrong, totalCents: wrong.totalCents + 1 }],
      ['offer.subtotalCents', { ...wrong, lines: [] }],
      ['offer.schedule', { ...wrong, schedule: [] }],
      ['offer.consent.sha256', { ...wrong, consent: { ...wrong.consent, title: 'Other' } }],
    ];
    for (const [field, second] of bad) {
      const verdict = await verifyBook(await bind([first, second]));
      expect(verdict.findings, field).toContainEqual(expect.objectContaining({ page: 2, field }));
    }
  });

  it('finds a required signer who has not signed', async () => {
    const agreement = await body('agreement', 0, 1_875_000, 0, 1_875_000);
    const alone = await bind([agreement]);
    const own = page(alone, 0);
    const envelope = JSON.parse(own.envelope) as PageEnvelope;
    const sealed = await sealPage({ ...envelope, signatures: envelope.signatures.slice(0, 1) });
    own.envelope = sealed.text;
    own.sha256 = sealed.sha256;
    expect((await verifyBook(alone)).findings).toEqual([
      { page: 1, field: 'envelope.signatures', message: 'Teo has not signed once.' },
    ]);
  });

  it('never throws, whatever it is given', async () => {
    await fc.assert(
      fc.asyncProperty(fc.anything(), async (input) => {
        expect((await verifyBook(input)).ok).toBe(false);
      }),
    );
  });
});

describe('R3 the command', () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'book-'));
  afterAll(() => rmSync(folder, { recursive: true }));
  const run = (text: string) => {
    const file = path.join(folder, 'book.json');
    writeFileSync(file, text);
    return spawnSync(process.execPath, ['--import', 'tsx', 'lib/cli/verify-book.ts', file], {
      encoding: 'utf8',
    });
  };

  it('answers 0 for a book that holds, 1 with page and field for one that does not, 2 for no book', () => {
    expect(run(JSON.stringify(book))).toMatchObject({
      status: 0,
      stdout: expect.stringContaining('Page 3: holds.'),
    });
    const changed = copy();
    page(changed, 1).offer = page(changed, 1).offer.replace('-42500', '-42501');
    const verdict = run(JSON.stringify(changed));
    expect(verdict.status).toBe(1);
    expect(verdict.stdout).toContain('Page 2, envelope.offerSha256');
    expect(run('not json').status).toBe(2);
  }, 60_000);
});
