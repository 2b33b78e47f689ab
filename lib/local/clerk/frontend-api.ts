import { environmentJson } from './environment-object';
import { ClerkFault, notFound } from './fault';
import { textField, type Answer, type Asked } from './http';
import type { Instance } from './instance';
import { signInJson, signUpJson, userJson, type Json } from './objects';
import { attemptFirstFactor, createSignIn, prepareFirstFactor, resetPassword } from './sign-in';
import { attemptVerification, createSignUp, prepareVerification } from './sign-up';
import { newId, type Client, type Session, type SignIn, type SignUp } from './store';

const YEAR_SECONDS = 31_536_000;
/** How long the directives of a handshake can be fetched. */
const NONCE_MS = 30_000;
const LOOPBACK = new Set(['localhost', '127.0.0.1', '[::1]']);

const cookie = (name: string, value: string, httpOnly = false, seconds = YEAR_SECONDS): string =>
  `${name}=${value}; Path=/; Max-Age=${value === '' ? 0 : seconds}; SameSite=Lax${httpOnly ? '; HttpOnly' : ''}`;

const done = (response: unknown, client: Json | null = null): Answer => ({
  status: 200,
  body: { response, client },
});

/** What the browser's library calls, through the program's own origin. */
export class FrontendApi {
  private readonly nonces = new Map<string, { directives: string[]; until: number }>();

  constructor(private readonly instance: Instance) {}

  /** The cookies that a handshake of a moment ago is to set, for the program's server. */
  takeDirectives(nonce: string): string[] | undefined {
    const found = this.nonces.get(nonce);
    return found && found.until > Date.now() ? found.directives : undefined;
  }

  async answer(asked: Asked): Promise<Answer> {
    const { instance } = this;
    const client = instance.store.state.clients[asked.cookies.__client ?? ''];
    const { method, path } = asked;
    if (path === '/v1/environment') {
      return { status: 200, body: environmentJson(instance.tokens.frontendHost) };
    }
    if (path === '/v1/client/handshake') return this.handshake(asked, client);
    if (path === '/v1/client' && method === 'GET') return done(client ? instance.clientView(client) : null);
    this.refuseForeign(asked);
    try {
      if (path === '/v1/client') {
        const kept = client ?? instance.newClient();
        return this.withCookies(done(instance.clientView(kept)), kept);
      }
      if (path.startsWith('/v1/client/sign_ins')) return await this.signIns(asked, client);
      if (path.startsWith('/v1/client/sign_ups')) return await this.signUps(asked, client);
      if (path.startsWith('/v1/client/sessions')) return this.sessions(asked, client);
      return this.own(asked, client);
    } finally {
      // Wrong attempts count too, so what is remembered is kept whatever the answer.
      if (method !== 'GET' && !path.endsWith('/tokens')) instance.store.save();
    }
  }

  /** A form on somebody else's page may not act for the browser. */
  private refuseForeign({ method, headers }: Asked): void {
    if (method === 'GET' || headers.origin === undefined) return;
    const known = new URL(this.instance.options.webOrigin).hostname;
    const hostname = URL.canParse(headers.origin) ? new URL(headers.origin).hostname : '';
    if (hostname !== known && !LOOPBACK.has(hostname)) {
      throw new ClerkFault(400, 'origin_invalid', 'The Request HTTP Origin header is not allowed.');
    }
  }

  private originOf({ headers }: Asked): string {
    return headers.origin ?? this.instance.options.webOrigin;
  }

  /** Since when the browser is signed in, in seconds; 0 when it is not. */
  private signedInSince(client: Client | undefined): string {
    return client && this.instance.activeSession(client) ? String(Math.floor(client.updatedAt / 1000)) : '0';
  }

  private withCookies(answer: Answer, client: Client): Answer {
    const since = this.signedInSince(client);
    const { cookieSuffix } = this.instance.tokens;
    return {
      ...answer,
      headers: {
        ...answer.headers,
        'set-cookie': [
          cookie('__client', client.id, true),
          cookie('__client_uat', since),
          cookie(`__client_uat_${cookieSuffix}`, since),
        ],
      },
    };
  }

  /** Sends a page's request that came with a stale token back with a fresh one, or none. */
  private handshake(asked: Asked, client: Client | undefined): Answer {
    const { instance } = this;
    const target = asked.query.get('redirect_url') ?? '';
    const back = URL.canParse(target) ? new URL(target) : null;
    const known = new URL(instance.options.webOrigin).hostname;
    if (!back || !(back.hostname === known || LOOPBACK.has(back.hostname))) {
      throw new ClerkFault(400, 'invalid_redirect_url', 'The redirect URL is not allowed.');
    }
    const session = instance.activeSession(client);
    const token = session ? instance.tokenOf({ ...session, origin: back.origin }) : '';
    const { cookieSuffix } = instance.tokens;
    const directives = ['', `_${cookieSuffix}`].flatMap((suffix) => [
      cookie(`__session${suffix}`, token),
      cookie(`__client_uat${suffix}`, this.signedInSince(client)),
    ]);
    const nonce = newId('nonce');
    for (const [key, { until }] of this.nonces) if (until < Date.now()) this.nonces.delete(key);
    this.nonces.set(nonce, {
      directives: [...directives, cookie('__clerk_handshake_nonce', '')],
      until: Date.now() + NONCE_MS,
    });
    return {
      status: 307,
      body: null,
      headers: { location: back.href, 'set-cookie': [cookie('__clerk_handshake_nonce', nonce, false, 10)] },
    };
  }

