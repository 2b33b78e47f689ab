import { z } from 'zod';
import { ClerkFault, formFault, notFound } from './fault';
import type { Answer, Asked } from './http';
import type { Instance } from './instance';
import { checkPassword, hashPassword } from './passwords';
import { sessionRecordJson, userJson, type Json } from './objects';
import { newId, roleShape, type Membership, type Organization } from './store';

const ok = (body: unknown): Answer => ({ status: 200, body });
const deleted = (object: string, id: string): Answer => ok({ object, id, deleted: true });

const name = z.string().trim().max(256).nullish();
const newUserShape = z.object({
  email_address: z.array(z.email()).min(1),
  first_name: name,
  last_name: name,
  password: z.string().nullish(),
  external_id: z.string().nullish(),
});
const userChangeShape = z.object({
  first_name: name,
  last_name: name,
  password: z.string().nullish(),
  external_id: z.string().nullish(),
  public_metadata: z.record(z.string(), z.unknown()).optional(),
});
const newOrganizationShape = z.object({
  name: z.string().trim().min(1).max(256),
  slug: z
    .string()
    .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/)
    .optional(),
  created_by: z.string().nullish(),
});
const newMembershipShape = z.object({ user_id: z.string(), role: roleShape });
const roleChangeShape = z.object({ role: roleShape });

/** Reads the fields, or refuses them by the name of the first that is wrong. */
function read<T>(shape: z.ZodType<T>, fields: unknown): T {
  const parsed = shape.safeParse(fields);
  if (parsed.success) return parsed.data;
  const [issue] = parsed.error.issues;
  throw formFault('form_param_value_invalid', String(issue?.path[0] ?? ''), issue?.message ?? 'Invalid.');
}

/** What servers call with the secret key: users, organisations and who belongs to them. */
export class BackendApi {
  constructor(
    private readonly instance: Instance,
    private readonly takeDirectives: (nonce: string) => string[] | undefined,
  ) {}

  answer(asked: Asked): Answer {
    const [version, noun, ...rest] = asked.path.split('/').slice(1);
    if (version === 'v1') {
      if (noun === 'users') return this.saved(asked, this.users(asked, rest));
      if (noun === 'organizations') return this.saved(asked, this.organizations(asked, rest));
      if (noun === 'sessions') return this.saved(asked, this.sessions(asked, rest));
      if (noun === 'jwks') return ok(this.instance.tokens.keySet);
      if (noun === 'clients' && rest[0] === 'handshake_payload') {
        const nonce = asked.query.get('nonce') ?? '';
        const directives = this.takeDirectives(nonce);
        if (directives) return ok({ nonce, directives });
      }
    }
    throw notFound(`address for ${asked.method} ${asked.path}`);
  }

  private saved({ method }: Asked, answer: Answer): Answer {
    if (method !== 'GET') this.instance.store.save();
    return answer;
  }

  /** One page of a list; 10 a page unless asked otherwise. */
  private page<T>(asked: Asked, all: readonly T[]): T[] {
    const offset = Number(asked.query.get('offset') ?? 0);
    const limit = Number(asked.query.get('limit') ?? 10);
    return all.slice(offset, offset + Math.min(limit, 500));
  }

  private listed(asked: Asked, all: readonly Json[]): Answer {
    return ok({ data: this.page(asked, all), total_count: all.length });
  }

  private users(asked: Asked, [id, part]: readonly string[]): Answer {
    const { instance } = this;
    const { method } = asked;
    if (id === undefined && method === 'POST') return ok(userJson(this.createUser(asked)));
    if (id === undefined) return ok(this.page(asked, this.usersAsked(asked)).map(userJson));
    if (id === 'count') return ok({ object: 'total_count', total_count: this.usersAsked(asked).length });
    const user = instance.user(id);
    if (part === 'organization_memberships') {
      return this.listed(
        asked,
        instance.store.membershipsOf(user.id).map((one) => instance.membershipView(one)),
      );
    }
    if (part === 'verify_password') {
      checkPassword(instance.store, user, String(asked.fields.password ?? ''));
      return ok({ verified: true });
    }
    if (method === 'GET') return ok(userJson(user));
    if (method === 'DELETE') {
      instance.deleteUser(user);
      return deleted('user', user.id);
    }
    if (method !== 'PATCH') throw notFound(`address for ${method}`);
    const change = read(userChangeShape, asked.fields);
    if (change.first_name !== undefined) user.firstName = change.first_name || null;
    if (change.last_name !== undefined) user.lastName = change.last_name || null;
    if (change.external_id !== undefined) user.externalId = change.external_id;
    if (change.public_metadata) user.publicMetadata = change.public_metadata;
    if (change.password) user.passwordHash = hashPassword(change.password);
    user.updatedAt = Date.now();
    instance.deliveries.emit('user.updated', userJson(user));
    return ok(userJson(user));
  }

  private createUser(asked: Asked) {
    const given = read(newUserShape, asked.fields);
    const [email = ''] = given.email_address;
    if (this.instance.store.userByEmail(email)) {
      throw formFault(
        'form_identifier_exists',
        'email_address',
        'That email address is taken. Please try another.',
      );
    }
    return this.instance.createUser({
      email,
      firstName: given.first_name ?? null,
      lastName: given.last_name ?? null,
      passwordHash: given.password ? hashPassword(given.password) : null,
      externalId: given.external_id ?? null,
    });
  }

