import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { closePool, withScope } from '@/db/client';
import { changeOrders, draws, jobs, ledger, pages } from '@/db/schema';
import type { OfferView } from '@/lib/contracts/offer';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { verifyBook } from '@/lib/record/verify';
import { listApprovals } from '@/lib/services/approval/list';
import { decideChangeOrder } from '@/lib/services/change-order/decide';
import { listChangeOrders } from '@/lib/services/change-order/list';
import { readChangeOrder } from '@/lib/services/change-order/read';
import { startChangeOrder } from '@/lib/services/change-order/start';
import { withdrawChangeOrder } from '@/lib/services/change-order/withdraw';
import { exportBook } from '@/lib/services/page/export';
import { readDoorOrder } from '@/lib/services/shop/door-order';
import { addHousehold, codeOf, valueOf, type Contractor } from './scene';
import { addSale, addSeller, choose, sealAgreement, sign, to, type Sale } from './signing-scene';

let database: TestDatabase;
let tern: Contractor;
let quill: Contractor;
let sale: Sale;
let agreed: OfferView;

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addSeller('tern-hollow');
  quill = await addSeller('quillback');
});
beforeEach(async () => {
  sale = await addSale(tern);
  agreed = await sealAgreement(sale);
});
afterAll(async () => {
  await closePool();
  await database.drop();
});

/** Asks for another finish, as the household does after signing. */
async function ask(of: Sale, option = 'paint-3'): Promise<{ sale: Sale; orderId: string }> {
  const changed = await choose(of, to(option));
  const { jobId, scheme, guest } = changed;
  const { id } = valueOf(
    await startChangeOrder(guest, { jobId, schemeId: scheme.id, reason: 'We would like paint.' }),
  );
  return { sale: changed, orderId: id };
}

const offerOf = async (of: Sale, orderId: string): Promise<OfferView> =>
  valueOf(await readChangeOrder(of.guest, { jobId: of.jobId, orderId })).offer;

/** Both of the household sign an order. */
async function signOrder(of: Sale, orderId: string): Promise<void> {
  const offer = await offerOf(of, orderId);
  valueOf(await sign(of.guest, offer));
  valueOf(await sign(of.second, offer));
}

const decide = (of: Sale, orderId: string, decision: 'approve' | 'decline', reason = '', by = tern.owner) =>
  decideChangeOrder(by, { jobId: of.jobId, orderId, decision, reason });

async function held(of: Sale) {
  const { companyId, worker } = tern;
  return withScope(worker, async (tx) => ({
    orders: await tx
      .select()
      .from(changeOrders)
      .where(and(eq(changeOrders.companyId, companyId), eq(changeOrders.jobId, of.jobId))),
    pages: await tx
      .select()
      .from(pages)
      .where(and(eq(pages.companyId, companyId), eq(pages.jobId, of.jobId))),
    ledger: await tx
      .select()
      .from(ledger)
      .where(and(eq(ledger.companyId, companyId), eq(ledger.jobId, of.jobId))),
    draws: (
      await tx
        .select()
        .from(draws)
        .where(and(eq(draws.companyId, companyId), eq(draws.jobId, of.jobId)))
    ).sort((a, b) => a.number - b.number),
  }));
}

