import { closePool, withScope } from '@/db/client';
import { paths } from '@/lib/paths';
import { expect, stack, test } from './base';
import { newHousehold, salesperson } from './household';
import { signInService } from './sign-in';

test.afterAll(() => closePool());

const COMPANY = 'tern-hollow';

/** Every address of a job, with the methods it takes. Keys are those of `paths`, so that none is forgotten. */
function addressesOf(ids: {
  job: string;
  scheme: string;
  offer: string;
  draw: string;
  order: string;
  invitation: string;
}): {
  pages: Record<string, string>;
  api: Record<string, readonly [string, readonly string[]]>;
} {
  const { job, scheme, offer, draw, order, invitation } = ids;
  return {
    pages: {
      job: paths.job(COMPANY, job),
      choose: paths.choose(COMPANY, job),
      review: paths.review(COMPANY, job),
      book: paths.book(COMPANY, job),
      bookPage: paths.bookPage(COMPANY, job, 1),
      payments: paths.payments(COMPANY, job),
      payment: paths.payment(COMPANY, job, draw),
      changeOrders: paths.changeOrders(COMPANY, job),
      changeOrder: paths.changeOrder(COMPANY, job, order),
      desk: paths.desk(COMPANY),
      deskJobs: paths.deskJobs(COMPANY),
      deskJob: paths.deskJob(COMPANY, job),
      deskRoom: paths.deskRoom(COMPANY, job),
      doorOrder: paths.doorOrder(COMPANY, job),
      approvals: paths.approvals(COMPANY),
    },
    api: {
      jobs: [paths.api.jobs(COMPANY), ['GET', 'POST']],
      job: [paths.api.job(COMPANY, job), ['GET', 'PATCH']],
      schemes: [paths.api.schemes(COMPANY, job), ['GET', 'POST']],
      scheme: [paths.api.scheme(COMPANY, job, scheme), ['GET', 'PATCH', 'DELETE']],
      offers: [paths.api.offers(COMPANY, job), ['POST']],
      offer: [paths.api.offer(COMPANY, job, offer), ['GET']],
      signatures: [paths.api.signatures(COMPANY, job, offer), ['POST']],
      book: [paths.api.book(COMPANY, job), ['GET']],
      draws: [paths.api.draws(COMPANY, job), ['GET']],
      drawPayment: [paths.api.drawPayment(COMPANY, job, draw), ['GET', 'POST']],
      changeOrders: [paths.api.changeOrders(COMPANY, job), ['GET', 'POST']],
      changeOrder: [paths.api.changeOrder(COMPANY, job, order), ['GET', 'DELETE']],
      changeOrderDecision: [paths.api.changeOrderDecision(COMPANY, job, order), ['POST']],
      invitations: [paths.api.invitations(COMPANY, job), ['GET', 'POST']],
      invitation: [paths.api.invitation(COMPANY, job, invitation), ['DELETE']],
      doorOrder: [paths.api.doorOrder(COMPANY, job), ['GET']],
      approvals: [paths.api.approvals(COMPANY), ['GET']],
    },
  };
}

/** Addresses that belong to nobody's job, each with why it is not walked here. */
const OPEN = {
  pages: ['home', 'signIn', 'invitation', 'api'],
  api: ['invitationAcceptance', 'clerkWebhook', 'stripeWebhook'],
};

/** The demo's Mill Race, which has pages, payments and change orders, by its real ids. */
async function millRace() {
  const rowan = await salesperson();
  return withScope(rowan, async (tx) => {
    const job = await tx.query.jobs.findFirst({ where: (row, { eq }) => eq(row.name, 'Mill Race') });
    const of = <T extends { jobId: string }>(rows: readonly T[]) => rows.find((row) => row.jobId === job?.id);
    const scheme = of(await tx.query.schemes.findMany());
    const offer = of(await tx.query.offers.findMany());
    const draw = of(await tx.query.draws.findMany());
    const order = of(await tx.query.changeOrders.findMany());
    const invitation = of(await tx.query.invitations.findMany());
    if (!job || !scheme || !offer || !draw || !order || !invitation)
      throw new Error('Mill Race is not complete.');
    return {
      job: job.id,
      scheme: scheme.id,
      offer: offer.id,
      draw: draw.id,
      order: order.id,
      invitation: invitation.id,
    };
  });
}

