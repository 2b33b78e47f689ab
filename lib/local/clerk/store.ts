import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';

/** All instants are in milliseconds since 1970, as the service gives them. */
const instant = z.number();

const emailShape = z.object({ id: z.string(), address: z.string(), verified: z.boolean() });

const userShape = z.object({
  id: z.string(),
  firstName: z.string().nullable(),
  lastName: z.string().nullable(),
  emails: z.array(emailShape),
  primaryEmailId: z.string().nullable(),
  passwordHash: z.string().nullable(),
  externalId: z.string().nullable(),
  publicMetadata: z.record(z.string(), z.unknown()),
  lastSignInAt: instant.nullable(),
  createdAt: instant,
  updatedAt: instant,
});
export type User = z.infer<typeof userShape>;

const organizationShape = z.object({
  id: z.string(),
  name: z.string(),
  slug: z.string(),
  createdBy: z.string().nullable(),
  createdAt: instant,
  updatedAt: instant,
});
export type Organization = z.infer<typeof organizationShape>;

export const ROLES = ['org:owner', 'org:salesperson'] as const;
export const roleShape = z.enum(ROLES);

const membershipShape = z.object({
  id: z.string(),
  organizationId: z.string(),
  userId: z.string(),
  role: roleShape,
  createdAt: instant,
  updatedAt: instant,
});
export type Membership = z.infer<typeof membershipShape>;

const sessionShape = z.object({
  id: z.string(),
  userId: z.string(),
  status: z.enum(['active', 'ended', 'removed', 'revoked']),
  organizationId: z.string().nullable(),
  /** The origin whose pages the session was made on. */
  origin: z.string(),
  createdAt: instant,
  lastActiveAt: instant,
  expireAt: instant,
});
export type Session = z.infer<typeof sessionShape>;

/** One browser. */
const clientShape = z.object({
  id: z.string(),
  sessions: z.array(sessionShape),
  lastActiveSessionId: z.string().nullable(),
  signInId: z.string().nullable(),
  signUpId: z.string().nullable(),
  createdAt: instant,
  updatedAt: instant,
});
export type Client = z.infer<typeof clientShape>;

const verificationShape = z.object({
  strategy: z.enum(['email_code', 'reset_password_email_code', 'password']),
  status: z.enum(['unverified', 'verified', 'failed', 'expired']),
  /** Six digits, or null where nothing was mailed. */
  code: z.string().nullable(),
  attempts: z.number().int(),
  sentAt: z.array(instant),
  expireAt: instant.nullable(),
});
export type Verification = z.infer<typeof verificationShape>;

const signInShape = z.object({
  id: z.string(),
  clientId: z.string(),
  identifier: z.string().nullable(),
  userId: z.string().nullable(),
  status: z.enum(['needs_identifier', 'needs_first_factor', 'needs_new_password', 'complete']),
  verification: verificationShape.nullable(),
  createdSessionId: z.string().nullable(),
  createdAt: instant,
});
export type SignIn = z.infer<typeof signInShape>;

const signUpShape = z.object({
  id: z.string(),
  clientId: z.string(),
  email: z.string(),
  firstName: z.string().nullable(),
  lastName: z.string().nullable(),
  passwordHash: z.string().nullable(),
  status: z.enum(['missing_requirements', 'complete']),
  verification: verificationShape.nullable(),
  createdUserId: z.string().nullable(),
  createdSessionId: z.string().nullable(),
  createdAt: instant,
});
export type SignUp = z.infer<typeof signUpShape>;

const eventShape = z.object({
  /** The `svix-id` of each of its deliveries. */
  id: z.string(),
  type: z.string(),
  data: z.record(z.string(), z.unknown()),
  at: instant,
  pending: z.boolean(),
});
export type WebhookEvent = z.infer<typeof eventShape>;

const byId = <T extends z.ZodType>(shape: T) => z.record(z.string(), shape);

const stateShape = z.object({
  version: z.literal(1),
  users: byId(userShape),
  organizations: byId(organizationShape),
  memberships: byId(membershipShape),
  clients: byId(clientShape),
  signIns: byId(signInShape),
  signUps: byId(signUpShape),
  /** Instants of wrong passwords by user. */
  wrongPasswords: z.record(z.string(), z.array(instant)),
  events: z.array(eventShape),
});
export type State = z.infer<typeof stateShape>;

const firstState = (): State => ({
  version: 1,
  users: {},
  organizations: {},
  memberships: {},
  clients: {},
  signIns: {},
  signUps: {},
  wrongPasswords: {},
  events: [],
});

const DAY_MS = 86_400_000;
const EVENTS_KEPT = 2000;

/** An id in the service's form: what it names, then letters that nobody guesses. */
export const newId = (prefix: string): string => `${prefix}_${randomBytes(18).toString('hex')}`;

/** The fake's memory, kept in one file so that a restart forgets nobody. */
export class Store {
  readonly state: State;

  /** Reads `file` when it is there. Throws when it holds something else than a state. */
  constructor(private readonly file: string) {
    this.state = existsSync(file) ? stateShape.parse(JSON.parse(readFileSync(file, 'utf8'))) : firstState();
  }

  userByEmail(address: string): User | undefined {
    const wanted = address.trim().toLowerCase();
    return Object.values(this.state.users).find((user) => user.emails.some((one) => one.address === wanted));
  }

  membershipsOf(userId: string): Membership[] {
    return Object.values(this.state.memberships).filter((one) => one.userId === userId);
  }

  membersOf(organizationId: string): Membership[] {
    return Object.values(this.state.memberships).filter((one) => one.organizationId === organizationId);
  }

  /** A session that is alive, with the browser that holds it. */
  session(id: string): { client: Client; session: Session } | undefined {
    for (const client of Object.values(this.state.clients)) {
      const session = client.sessions.find((one) => one.id === id);
      if (session) return { client, session };
    }
    return undefined;
  }

  /** Writes the state to a neighbour of the file and puts it in place in one step. */
  save(): void {
    this.forget();
    mkdirSync(path.dirname(this.file), { recursive: true });
    const beside = `${this.file}.${process.pid}.new`;
    writeFileSync(beside, JSON.stringify(this.state), { mode: 0o600 });
    renameSync(beside, this.file);
  }

  /** Lets go of what nobody can come back to: attempts and empty browsers of another day, old events. */
  private forget(): void {
    const { state } = this;
    const oldest = Date.now() - DAY_MS;
    for (const attempts of [state.signIns, state.signUps]) {
      for (const [id, attempt] of Object.entries(attempts)) {
        if (attempt.createdAt < oldest) delete attempts[id];
      }
    }
    for (const [id, client] of Object.entries(state.clients)) {
      const idle = client.updatedAt < oldest && !client.sessions.some((one) => one.status === 'active');
      if (idle) delete state.clients[id];
    }
    if (state.events.length > EVENTS_KEPT) state.events.splice(0, state.events.length - EVENTS_KEPT);
  }
}
