import { and, eq } from 'drizzle-orm';
import postgres from 'postgres';
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { closePool, withScope } from '@/db/client';
import { draws, guests, jobs, ledger, pages, signatures } from '@/db/schema';
import * as queue from '@/lib/adapters/queue';
import type { Guest } from '@/lib/contracts/actor';
import type { OfferView } from '@/lib/contracts/offer';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { verifyBook } from '@/lib/record/verify';
import { sendInvitation } from '@/lib/services/invitation/send';
import { prepareOffer } from '@/lib/services/offer/prepare';
import { readOffer } from '@/lib/services/offer/read';
import { exportBook } from '@/lib/services/page/export';
import { listPages } from '@/lib/services/page/list';
import { readDoorOrder } from '@/lib/services/shop/door-order';
import { signOffer } from '@/lib/services/signature/sign';
import { addHousehold, codeOf, valueOf, type Contractor } from './scene';
import {
  addSale,
  addSeller,
  choose,
  prepare,
  sealAgreement,
  sign,
  signatureOf,
  to,
  type Sale,
} from './signing-scene';

let database: TestDatabase;
let tern: Contractor;
let quill: Contractor;
let sale: Sale;

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addSeller('tern-hollow');
  quill = await addSeller('quillback');
});
beforeEach(async () => {
  sale = await addSale(tern);
});
afterAll(async () => {
  await closePool();
  await database.drop();
});

/** What the job's tables hold. */
async function held(of: Sale) {
  const { companyId, worker } = of.contractor;
  return withScope(worker, async (tx) => ({
    signatures: await tx
      .select()
      .from(signatures)
      .where(and(eq(signatures.companyId, companyId), eq(signatures.jobId, of.jobId))),
    pages: await tx
      .select()
      .from(pages)
      .where(and(eq(pages.companyId, companyId), eq(pages.jobId, of.jobId))),
    ledger: await tx
      .select()
      .from(ledger)
      .where(and(eq(ledger.companyId, companyId), eq(ledger.jobId, of.jobId))),
    draws: await tx
      .select()
      .from(draws)
      .where(and(eq(draws.companyId, companyId), eq(draws.jobId, of.jobId))),
    stage: (await tx.query.jobs.findFirst({ where: eq(jobs.id, of.jobId) }))?.stage,
  }));
}

describe('an agreement', () => {
  it.each([
    ['the first, then the second', (of: Sale) => [of.guest, of.second]],
    ['the second, then the first', (of: Sale) => [of.second, of.guest]],
  ] as const)('is sealed by the last signature, whoever gives it: %s', async (_name, order) => {
    const offer = await prepare(sale);
    const [one, other] = order(sale) as [Guest, Guest];
    const half = valueOf(await sign(one, offer));
    expect(half.state).toBe('current');
    expect(half.missing.map((missing) => missing.personId)).toEqual([other.personId]);
    expect((await held(sale)).pages).toEqual([]);
    const whole = valueOf(await sign(other, offer));
    expect(whole).toMatchObject({ state: 'sealed', sealedSequence: 1, missing: [] });
    const now = await held(sale);
    expect(now.stage).toBe('signed');
    expect(now.ledger.map((entry) => [entry.kind, entry.amountCents])).toEqual([
      ['agreement', offer.body.totalCents],
    ]);
  });

  it('brings payments that add up to the total, the first within a third (Massachusetts General Laws chapter 142A)', async () => {
    const { body } = await sealAgreement(sale);
    const { draws: rows } = await held(sale);
    expect(rows.reduce((sum, draw) => sum + draw.amountCents, 0)).toBe(body.totalCents);
    const first = rows.find((draw) => draw.number === 1);
    expect(first?.state).toBe('due');
    expect((first?.amountCents ?? 0) * 3).toBeLessThanOrEqual(body.totalCents);
    expect(rows.filter((draw) => draw.state === 'planned')).toHaveLength(3);
  });

  it('needs the signature of somebody who was invited to sign and has not come yet', async () => {
    const other = await addSale(tern);
    await withScope(tern.worker, (tx) =>
      tx
        .update(guests)
        .set({ revokedAt: new Date() })
        .where(and(eq(guests.companyId, tern.companyId), eq(guests.personId, other.second.personId))),
    );
    valueOf(
      await sendInvitation(tern.seller, {
        jobId: other.jobId,
        email: 'late.comer@household.example',
        name: 'Late Comer',
        signer: true,
      }),
    );
    const offer = await prepare(other);
    expect(offer.body.requiredSigners.map((signer) => signer.name)).toContain('Late Comer');
    expect(valueOf(await sign(other.guest, offer)).state).toBe('current');
    expect((await held(other)).pages).toEqual([]);
  });

  it('is the same offer as long as nothing moves, and is not prepared when it is sealed', async () => {
    const first = await prepare(sale);
    expect((await prepare(sale)).id).toBe(first.id);
    await sealAgreement(sale);
    expect(codeOf(await prepareOffer(sale.guest, { jobId: sale.jobId, schemeId: sale.scheme.id }))).toBe(
      'conflict',
    );
  });
});

