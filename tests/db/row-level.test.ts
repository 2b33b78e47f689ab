import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePool, withScope, type Scope, type Transaction } from '@/db/client';
import * as schema from '@/db/schema';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { addContractor, addHousehold, SETTINGS, type Contractor, type Household } from './scene';

/**
 * What each table lets whom do. `guest`: what a homeowner may do with the rows of their own job; `lookups`: by which
 * keys a row may be found before a scope is known; `grown`: rows are only ever added; `removed`: rows may be deleted.
 * Members and workers read and write all of their company, and nobody anything of another.
 */
const TABLES = {
  audit: { guest: 'write', grown: true },
  change_orders: { guest: 'write' },
  companies: {
    guest: 'read',
    of: 'company',
    lookups: ['slug', 'organization', 'account', 'user', 'person', 'invitation'],
    added: 'worker',
  },
  draws: { guest: 'write', removed: true },
  edition_costs: { guest: 'none', of: 'company', grown: true },
  editions: { guest: 'read', of: 'company', grown: true },
  guests: { guest: 'read', lookups: ['person'] },
  invitations: { guest: 'none', lookups: ['invitation'] },
  jobs: { guest: 'read' },
  ledger: { guest: 'write', grown: true },
  members: { guest: 'read', of: 'company' },
  offers: { guest: 'write', grown: true },
  pages: { guest: 'write', grown: true },
  payments: { guest: 'write' },
  people: { guest: 'read', lookups: ['user'] },
  scheme_history: { guest: 'write', grown: true },
  schemes: { guest: 'write' },
  signatures: { guest: 'write', grown: true },
  surveys: { guest: 'read', grown: true },
  webhook_events: { guest: 'none', of: 'company', grown: true, added: 'worker' },
} as const satisfies Record<string, Rule>;

interface Rule {
  readonly guest: 'none' | 'read' | 'write';
  /** Rows belong to the company as a whole, not to one job. */
  readonly of?: 'company';
  readonly lookups?: readonly LookupKind[];
  readonly grown?: true;
  readonly removed?: true;
  /** Only a worker adds rows and, of `webhook_events`, sees them. */
  readonly added?: 'worker';
}

type LookupKind = 'slug' | 'organization' | 'account' | 'user' | 'person' | 'invitation';
type TableName = keyof typeof TABLES;
const NAMES = Object.keys(TABLES).sort() as TableName[];
const ruleOf = (name: TableName): Rule => TABLES[name];

/** Where a row lies: the two households of one contractor, and the one of another. */
type Label = 'A1' | 'A2' | 'B3';
const LABELS: readonly Label[] = ['A1', 'A2', 'B3'];
const companyOf = (label: Label) => label.slice(0, 1);

interface Place {
  readonly contractor: Contractor;
  readonly household: Household;
  readonly ids: Readonly<
    Record<'survey' | 'edition' | 'scheme' | 'order' | 'offer' | 'unsealed' | 'draw' | 'spare', string>
  >;
  readonly tokenHash: string;
}

const ZONE = {
  style: 's',
  species: 's',
  finish: 'f',
  overlay: 'o',
  pull: 'p',
  crown: 'none',
  base: 'none',
  lightRail: 'none',
  ends: 'e',
  drawerBox: 'none',
  counter: 'c',
};
const CHOICES = { version: 1 as const, kitchen: ZONE, zones: {}, inside: {} };

let database: TestDatabase;
let places: Record<Label, Place>;
let number = 1000;

beforeAll(async () => {
  database = await cloneTestDatabase();
  const [a, b] = [await addContractor('tern-hollow'), await addContractor('quillback')];
  places = {
    A1: await fill(a, await addHousehold(a)),
    A2: await fill(a, await addHousehold(a)),
    B3: await fill(b, await addHousehold(b)),
  };
});

afterAll(async () => {
  await closePool();
  await database.drop();
});