async function call(address: string, method: string, token: string | null): Promise<number> {
  const answer = await fetch(stack.web + address, {
    method,
    redirect: 'manual',
    headers: {
      origin: stack.web,
      ...(token ? { authorization: `Bearer ${token}` } : {}),
      ...(method === 'GET' ? {} : { 'content-type': 'application/json' }),
    },
    body: method === 'GET' ? undefined : '{}',
  });
  await answer.text();
  return answer.status;
}

test('No address of a job is open to another contractor, another household or somebody signed out', async () => {
  test.setTimeout(300_000);
  const { pages, api } = addressesOf(await millRace());
  expect([...Object.keys(pages), ...OPEN.pages].sort()).toEqual(Object.keys(paths).sort());
  expect([...Object.keys(api), ...OPEN.api].sort()).toEqual(Object.keys(paths.api).sort());

  const stranger = await newHousehold(1);
  const dov = await signInService.token('dov@quillback.example');
  // The demo's other household of the same contractor lives beside it; this one has come in for this test.
  const strangerToken = await signInService.token('odile@fenn.example');
  const own = addressesOf({ ...(await millRace()), job: stranger.jobId });

  for (const [name, address] of Object.entries(pages)) {
    expect(await call(address, 'GET', dov), `${name} as Dov`).toBe(404);
    expect(await call(address, 'GET', null), `${name} signed out`).toBe(303);
  }
  for (const [name, [address, methods]] of Object.entries(api)) {
    for (const method of methods) {
      expect(await call(address, method, dov), `${method} ${name} as Dov`).toBe(404);
      expect(await call(address, method, null), `${method} ${name} signed out`).toBe(401);
    }
  }
  // Odile of Mill Race tries a neighbour's kitchen.
  for (const [name, address] of Object.entries(own.pages))
    expect(await call(address, 'GET', strangerToken), `${name} as a neighbour`).toBe(404);
  for (const [name, [address, methods]] of Object.entries(own.api))
    for (const method of methods)
      expect(await call(address, method, strangerToken), `${method} ${name} as a neighbour`).toBe(404);
});

test('Each role is refused what is another’s: the desk to a homeowner, signing to staff, deciding to a salesperson', async () => {
  const ids = await millRace();
  const { pages, api } = addressesOf(ids);
  const odile = await signInService.token('odile@fenn.example');
  const rowan = await signInService.token('rowan@ternhollow.example');
  for (const name of ['desk', 'deskJobs', 'deskJob', 'deskRoom', 'doorOrder', 'approvals'])
    expect(await call(pages[name] ?? '', 'GET', odile), `${name} as a homeowner`).toBe(404);
  const path = (name: string) => api[name]?.[0] ?? '';
  expect(await call(path('doorOrder'), 'GET', odile)).toBe(403);
  expect(await call(path('changeOrderDecision'), 'POST', odile)).toBe(403);
  expect(await call(path('changeOrderDecision'), 'POST', rowan)).toBe(403);
  expect(await call(path('signatures'), 'POST', rowan)).toBe(403);
  expect(await call(path('drawPayment'), 'POST', rowan)).toBe(403);
  expect(await call(path('approvals'), 'GET', rowan)).toBe(403);
  expect(await call(path('doorOrder'), 'GET', rowan)).toBe(200);
});

test('A write that comes from another site is refused, whoever is signed in', async () => {
  const { api } = addressesOf(await millRace());
  const token = await signInService.token('odile@fenn.example');
  for (const name of ['schemes', 'offers', 'changeOrders', 'signatures']) {
    const answer = await fetch(stack.web + (api[name]?.[0] ?? ''), {
      method: 'POST',
      headers: {
        origin: 'https://elsewhere.example',
        authorization: `Bearer ${token}`,
        'content-type': 'application/json',
      },
      body: '{}',
    });
    expect(answer.status, name).toBe(403);
  }
});