describe('a signature', () => {
  it('is refused to staff, to another household, to another company and to a guest who does not sign, and nothing is stored', async () => {
    const offer = await prepare(sale);
    const stranger = await addHousehold(tern);
    const foreign = await addSale(quill);
    const onlooker: Guest = { ...(await addHousehold(tern)).guest, jobId: sale.jobId, signer: false };
    expect(codeOf(await signOffer(tern.owner, signatureOf(offer, sale.jobId)))).toBe('notAllowed');
    expect(codeOf(await signOffer(tern.seller, signatureOf(offer, sale.jobId)))).toBe('notAllowed');
    expect(codeOf(await signOffer(stranger.guest, signatureOf(offer, sale.jobId)))).toBe('notFound');
    expect(codeOf(await signOffer(foreign.guest, signatureOf(offer, sale.jobId)))).toBe('notFound');
    expect(codeOf(await signOffer(foreign.guest, signatureOf(offer, foreign.jobId)))).toBe('notFound');
    expect(codeOf(await signOffer(onlooker, signatureOf(offer, sale.jobId)))).toBe('notAllowed');
    expect((await held(sale)).signatures).toEqual([]);
  });

  it('is refused for another text, another consent, no consent or no name', async () => {
    const offer = await prepare(sale);
    const good = signatureOf(offer, sale.jobId);
    const other = 'a'.repeat(64);
    expect(codeOf(await signOffer(sale.guest, { ...good, sha256: other }))).toBe('moved');
    expect(codeOf(await signOffer(sale.guest, { ...good, consent: { accepted: true, sha256: other } }))).toBe(
      'moved',
    );
    expect(
      codeOf(await signOffer(sale.guest, { ...good, consent: { ...good.consent, accepted: false } })),
    ).toBe('invalid');
    expect(codeOf(await signOffer(sale.guest, { ...good, means: { kind: 'typed', text: ' ' } }))).toBe(
      'invalid',
    );
    expect(codeOf(await signOffer(sale.guest, null))).toBe('invalid');
    expect((await held(sale)).signatures).toEqual([]);
  });

  it('given under an offer that moved is not taken: the signer is shown what changed, and both sign anew', async () => {
    const offer = await prepare(sale);
    valueOf(await sign(sale.guest, offer));
    await choose(sale, to('paint-3'));
    const answer = await sign(sale.second, offer);
    expect(answer.ok).toBe(false);
    if (answer.ok) return;
    expect(answer.fault.code).toBe('moved');
    const { offer: next } = answer.fault.detail as { offer: OfferView };
    expect(next.id).not.toBe(offer.id);
    expect(next.differences.map((one) => one.text)).toContain('Finish: Paint 3, linen instead of Clear.');
    const amounts = next.differences.reduce((sum, one) => sum + (one.amountCents ?? 0), 0);
    expect(amounts).toBe(next.body.totalCents - offer.body.totalCents);
    expect(next.signatures).toEqual([]);
    expect((await held(sale)).pages).toEqual([]);
    expect(valueOf(await readOffer(sale.guest, { jobId: sale.jobId, offerId: offer.id }))).toMatchObject({
      state: 'replaced',
      replacedBy: next.id,
    });
    valueOf(await sign(sale.second, next));
    expect(valueOf(await sign(sale.guest, next))).toMatchObject({ state: 'sealed' });
  });

  it('given fifty times at once by both makes one page, one ledger entry and one set of payments', async () => {
    const offer = await prepare(sale);
    const answers = await Promise.all(
      Array.from({ length: 50 }, (_, i) => sign(i % 2 === 0 ? sale.guest : sale.second, offer)),
    );
    expect(answers.every((answer) => answer.ok)).toBe(true);
    const now = await held(sale);
    expect(now.pages).toHaveLength(1);
    expect(now.signatures).toHaveLength(2);
    expect(now.ledger).toHaveLength(1);
    expect(now.draws).toHaveLength(4);
  });

  it('leaves nothing when something breaks on the way to the seal', async () => {
    const offer = await prepare(sale);
    valueOf(await sign(sale.guest, offer));
    const broken = vi.spyOn(queue, 'enqueue').mockRejectedValueOnce(new Error('the queue is away'));
    await expect(sign(sale.second, offer)).rejects.toThrow('the queue is away');
    broken.mockRestore();
    const now = await held(sale);
    expect([now.pages, now.ledger, now.draws]).toEqual([[], [], []]);
    expect(now.signatures).toHaveLength(1);
    expect(now.stage).toBe('choosing');
    expect(valueOf(await sign(sale.second, offer)).state).toBe('sealed');
  });
});