/** A row of every table at a place; `fresh` gives each insert keys of its own. */
function rowsAt(place: Pick<Place, 'contractor' | 'household' | 'ids'>) {
  const { contractor, household, ids } = place;
  const { companyId } = contractor;
  const personId = household.guest.personId;
  const staffId = contractor.owner.personId;
  const own = { companyId, jobId: household.jobId };
  const at = new Date('2026-12-01T12:00:00Z');
  const next = () => (number += 1);
  return {
    audit: () => ({ ...own, actor: 'guest', personId, verb: 'test.add', subject: '1', detail: {} }),
    change_orders: () => ({
      ...own,
      id: randomUUID(),
      number: next(),
      startedBy: 'homeowner' as const,
      personId,
      reason: 'r',
      choices: CHOICES,
      editionId: ids.edition,
      surveyId: ids.survey,
      baseSequence: 1,
    }),
    companies: () => ({
      id: companyId,
      slug: `s${next()}`,
      name: 'n',
      phone: 'p',
      timeZone: 'UTC',
      state: 'NY',
      brand: { light: '#000000', dark: '#ffffff', markSvg: null },
      settings: SETTINGS,
      clerkOrganizationId: `o${next()}`,
      stripeAccountId: `acct_${next()}`,
    }),
    draws: () => ({
      ...own,
      id: randomUUID(),
      number: next(),
      label: 'Part',
      due: 'signing' as const,
      amountCents: 1,
    }),
    edition_costs: () => ({
      companyId,
      editionId: ids.spare,
      body: { version: 1 as const, number: 1, costShare: {} },
    }),
    editions: () => ({
      companyId,
      id: randomUUID(),
      number: next(),
      body: JSON.parse('{}'),
      sha256: 'x',
      publishedBy: staffId,
    }),
    guests: () => ({ ...own, personId: staffId, signer: false }),
    invitations: () => ({
      ...own,
      id: randomUUID(),
      email: 'x@x.example',
      name: 'x',
      signer: true,
      invitedBy: staffId,
      tokenHash: randomUUID(),
      expiresAt: at,
    }),
    jobs: () => ({
      companyId,
      id: randomUUID(),
      number: next(),
      name: 'n',
      address: 'a',
      salespersonId: staffId,
    }),
    ledger: () => ({ ...own, kind: 'payment' as const, amountCents: -1, memo: 'm', at }),
    members: () => ({ companyId, personId, role: 'owner' as const, clerkMembershipId: 'm' }),
    offers: () => ({
      ...own,
      id: randomUUID(),
      kind: 'agreement' as const,
      body: '{}',
      sha256: 'x',
      totalCents: 1,
      createdBy: personId,
    }),
    pages: () => ({
      ...own,
      sequence: next(),
      kind: 'agreement' as const,
      offerId: ids.unsealed,
      envelope: '{}',
      sha256: 'x',
      sealedAt: at,
    }),
    payments: () => ({
      ...own,
      drawId: ids.draw,
      intentId: `pi_${next()}`,
      amountCents: 1,
      status: 'open',
      createdBy: personId,
    }),
    people: () => ({ companyId, id: randomUUID(), email: `${next()}@x.example`, name: 'n' }),
    scheme_history: () => ({
      ...own,
      schemeId: ids.scheme,
      version: next(),
      change: [],
      choices: CHOICES,
      totalCents: 1,
      personId,
    }),
    schemes: () => ({
      ...own,
      id: randomUUID(),
      letter: `${next()}`,
      name: 'n',
      choices: CHOICES,
      decided: [],
      unsure: [],
      totalCents: 1,
    }),
    signatures: () => ({
      ...own,
      offerId: ids.offer,
      personId: staffId,
      role: 'homeowner' as const,
      name: 'n',
      offerSha256: 'x',
      consentSha256: 'x',
      means: { kind: 'typed' as const, text: 'n' },
      signedAt: at,
    }),
    surveys: () => ({
      ...own,
      id: randomUUID(),
      number: next(),
      body: JSON.parse('{}'),
      sha256: 'x',
      createdBy: staffId,
    }),
    webhook_events: () => ({ source: 'stripe' as const, eventId: `evt_${next()}`, companyId, type: 't' }),
  } satisfies Record<TableName, () => object>;
}

