import { ClerkFault, notFound } from './fault';
import { CodeMail } from './mail';
import {
  membershipJson,
  organizationJson,
  sessionJson,
  signInJson,
  userJson,
  signUpJson,
  type Json,
} from './objects';
import {
  newId,
  Store,
  type Client,
  type Membership,
  type Organization,
  type Session,
  type User,
} from './store';
import { Tokens } from './tokens';
import { Deliveries } from './webhooks';

export interface ClerkFakeOptions {
  /** Listens here on 127.0.0.1; 0 takes any free port. */
  readonly port: number;
  readonly stateFile: string;
  readonly publishableKey: string;
  readonly secretKey: string;
  /** PKCS #8; session tokens are signed with it. */
  readonly privateKeyPem: string;
  /** Empty when nobody is to be told. */
  readonly webhookUrl: string;
  readonly webhookSecret: string;
  readonly smtpUrl: string;
  readonly mailDomain: string;
  /** Origin of the program's pages. */
  readonly webOrigin: string;
}

const SESSION_MS = 7 * 86_400_000;

/** The instance: what it knows, and the acts that both of its interfaces share. */
export class Instance {
  readonly store: Store;
  readonly tokens: Tokens;
  readonly mail: CodeMail;
  readonly deliveries: Deliveries;

  constructor(readonly options: ClerkFakeOptions) {
    this.store = new Store(options.stateFile);
    this.tokens = new Tokens(options.privateKeyPem, options.publishableKey);
    this.mail = new CodeMail(options.smtpUrl, options.mailDomain);
    this.deliveries = new Deliveries(this.store, options.webhookUrl, options.webhookSecret);
  }

  user(id: string): User {
    const user = this.store.state.users[id];
    if (!user) throw notFound('user');
    return user;
  }

  /** By id or by slug. */
  organization(key: string): Organization {
    const { organizations } = this.store.state;
    const found = organizations[key] ?? Object.values(organizations).find((one) => one.slug === key);
    if (!found) throw notFound('organization');
    return found;
  }

  organizationView(organization: Organization): Json {
    return organizationJson(organization, this.store.membersOf(organization.id).length);
  }

  membershipView(membership: Membership): Json {
    const organization = this.organization(membership.organizationId);
    const members = this.store.membersOf(organization.id).length;
    return membershipJson(membership, organization, members, this.user(membership.userId));
  }

  createUser(given: {
    readonly email: string;
    readonly firstName: string | null;
    readonly lastName: string | null;
    readonly passwordHash: string | null;
    readonly externalId?: string | null;
  }): User {
    const now = Date.now();
    const email = { id: newId('idn'), address: given.email.trim().toLowerCase(), verified: true };
    const user: User = {
      id: newId('user'),
      firstName: given.firstName || null,
      lastName: given.lastName || null,
      emails: [email],
      primaryEmailId: email.id,
      passwordHash: given.passwordHash,
      externalId: given.externalId ?? null,
      publicMetadata: {},
      lastSignInAt: null,
      createdAt: now,
      updatedAt: now,
    };
    this.store.state.users[user.id] = user;
    this.deliveries.emit('user.created', userJson(user));
    return user;
  }

  deleteUser(user: User): void {
    const { state } = this.store;
    for (const membership of this.store.membershipsOf(user.id)) this.deleteMembership(membership);
    this.endSessions(user.id, () => true);
    delete state.users[user.id];
    this.deliveries.emit('user.deleted', { object: 'user', id: user.id, deleted: true });
  }

  addMembership(organization: Organization, user: User, role: Membership['role']): Membership {
    const already = this.store.membersOf(organization.id).some((one) => one.userId === user.id);
    if (already) {
      throw new ClerkFault(
        400,
        'already_a_member_in_organization',
        'The user is already a member of the organization.',
      );
    }
    const now = Date.now();
    const membership: Membership = {
      id: newId('orgmem'),
      organizationId: organization.id,
      userId: user.id,
      role,
      createdAt: now,
      updatedAt: now,
    };
    this.store.state.memberships[membership.id] = membership;
    this.deliveries.emit('organizationMembership.created', this.membershipView(membership));
    return membership;
  }