describe('a job book', () => {
  it('holds when it is exported, and is for its own household and staff alone', async () => {
    await sealAgreement(sale);
    const book = valueOf(await exportBook(sale.guest, { jobId: sale.jobId }));
    expect(await verifyBook(JSON.parse(JSON.stringify(book)))).toMatchObject({
      ok: true,
      pages: 1,
      findings: [],
    });
    expect(valueOf(await listPages(tern.seller, { jobId: sale.jobId }))).toHaveLength(1);
    const stranger = await addHousehold(tern);
    for (const actor of [stranger.guest, quill.owner]) {
      expect(codeOf(await exportBook(actor, { jobId: sale.jobId }))).toBe('notFound');
      expect(codeOf(await listPages(actor, { jobId: sale.jobId }))).toBe('notFound');
    }
  });

  it('changed in the database by whoever owns it, guards taken off, is found out, by page and field', async () => {
    await sealAgreement(sale);
    const sql = postgres(database.ownerUrl);
    try {
      await sql.begin(async (tx) => {
        await tx`alter table offers disable trigger user`;
        await tx`alter table offers no force row level security`;
        const changed =
          await tx`update offers set body = replace(body, '"totalCents":', '"totalCents":1') where job_id = ${sale.jobId}`;
        expect(changed.count).toBe(1);
        await tx`alter table offers force row level security`;
        await tx`alter table offers enable trigger user`;
      });
    } finally {
      await sql.end();
    }
    const verdict = await verifyBook(valueOf(await exportBook(tern.owner, { jobId: sale.jobId })));
    expect(verdict.ok).toBe(false);
    expect(verdict.findings).toContainEqual(
      expect.objectContaining({ page: 1, field: 'envelope.offerSha256' }),
    );
    expect(verdict.findings).toContainEqual(expect.objectContaining({ page: 1, field: 'offer.totalCents' }));
  });
});

describe('the door order', () => {
  it('is refused before anything is sealed, and to a homeowner always', async () => {
    expect(codeOf(await readDoorOrder(tern.seller, { jobId: sale.jobId }))).toBe('conflict');
    await sealAgreement(sale);
    expect(codeOf(await readDoorOrder(sale.guest, { jobId: sale.jobId }))).toBe('notAllowed');
    expect(codeOf(await readDoorOrder(quill.owner, { jobId: sale.jobId }))).toBe('notFound');
  });

  it('is the sealed page’s and does not follow what is chosen afterwards', async () => {
    const { body } = await sealAgreement(sale);
    const before = valueOf(await readDoorOrder(tern.seller, { jobId: sale.jobId }));
    expect(before.rows).toEqual(body.fronts);
    // 15 × 27 at half-inch overlay is a door of 16 × 28 (rule O1; a door supplier's published measuring guide).
    expect(before.rows).toMatchObject([{ mark: 'N-01-1', width: 16 * 64, height: 28 * 64, hinge: 'left' }]);
    await choose(sale, to('paint-3'));
    expect(valueOf(await readDoorOrder(tern.seller, { jobId: sale.jobId }))).toEqual(before);
  });
});