  /** All users, or those that the filters name; several values of one filter are alternatives. */
  private usersAsked({ query }: Asked) {
    const addresses = query.getAll('email_address').map((one) => one.toLowerCase());
    const ids = query.getAll('user_id');
    const words = (query.get('query') ?? '').toLowerCase();
    return Object.values(this.instance.store.state.users)
      .filter((user) => {
        const own = user.emails.map((one) => one.address);
        const text = [user.firstName, user.lastName, ...own].join(' ').toLowerCase();
        return (
          (addresses.length === 0 || own.some((one) => addresses.includes(one))) &&
          (ids.length === 0 || ids.includes(user.id)) &&
          text.includes(words)
        );
      })
      .sort((a, b) => b.createdAt - a.createdAt);
  }

  private organizations(asked: Asked, [key, part, memberId]: readonly string[]): Answer {
    const { instance } = this;
    const { method } = asked;
    const all = Object.values(instance.store.state.organizations);
    if (key === undefined && method === 'POST') {
      return ok(instance.organizationView(this.createOrganization(asked)));
    }
    if (key === undefined) {
      return this.listed(
        asked,
        all.map((one) => instance.organizationView(one)),
      );
    }
    const organization = instance.organization(key);
    if (part === 'memberships') return this.memberships(asked, organization, memberId);
    if (part !== undefined) throw notFound(`address for ${method} ${asked.path}`);
    if (method === 'GET') return ok(instance.organizationView(organization));
    if (method === 'PATCH') {
      const { name: renamed } = read(newOrganizationShape.partial(), asked.fields);
      if (renamed) organization.name = renamed;
      organization.updatedAt = Date.now();
      instance.deliveries.emit('organization.updated', instance.organizationView(organization));
      return ok(instance.organizationView(organization));
    }
    if (method !== 'DELETE') throw notFound(`address for ${method}`);
    for (const membership of instance.store.membersOf(organization.id)) instance.deleteMembership(membership);
    delete instance.store.state.organizations[organization.id];
    instance.deliveries.emit('organization.deleted', {
      object: 'organization',
      id: organization.id,
      deleted: true,
    });
    return deleted('organization', organization.id);
  }

  /** Whoever creates an organisation owns it. */
  private createOrganization(asked: Asked): Organization {
    const { instance } = this;
    const given = read(newOrganizationShape, asked.fields);
    const creator = given.created_by ? instance.user(given.created_by) : null;
    const slug = given.slug ?? given.name.toLowerCase().replace(/[^a-z0-9]+/g, '-');
    if (Object.values(instance.store.state.organizations).some((one) => one.slug === slug)) {
      throw formFault('form_identifier_exists', 'slug', 'That slug is taken. Please try another.');
    }
    const now = Date.now();
    const organization: Organization = {
      id: newId('org'),
      name: given.name,
      slug,
      createdBy: creator?.id ?? null,
      createdAt: now,
      updatedAt: now,
    };
    instance.store.state.organizations[organization.id] = organization;
    instance.deliveries.emit('organization.created', instance.organizationView(organization));
    if (creator) instance.addMembership(organization, creator, 'org:owner');
    return organization;
  }

  private memberships(asked: Asked, organization: Organization, userId: string | undefined): Answer {
    const { instance } = this;
    const { method } = asked;
    const members = instance.store.membersOf(organization.id);
    if (userId === undefined && method === 'POST') {
      const given = read(newMembershipShape, asked.fields);
      const membership = instance.addMembership(organization, instance.user(given.user_id), given.role);
      return ok(instance.membershipView(membership));
    }
    if (userId === undefined) {
      const ids = asked.query.getAll('user_id');
      const wanted = ids.length === 0 ? members : members.filter((one) => ids.includes(one.userId));
      return this.listed(
        asked,
        wanted.map((one) => instance.membershipView(one)),
      );
    }
    const membership = members.find((one) => one.userId === userId);
    if (!membership) throw notFound('membership');
    if (method === 'PATCH') return ok(this.changeRole(asked, membership));
    if (method !== 'DELETE') throw notFound(`address for ${method}`);
    const view = instance.membershipView(membership);
    instance.deleteMembership(membership);
    return ok(view);
  }

  private changeRole(asked: Asked, membership: Membership): Json {
    membership.role = read(roleChangeShape, asked.fields).role;
    membership.updatedAt = Date.now();
    const view = this.instance.membershipView(membership);
    this.instance.deliveries.emit('organizationMembership.updated', view);
    return view;
  }

  private sessions(asked: Asked, [id, action]: readonly string[]): Answer {
    const { instance } = this;
    if (id === undefined) {
      const userId = asked.query.get('user_id');
      const all = Object.values(instance.store.state.clients).flatMap((client) =>
        client.sessions
          .filter((one) => userId === null || one.userId === userId)
          .map((one) => sessionRecordJson(client, one)),
      );
      return ok(this.page(asked, all));
    }
    const found = instance.store.session(id);
    if (!found) throw notFound('session');
    if (action === 'revoke' && asked.method === 'POST') {
      found.session.status = 'revoked';
      found.client.updatedAt = Date.now();
    } else if (action === 'refresh') {
      throw new ClerkFault(400, 'refresh_unsupported', 'Refresh tokens are not set up.');
    } else if (action !== undefined) throw notFound(`action ${action}`);
    return ok(sessionRecordJson(found.client, found.session));
  }
}