/** Adds one fresh row of a table at a place. */
async function add(tx: Transaction, name: TableName, place: Pick<Place, 'contractor' | 'household' | 'ids'>) {
  const rows = rowsAt(place);
  switch (name) {
    case 'audit':
      return tx.insert(schema.audit).values(rows.audit());
    case 'change_orders':
      return tx.insert(schema.changeOrders).values(rows.change_orders());
    case 'companies':
      return tx.insert(schema.companies).values(rows.companies());
    case 'draws':
      return tx.insert(schema.draws).values(rows.draws());
    case 'edition_costs':
      return tx.insert(schema.editionCosts).values(rows.edition_costs());
    case 'editions':
      return tx.insert(schema.editions).values(rows.editions());
    case 'guests':
      return tx.insert(schema.guests).values(rows.guests());
    case 'invitations':
      return tx.insert(schema.invitations).values(rows.invitations());
    case 'jobs':
      return tx.insert(schema.jobs).values(rows.jobs());
    case 'ledger':
      return tx.insert(schema.ledger).values(rows.ledger());
    case 'members':
      return tx.insert(schema.members).values(rows.members());
    case 'offers':
      return tx.insert(schema.offers).values(rows.offers());
    case 'pages':
      return tx.insert(schema.pages).values(rows.pages());
    case 'payments':
      return tx.insert(schema.payments).values(rows.payments());
    case 'people':
      return tx.insert(schema.people).values(rows.people());
    case 'scheme_history':
      return tx.insert(schema.schemeHistory).values(rows.scheme_history());
    case 'schemes':
      return tx.insert(schema.schemes).values(rows.schemes());
    case 'signatures':
      return tx.insert(schema.signatures).values(rows.signatures());
    case 'surveys':
      return tx.insert(schema.surveys).values(rows.surveys());
    case 'webhook_events':
      return tx.insert(schema.webhookEvents).values(rows.webhook_events());
  }
}

/** Puts at least one row of every table at a place. */
async function fill(contractor: Contractor, household: Household): Promise<Place> {
  const id = randomUUID;
  const ids = {
    survey: id(),
    edition: id(),
    scheme: id(),
    order: id(),
    offer: id(),
    unsealed: id(),
    draw: id(),
    spare: id(),
  };
  const tokenHash = id();
  const rows = rowsAt({ contractor, household, ids });
  await withScope(contractor.worker, async (tx) => {
    await tx.insert(schema.surveys).values({ ...rows.surveys(), id: ids.survey });
    for (const edition of [ids.edition, ids.spare])
      await tx.insert(schema.editions).values({ ...rows.editions(), id: edition });
    await tx.insert(schema.editionCosts).values({ ...rows.edition_costs(), editionId: ids.edition });
    await tx.insert(schema.schemes).values({ ...rows.schemes(), id: ids.scheme });
    await tx.insert(schema.schemeHistory).values(rows.scheme_history());
    await tx.insert(schema.changeOrders).values({ ...rows.change_orders(), id: ids.order });
    await tx.insert(schema.offers).values({ ...rows.offers(), id: ids.offer });
    await tx.insert(schema.offers).values({ ...rows.offers(), id: ids.unsealed });
    await tx.insert(schema.signatures).values({ ...rows.signatures(), personId: household.guest.personId });
    await tx.insert(schema.pages).values({ ...rows.pages(), offerId: ids.offer });
    // The first is paid for and cannot go; the second may.
    await tx.insert(schema.draws).values({ ...rows.draws(), id: ids.draw, number: 1 });
    await tx.insert(schema.draws).values({ ...rows.draws(), number: 2 });
    await tx.insert(schema.payments).values(rows.payments());
    await tx.insert(schema.ledger).values(rows.ledger());
    await tx.insert(schema.audit).values(rows.audit());
    await tx.insert(schema.invitations).values({ ...rows.invitations(), tokenHash });
    await tx.insert(schema.webhookEvents).values(rows.webhook_events());
  });
  return { contractor, household, ids, tokenHash };
}