describe('a change order', () => {
  it('is not started before anything is signed, nor for what is signed already', async () => {
    const fresh = await addSale(tern);
    const early = { jobId: fresh.jobId, schemeId: fresh.scheme.id, reason: 'Paint, please.' };
    expect(codeOf(await startChangeOrder(fresh.guest, early))).toBe('conflict');
    const same = { jobId: sale.jobId, schemeId: sale.scheme.id, reason: 'The same again.' };
    expect(codeOf(await startChangeOrder(sale.guest, same))).toBe('conflict');
    expect(codeOf(await startChangeOrder(sale.guest, { ...same, reason: '' }))).toBe('invalid');
    expect((await held(sale)).orders).toEqual([]);
  });

  it('signed by the household and approved by the owner becomes page 2; the sum and the payments that are not due follow', async () => {
    const before = await held(sale);
    const { sale: changed, orderId } = await ask(sale);
    const offer = await offerOf(changed, orderId);
    const { sum } = offer.body;
    expect(offer.body.scope[0]).toBe('Finish: Paint 3, linen instead of Clear.');
    // Contract arithmetic as on the standard form (AIA G701, rule M7): before + this order = new sum.
    expect(sum).toMatchObject({
      originalCents: agreed.body.totalCents,
      previousOrdersCents: 0,
      beforeCents: agreed.body.totalCents,
      afterCents: agreed.body.totalCents + sum.thisPageCents,
    });
    await signOrder(changed, orderId);
    expect((await held(sale)).pages).toHaveLength(1);
    expect(valueOf(await listApprovals(tern.owner))).toContainEqual(
      expect.objectContaining({ id: orderId, amountCents: sum.thisPageCents, margin: expect.anything() }),
    );
    expect(valueOf(await decide(changed, orderId, 'approve')).state).toBe('approved');

    const after = await held(sale);
    expect(after.pages.map((page) => [page.sequence, page.kind])).toEqual([
      [1, 'agreement'],
      [2, 'changeOrder'],
    ]);
    expect(after.ledger.reduce((total, entry) => total + entry.amountCents, 0)).toBe(sum.afterCents);
    expect(after.draws.reduce((total, draw) => total + draw.amountCents, 0)).toBe(sum.afterCents);
    expect(after.draws[0]?.amountCents).toBe(before.draws[0]?.amountCents);
    const book = valueOf(await exportBook(sale.guest, { jobId: sale.jobId }));
    expect(await verifyBook(book)).toMatchObject({ ok: true, pages: 2, findings: [] });
    const order = valueOf(await readDoorOrder(tern.seller, { jobId: sale.jobId }));
    expect(order).toMatchObject({ page: 2, since: { page: 1, changed: ['N-01-1'], added: [], removed: [] } });
  });

  it('is decided by the owner alone, once, and only when the household has signed', async () => {
    const { sale: changed, orderId } = await ask(sale);
    expect(codeOf(await decide(changed, orderId, 'approve'))).toBe('conflict');
    await signOrder(changed, orderId);
    for (const by of [tern.seller])
      expect(codeOf(await decide(changed, orderId, 'approve', '', by))).toBe('notAllowed');
    expect(
      codeOf(await decideChangeOrder(changed.guest, { jobId: changed.jobId, orderId, decision: 'approve' })),
    ).toBe('notAllowed');
    expect(codeOf(await decide(changed, orderId, 'approve', '', quill.owner))).toBe('notFound');
    const codes = await Promise.all(
      Array.from({ length: 6 }, async () => codeOf(await decide(changed, orderId, 'approve'))),
    );
    expect(codes.filter((code) => code === 'ok')).toHaveLength(1);
    expect(codes.filter((code) => code === 'conflict')).toHaveLength(5);
    expect((await held(sale)).pages).toHaveLength(2);
  });

  it('declined needs a reason, tells the household and leaves no trace in the sum', async () => {
    const { sale: changed, orderId } = await ask(sale);
    await signOrder(changed, orderId);
    expect(codeOf(await decide(changed, orderId, 'decline'))).toBe('invalid');
    const row = valueOf(await decide(changed, orderId, 'decline', 'This paint is not to be had.'));
    expect(row).toMatchObject({ state: 'declined', decisionReason: 'This paint is not to be had.' });
    const after = await held(sale);
    expect(after.pages).toHaveLength(1);
    expect(after.ledger).toHaveLength(1);
    expect(codeOf(await decide(changed, orderId, 'approve'))).toBe('conflict');
    expect(codeOf(await sign(changed.guest, await offerOf(changed, orderId)))).toBe('ok');
    expect((await held(sale)).pages).toHaveLength(1);
  });

  it('is taken back by the side that asked, and cannot be signed then', async () => {
    const { sale: changed, orderId } = await ask(sale);
    const offer = await offerOf(changed, orderId);
    const reference = { jobId: changed.jobId, orderId };
    expect(codeOf(await withdrawChangeOrder(tern.owner, reference))).toBe('notAllowed');
    expect(valueOf(await withdrawChangeOrder(changed.second, reference)).state).toBe('withdrawn');
    expect(valueOf(await withdrawChangeOrder(changed.guest, reference)).state).toBe('withdrawn');
    expect(codeOf(await sign(changed.guest, offer))).toBe('conflict');
    expect(codeOf(await decide(changed, orderId, 'approve'))).toBe('conflict');
  });

  it('goes back to be signed anew when another page was sealed in between', async () => {
    const first = await ask(sale);
    const second = await choose(await choose(first.sale, to('clear')), to('oak', 'species'));
    const { id: secondId } = valueOf(
      await startChangeOrder(second.guest, {
        jobId: second.jobId,
        schemeId: second.scheme.id,
        reason: 'Or rather oak.',
      }),
    );
    await signOrder(first.sale, first.orderId);
    await signOrder(second, secondId);
    const early = await offerOf(second, secondId);
    expect(codeOf(await decide(first.sale, first.orderId, 'approve'))).toBe('ok');
    expect(codeOf(await decide(second, secondId, 'approve'))).toBe('moved');
    const moved = valueOf(await readChangeOrder(second.guest, { jobId: second.jobId, orderId: secondId }));
    expect(moved.state).toBe('offered');
    expect(moved.offer.id).not.toBe(early.id);
    expect(moved.offer.signatures).toEqual([]);
    expect(moved.offer.body.order).toMatchObject({ basedOn: 2 });
    await signOrder(second, secondId);
    expect(codeOf(await decide(second, secondId, 'approve'))).toBe('ok');
    const book = valueOf(await exportBook(sale.guest, { jobId: sale.jobId }));
    expect(await verifyBook(book)).toMatchObject({ ok: true, pages: 3 });
  });

  it('after the release to the shop charges what is ordered and no longer wanted', async () => {
    await withScope(tern.worker, (tx) =>
      tx
        .update(jobs)
        .set({ stage: 'released' })
        .where(and(eq(jobs.companyId, tern.companyId), eq(jobs.id, sale.jobId))),
    );
    const { sale: changed, orderId } = await ask(sale);
    const { body } = await offerOf(changed, orderId);
    expect(body.scope.some((line) => line.startsWith('Already ordered and no longer wanted: N-01-1.'))).toBe(
      true,
    );
    expect(body.sum.thisPageCents).toBeGreaterThan(body.totalCents - agreed.body.totalCents);
  });

  it('of a salesperson stays within the limit the owner set', async () => {
    const changed = await choose(sale, to('paint-3'));
    const input = {
      jobId: sale.jobId,
      schemeId: changed.scheme.id,
      reason: 'The finish is out of production.',
    };
    // Painting one door of 16 × 28 costs more than the five dollars of this scene.
    expect(codeOf(await startChangeOrder(tern.seller, input))).toBe('notAllowed');
    expect((await held(sale)).orders).toEqual([]);
    const { id } = valueOf(await startChangeOrder(tern.owner, input));
    expect((await held(sale)).orders).toMatchObject([{ id, startedBy: 'contractor', state: 'offered' }]);
  });

  it('is not found by another household or another company, whatever they try', async () => {
    const { sale: changed, orderId } = await ask(sale);
    const stranger = await addHousehold(tern);
    const reference = { jobId: changed.jobId, orderId };
    const start = { jobId: changed.jobId, schemeId: changed.scheme.id, reason: 'Let me in.' };
    for (const actor of [stranger.guest, quill.owner, quill.seller]) {
      expect(codeOf(await readChangeOrder(actor, reference))).toBe('notFound');
      expect(codeOf(await listChangeOrders(actor, { jobId: changed.jobId }))).toBe('notFound');
      expect(codeOf(await startChangeOrder(actor, start))).toBe('notFound');
      expect(codeOf(await withdrawChangeOrder(actor, reference))).toBe('notFound');
    }
    expect(valueOf(await listApprovals(quill.owner))).toEqual([]);
    expect(codeOf(await listApprovals(tern.seller))).toBe('notAllowed');
    expect(codeOf(await readChangeOrder(changed.guest, { jobId: 'x', orderId: 'y' }))).toBe('notFound');
  });
});