  private async signIns(asked: Asked, client: Client | undefined): Promise<Answer> {
    const { instance } = this;
    const { method, path, fields } = asked;
    const origin = this.originOf(asked);
    const view = (signIn: SignIn, of: Client) => {
      const user = signIn.userId === null ? null : instance.user(signIn.userId);
      return this.withCookies(done(signInJson(signIn, user), instance.clientView(of)), of);
    };
    if (path === '/v1/client/sign_ins' && method === 'POST') {
      const of = client ?? instance.newClient();
      const identifier = textField(fields, 'identifier');
      return view(
        createSignIn(instance, of, { identifier, password: textField(fields, 'password'), origin }),
        of,
      );
    }
    const [, id = '', action] = path.slice('/v1/client/sign_ins'.length).split('/');
    const signIn = instance.store.state.signIns[id];
    if (!client || signIn?.clientId !== client.id) throw notFound('sign-in');
    if (method === 'POST') {
      const strategy = textField(fields, 'strategy');
      const password = textField(fields, 'password');
      if (action === 'prepare_first_factor') await prepareFirstFactor(instance, signIn, strategy);
      else if (action === 'attempt_first_factor') {
        const code = textField(fields, 'code');
        attemptFirstFactor(instance, client, signIn, { strategy, code, password, origin });
      } else if (action === 'reset_password') {
        const signOutOfOtherSessions = textField(fields, 'sign_out_of_other_sessions') !== 'false';
        resetPassword(instance, client, signIn, { password, signOutOfOtherSessions, origin });
      } else throw notFound(`action ${action ?? ''}`);
    }
    return view(signIn, client);
  }

  private async signUps(asked: Asked, client: Client | undefined): Promise<Answer> {
    const { instance } = this;
    const { method, path, fields } = asked;
    const view = (signUp: SignUp, of: Client) =>
      this.withCookies(done(signUpJson(signUp), instance.clientView(of)), of);
    if (path === '/v1/client/sign_ups' && method === 'POST') {
      const of = client ?? instance.newClient();
      const signUp = createSignUp(instance, of, {
        email: textField(fields, 'email_address'),
        firstName: textField(fields, 'first_name'),
        lastName: textField(fields, 'last_name'),
        password: textField(fields, 'password'),
      });
      return view(signUp, of);
    }
    const [, id = '', action] = path.slice('/v1/client/sign_ups'.length).split('/');
    const signUp = instance.store.state.signUps[id];
    if (!client || signUp?.clientId !== client.id) throw notFound('sign-up');
    if (method === 'POST') {
      if (action === 'prepare_verification') {
        await prepareVerification(instance, signUp, textField(fields, 'strategy'));
      } else if (action === 'attempt_verification') {
        const code = textField(fields, 'code');
        attemptVerification(instance, client, signUp, { code, origin: this.originOf(asked) });
      } else throw notFound(`action ${action ?? ''}`);
    }
    return view(signUp, client);
  }

  private sessions(asked: Asked, client: Client | undefined): Answer {
    const { instance } = this;
    const { method, path, fields } = asked;
    const [, id, action] = path.slice('/v1/client/sessions'.length).split('/');
    if (id === undefined && method === 'DELETE' && client) {
      for (const session of client.sessions) session.status = 'removed';
      return this.afterSignOut(client, instance.clientView(client));
    }
    const session = instance.activeSession(client);
    if (!client || !session || session.id !== id) {
      throw new ClerkFault(401, 'authentication_invalid', 'Invalid authentication');
    }
    if (action === 'tokens') {
      const asOrganization = textField(fields, 'organization_id');
      const organizationId = asOrganization === null ? session.organizationId : asOrganization || null;
      return { status: 200, body: { object: 'token', jwt: instance.tokenOf(session, organizationId) } };
    }
    if (action === 'touch') {
      const wanted = textField(fields, 'active_organization_id');
      if (wanted !== null) session.organizationId = wanted || null;
      session.lastActiveAt = Date.now();
      return this.withCookies(done(instance.sessionView(session), instance.clientView(client)), client);
    }
    if (action === 'end' || action === 'remove') {
      session.status = action === 'end' ? 'ended' : 'removed';
      return this.afterSignOut(client, instance.sessionView(session));
    }
    if (action === undefined && method === 'GET') return done(instance.sessionView(session));
    throw notFound(`action ${action ?? ''}`);
  }

  private afterSignOut(client: Client, response: Json): Answer {
    client.lastActiveSessionId = null;
    client.signInId = null;
    client.signUpId = null;
    client.updatedAt = Date.now();
    return this.withCookies(done(response, this.instance.clientView(client)), client);
  }

  /** What somebody who is signed in asks about themselves. */
  private own({ method, path }: Asked, client: Client | undefined): Answer {
    const { instance } = this;
    const session: Session | undefined = instance.activeSession(client);
    if (!client || !session) throw new ClerkFault(401, 'authentication_invalid', 'Invalid authentication');
    const list = (data: readonly Json[]) => done({ data, total_count: data.length });
    if (method !== 'GET') throw notFound(`address ${path}`);
    if (path === '/v1/me') return done(userJson(instance.user(session.userId)));
    if (path === '/v1/me/organization_memberships') {
      const memberships = instance.store.membershipsOf(session.userId);
      return list(memberships.map((one) => instance.membershipView(one)));
    }
    if (path === '/v1/me/organization_invitations' || path === '/v1/me/organization_suggestions') {
      return list([]);
    }
    const [, organizationId] = /^\/v1\/organizations\/(\w+)\/memberships$/.exec(path) ?? [];
    const members = organizationId === undefined ? [] : instance.store.membersOf(organizationId);
    if (members.some((one) => one.userId === session.userId)) {
      return list(members.map((one) => instance.membershipView(one)));
    }
    throw notFound(`address ${path}`);
  }
}