type ScopeName =
  | 'owner of A'
  | 'salesperson of A'
  | 'owner of B'
  | 'guest of A1'
  | 'guest of A2'
  | 'guest of B3'
  | 'worker of A'
  | 'worker of B'
  | LookupKind;
const SCOPES: readonly ScopeName[] = [
  'owner of A',
  'salesperson of A',
  'owner of B',
  'guest of A1',
  'guest of A2',
  'guest of B3',
  'worker of A',
  'worker of B',
  'slug',
  'organization',
  'account',
  'user',
  'person',
  'invitation',
];

/** Each lookup looks for what belongs to A1. */
function scopeOf(name: ScopeName): Scope {
  const { A1, A2, B3 } = places;
  const { companyId } = A1.contractor;
  switch (name) {
    case 'owner of A':
      return A1.contractor.owner;
    case 'salesperson of A':
      return A1.contractor.seller;
    case 'owner of B':
      return B3.contractor.owner;
    case 'guest of A1':
      return A1.household.guest;
    case 'guest of A2':
      return A2.household.guest;
    case 'guest of B3':
      return B3.household.guest;
    case 'worker of A':
      return A1.contractor.worker;
    case 'worker of B':
      return B3.contractor.worker;
    case 'slug':
      return { kind: 'slug', key: 'tern-hollow' };
    case 'organization':
      return { kind: 'organization', key: 'org_tern-hollow' };
    case 'account':
      return { kind: 'account', key: 'acct_tern-hollow' };
    case 'user':
      return { kind: 'user', key: A1.household.clerkUserId, companyId };
    case 'person':
      return { kind: 'person', key: A1.household.guest.personId, companyId };
    case 'invitation':
      return { kind: 'invitation', key: A1.tokenHash, companyId };
  }
}

const isLookup = (name: ScopeName): name is LookupKind => !name.includes(' ');

/** Labels of the rows that a scope may reach for reading or writing, by the table above. */
function reach(scope: ScopeName, table: TableName, want: 'read' | 'write'): Label[] {
  const rule = ruleOf(table);
  if (isLookup(scope)) {
    const found = want === 'read' && (rule.lookups ?? []).includes(scope);
    return found
      ? LABELS.filter((label) => (rule.of === 'company' ? companyOf(label) === 'A' : label === 'A1'))
      : [];
  }
  const whom = scope.slice(-2).trim();
  const staff = !scope.startsWith('guest');
  if (rule.added === 'worker' && table === 'webhook_events' && !scope.startsWith('worker')) return [];
  if (staff) return LABELS.filter((label) => companyOf(label) === whom);
  if (rule.guest === 'none' || (want === 'write' && rule.guest === 'read')) return [];
  return LABELS.filter((label) => (rule.of === 'company' ? companyOf(label) === whom[0] : label === whom));
}

/** Which of the places a table's row lies at, as SQL. */
function labelSql(table: TableName) {
  const { A1, A2, B3 } = places;
  const cases = (column: string, of: (place: Place) => string) =>
    sql`case ${sql.raw(column)}::text when ${of(A1)} then 'A1' when ${of(A2)} then 'A2' when ${of(B3)} then 'B3' end`;
  if (table === 'people') return cases('id', (place) => place.household.guest.personId);
  if (table === 'jobs') return cases('id', (place) => place.household.jobId);
  if (ruleOf(table).of === 'company') {
    const column = table === 'companies' ? 'id' : 'company_id';
    return sql`case ${sql.raw(column)}::text when ${A1.contractor.companyId} then 'A' when ${B3.contractor.companyId} then 'B' end`;
  }
  return cases('job_id', (place) => place.household.jobId);
}