  deleteMembership(membership: Membership): void {
    const view = this.membershipView(membership);
    delete this.store.state.memberships[membership.id];
    for (const client of Object.values(this.store.state.clients)) {
      for (const session of client.sessions) {
        const active = session.organizationId === membership.organizationId;
        if (session.userId === membership.userId && active) session.organizationId = null;
      }
    }
    this.deliveries.emit('organizationMembership.deleted', view);
  }

  newClient(): Client {
    const now = Date.now();
    const client: Client = {
      id: newId('client'),
      sessions: [],
      lastActiveSessionId: null,
      signInId: null,
      signUpId: null,
      createdAt: now,
      updatedAt: now,
    };
    this.store.state.clients[client.id] = client;
    return client;
  }

  /** The session that a browser is signed in with. */
  activeSession(client: Client | undefined): Session | undefined {
    return client?.sessions.find(
      (one) => one.id === client.lastActiveSessionId && one.status === 'active' && one.expireAt > Date.now(),
    );
  }

  /** Signs a browser in; one session at a time. */
  startSession(client: Client, user: User, origin: string): Session {
    const now = Date.now();
    const session: Session = {
      id: newId('sess'),
      userId: user.id,
      status: 'active',
      organizationId: this.store.membershipsOf(user.id)[0]?.organizationId ?? null,
      origin,
      createdAt: now,
      lastActiveAt: now,
      expireAt: now + SESSION_MS,
    };
    client.sessions = [session];
    client.lastActiveSessionId = session.id;
    client.updatedAt = now;
    user.lastSignInAt = now;
    return session;
  }

  /** Ends a user's sessions in all browsers, as far as `which` says so. */
  endSessions(userId: string, which: (session: Session) => boolean): void {
    for (const client of Object.values(this.store.state.clients)) {
      for (const session of client.sessions) {
        if (session.userId === userId && session.status === 'active' && which(session)) {
          session.status = 'revoked';
          client.updatedAt = Date.now();
        }
      }
    }
  }

  /** A token of a session, with its active organisation or the one asked for. */
  tokenOf(
    session: Session,
    organizationId: string | null = session.organizationId,
    seconds?: number,
  ): string {
    const membership = this.store
      .membershipsOf(session.userId)
      .find((one) => one.organizationId === organizationId);
    const active = membership && {
      organization: this.organization(membership.organizationId),
      role: membership.role,
    };
    return this.tokens.mint(session, active ?? null, seconds);
  }

  sessionView(session: Session): Json {
    const user = this.user(session.userId);
    const memberships = this.store.membershipsOf(user.id).map((one) => this.membershipView(one));
    const token = session.status === 'active' ? this.tokenOf(session) : null;
    return sessionJson(session, user, memberships, token);
  }

  clientView(client: Client): Json {
    const { state } = this.store;
    const signIn = client.signInId === null ? undefined : state.signIns[client.signInId];
    const signUp = client.signUpId === null ? undefined : state.signUps[client.signUpId];
    const session = this.activeSession(client);
    return {
      object: 'client',
      id: client.id,
      sessions: session ? [this.sessionView(session)] : [],
      sign_in:
        signIn && signIn.status !== 'complete'
          ? signInJson(signIn, signIn.userId === null ? null : this.user(signIn.userId))
          : null,
      sign_up: signUp && signUp.status !== 'complete' ? signUpJson(signUp) : null,
      last_active_session_id: session?.id ?? null,
      cookie_expires_at: null,
      captcha_bypass: false,
      last_authentication_strategy: null,
      created_at: client.createdAt,
      updated_at: client.updatedAt,
    };
  }
}
