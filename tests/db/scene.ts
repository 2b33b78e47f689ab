import { randomUUID } from 'node:crypto';
import { withScope } from '@/db/client';
import { companies, guests, jobs, members, people } from '@/db/schema';
import type { Guest, Member, Worker } from '@/lib/contracts/actor';
import type { CompanySettings } from '@/lib/contracts/company';
import type { Result } from '@/lib/contracts/result';

export const SETTINGS: CompanySettings = {
  drawPlan: [{ label: 'Deposit', share: 1_000_000, due: 'signing' }],
  ruleSet: 'none',
  terms: {
    version: 1,
    tax: { mode: 'none', basis: 'invoice', rates: {}, place: 'Nowhere' },
    discount: { kind: 'none' },
    crewSize: 2,
  },
  warrantyYears: 5,
  insurance: '',
  permits: '',
  disconnects: '',
  startWindow: '',
  salespersonLimitCents: 0,
};

export interface Contractor {
  readonly companyId: string;
  readonly slug: string;
  readonly worker: Worker;
  readonly owner: Member;
  readonly seller: Member;
}

export interface Household {
  readonly jobId: string;
  readonly guest: Guest;
  readonly clerkUserId: string;
}

/** A contractor with an owner and a salesperson, put straight into the tables. */
export async function addContractor(slug: string): Promise<Contractor> {
  const companyId = randomUUID();
  const worker: Worker = { kind: 'worker', companyId };
  const member = (role: Member['role']): Member => ({
    kind: 'member',
    companyId,
    personId: randomUUID(),
    role,
    name: `${role} of ${slug}`,
    email: `${role}@${slug}.example`,
  });
  const [owner, seller] = [member('owner'), member('salesperson')];
  await withScope(worker, async (tx) => {
    await tx.insert(companies).values({
      id: companyId,
      slug,
      name: slug,
      phone: '(555) 010-0100',
      timeZone: 'America/New_York',
      state: 'NY',
      brand: { light: '#0b5d63', dark: '#5fb6ba', markSvg: null },
      settings: SETTINGS,
      clerkOrganizationId: `org_${slug}`,
      stripeAccountId: `acct_${slug}`,
    });
    for (const { personId, email, name, role } of [owner, seller]) {
      const clerkUserId = `user_${role}_${slug}`;
      await tx.insert(people).values({ companyId, id: personId, email, name, clerkUserId });
      await tx
        .insert(members)
        .values({ companyId, personId, role, clerkMembershipId: `mem_${role}_${slug}` });
    }
  });
  return { companyId, slug, worker, owner, seller };
}

let counted = 0;

/** A job of a contractor with one homeowner, put straight into the tables. */
export async function addHousehold({ companyId, worker, seller, slug }: Contractor): Promise<Household> {
  const jobId = randomUUID();
  const number = (counted += 1);
  const clerkUserId = `user_guest_${number}`;
  const guest: Guest = {
    kind: 'guest',
    companyId,
    jobId,
    personId: randomUUID(),
    role: 'homeowner',
    name: `Household ${number}`,
    email: `guest.${number}@${slug}.example`,
    signer: true,
  };
  await withScope(worker, async (tx) => {
    await tx.insert(jobs).values({
      companyId,
      id: jobId,
      number,
      name: `Job ${number}`,
      address: `${number} Sorrel Lane`,
      salespersonId: seller.personId,
    });
    const { personId, email, name } = guest;
    await tx.insert(people).values({ companyId, id: personId, email, name, clerkUserId });
    await tx.insert(guests).values({ companyId, jobId, personId, signer: true });
  });
  return { jobId, guest, clerkUserId };
}

export function valueOf<T>(result: Result<T>): T {
  if (!result.ok) {
    const faults = (result.fault.faults ?? []).map(({ path, message }) => `\n  ${path}: ${message}`);
    throw new Error(`refused: ${result.fault.code} ${result.fault.sentence}${faults.join('')}`);
  }
  return result.value;
}

export const codeOf = (result: Result<unknown>): string => (result.ok ? 'ok' : result.fault.code);