/** Labels as the rows tell them: those of a company are told apart by company alone. */
function told(table: TableName, labels: readonly Label[]): string[] {
  return [
    ...new Set(labels.map((label) => (ruleOf(table).of === 'company' ? companyOf(label) : label))),
  ].sort();
}

async function labelsOf(tx: Transaction, query: ReturnType<typeof sql>): Promise<string[]> {
  const rows = await tx.execute(query);
  // Staff among the people lie at no household.
  return [...new Set([...rows].map((row) => String(row.label)))].filter((label) => label !== 'null').sort();
}

class Undo extends Error {}

/** Does `work` in a scope and takes everything back; answers what it returned or the refusal's message. */
async function tried<T>(scope: Scope, work: (tx: Transaction) => Promise<T>): Promise<T | string> {
  let outcome: T | string = 'nothing';
  await withScope(scope, async (tx) => {
    outcome = await work(tx);
    throw new Undo();
  }).catch((error: unknown) => {
    if (error instanceof Undo) return;
    const cause = error instanceof Error ? error.cause : undefined;
    outcome = cause instanceof Error ? cause.message : String(error);
  });
  return outcome;
}

describe.each(SCOPES)('%s', (scope) => {
  it.each(NAMES)('reads of %s what the table above says, and nothing else', async (table) => {
    const seen = await withScope(scopeOf(scope), (tx) =>
      labelsOf(tx, sql`select ${labelSql(table)} as label from ${sql.raw(table)}`),
    );
    expect(seen).toEqual(told(table, reach(scope, table, 'read')));
  });

  it.each(NAMES)('adds to %s only where the table above says', async (table) => {
    const rule = ruleOf(table);
    for (const label of LABELS) {
      const outcome = await tried(scopeOf(scope), async (tx) => {
        await add(tx, table, places[label]);
        return 'added';
      });
      const allowed =
        reach(scope, table, 'write').includes(label) &&
        (rule.added !== 'worker' || scope.startsWith('worker'));
      // A second company under the id of the first runs into the key, after the policy has let it by.
      const added = table === 'companies' ? /^(added|duplicate key)/ : /^added$/;
      if (allowed) expect(outcome, label).toMatch(added);
      else expect(outcome, label).toMatch(/violates row-level security policy/);
    }
  });

  it.each(NAMES)('changes of %s only what the table above says', async (table) => {
    const rule = ruleOf(table);
    const column = table === 'companies' ? 'name' : 'company_id';
    const outcome = await tried(scopeOf(scope), (tx) =>
      labelsOf(
        tx,
        sql`update ${sql.raw(table)} set ${sql.raw(column)} = ${sql.raw(column)} returning ${labelSql(table)} as label`,
      ),
    );
    if (rule.grown) expect(outcome).toBe(`permission denied for table ${table}`);
    else expect(outcome).toEqual(told(table, reach(scope, table, 'write')));
  });

  it.each(NAMES)('removes of %s only what the table above says', async (table) => {
    const outcome = await tried(scopeOf(scope), (tx) => {
      const which = table === 'draws' ? sql` where number = 2` : sql``;
      return labelsOf(tx, sql`delete from ${sql.raw(table)}${which} returning ${labelSql(table)} as label`);
    });
    if (!ruleOf(table).removed) expect(outcome).toBe(`permission denied for table ${table}`);
    else expect(outcome).toEqual(told(table, reach(scope, table, 'write')));
  });
});

describe('no scope', () => {
  it.each(NAMES)('shows no row of %s and takes none', async (table) => {
    const bare = postgres(database.appUrl, { max: 1 });
    try {
      const rows = await bare`select 1 from ${bare(table)}`;
      expect([...rows]).toEqual([]);
      if (!ruleOf(table).grown) {
        const column = table === 'companies' ? 'name' : 'company_id';
        const changed = await bare`update ${bare(table)} set ${bare(column)} = ${bare(column)}`;
        expect(changed.count).toBe(0);
      }
      await expect(bare`insert into ${bare(table)} default values`).rejects.toThrow();
    } finally {
      await bare.end();
    }
  });

  it('the application role can neither truncate nor alter nor become another', async () => {
    const bare = postgres(database.appUrl, { max: 1 });
    try {
      for (const table of NAMES) {
        await expect(bare`truncate ${bare(table)} cascade`).rejects.toThrow('permission denied');
        await expect(bare`alter table ${bare(table)} disable row level security`).rejects.toThrow(
          'must be owner',
        );
      }
      await expect(bare`set role app_owner`).rejects.toThrow('permission denied');
      await expect(bare`create table mine (id int)`).rejects.toThrow('permission denied');
    } finally {
      await bare.end();
    }
  });
});

describe('tables that only grow', () => {
  const grown = NAMES.filter((name) => ruleOf(name).grown);

  it.each(grown)('%s refuses even its owner to change, remove or truncate', async (table) => {
    const owner = postgres(database.ownerUrl, { max: 1, onnotice: () => undefined });
    const refused = `Rows of ${table} are never changed or removed.`;
    try {
      await expect(owner`update ${owner(table)} set company_id = company_id`).rejects.toThrow(refused);
      await expect(owner`delete from ${owner(table)}`).rejects.toThrow(refused);
      await expect(owner`truncate ${owner(table)} cascade`).rejects.toThrow('are never changed or removed.');
    } finally {
      await owner.end();
    }
  });

  it.each(grown)('%s cannot be overwritten by adding a row again', async (table) => {
    const outcome = await tried(places.A1.contractor.worker, async (tx) => {
      await tx.execute(
        sql`insert into ${sql.raw(table)} select * from ${sql.raw(table)} limit 1
          on conflict on constraint ${sql.raw(await primaryKey(tx, table))} do update set company_id = excluded.company_id`,
      );
      return 'overwritten';
    });
    expect(outcome).toBe(`permission denied for table ${table}`);
  });
});

async function primaryKey(tx: Transaction, table: TableName): Promise<string> {
  const [row] = await tx.execute(
    sql`select conname from pg_constraint where conrelid = ${table}::regclass and contype = 'p'`,
  );
  return `"${String(row?.conname)}"`;
}

describe('scopes side by side', () => {
  it('two that are open at once, two hundred times over, see each its own and never the other’s', async () => {
    const scopes: readonly ScopeName[] = ['guest of A1', 'guest of B3'];
    const meet = () => {
      let open: () => void = () => undefined;
      let waiting = 0;
      const both = new Promise<void>((resolve) => (open = resolve));
      return async () => {
        if ((waiting += 1) === scopes.length) open();
        await both;
      };
    };
    for (let round = 0; round < 100; round += 1) {
      const together = meet();
      const seen = await Promise.all(
        scopes.map((scope) =>
          withScope(scopeOf(scope), async (tx) => {
            await together();
            return labelsOf(tx, sql`select ${labelSql('jobs')} as label from jobs`);
          }),
        ),
      );
      expect(seen).toEqual([['A1'], ['B3']]);
    }
  });

  it('a scope ends with its transaction, whether that was kept or taken back', async () => {
    const single = postgres(database.appUrl, { max: 1 });
    try {
      for (const end of ['commit', 'rollback']) {
        await single.unsafe('begin');
        await single`select set_config('app.kind', 'worker', true), set_config('app.company', ${places.A1.contractor.companyId}, true)`;
        expect(await single`select 1 from jobs`).not.toHaveLength(0);
        await single.unsafe(end);
        expect(await single`select 1 from jobs`).toHaveLength(0);
      }
    } finally {
      await single.end();
    }
  });
});
