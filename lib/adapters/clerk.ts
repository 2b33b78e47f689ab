import { auth, clerkClient } from '@clerk/nextjs/server';
import { verifyWebhook } from '@clerk/nextjs/webhooks';
import { NextRequest } from 'next/server';
import type { ClerkEvent } from '@/lib/contracts/clerk-event';
import { splitName, type SignedIn, type SignInSettings, type SignInUser } from '@/lib/contracts/sign-in';
import { environment } from './environment';

/** Why the sign-in service did not do what was asked. */
export class SignInServiceFault extends Error {
  constructor(
    /** `unavailable` may be tried again; `refused` and `notFound` would be answered the same. */
    readonly kind: 'unavailable' | 'refused' | 'notFound',
    readonly code: string | null,
    message: string,
  ) {
    super(message);
    this.name = 'SignInServiceFault';
  }
}

type Client = Awaited<ReturnType<typeof clerkClient>>;
type User = Awaited<ReturnType<Client['users']['getUser']>>;

function faultOf(error: unknown): SignInServiceFault | null {
  if (!(error instanceof Error) || !('status' in error)) return null;
  const { status } = error;
  if (typeof status !== 'number') return null;
  const errors: unknown = Reflect.get(error, 'errors');
  const first: unknown = Array.isArray(errors) ? errors[0] : null;
  const code: unknown = typeof first === 'object' && first !== null ? Reflect.get(first, 'code') : null;
  const kind = status === 404 ? 'notFound' : status === 429 || status >= 500 ? 'unavailable' : 'refused';
  return new SignInServiceFault(kind, typeof code === 'string' ? code : null, error.message);
}

async function ask<T>(work: (client: Client) => Promise<T>): Promise<T> {
  try {
    return await work(await clerkClient());
  } catch (error) {
    throw faultOf(error) ?? error;
  }
}

const nameOf = (user: Pick<User, 'firstName' | 'lastName'>) =>
  [user.firstName, user.lastName].filter(Boolean).join(' ');

const KEPT_MS = 15_000;
const KEPT_MAX = 1000;
const kept = new Map<string, { readonly until: number; readonly known: Promise<SignedIn> }>();

async function readUser(userId: string): Promise<SignedIn> {
  const user = await ask((client) => client.users.getUser(userId));
  const verified = user.emailAddresses.filter((one) => one.verification?.status === 'verified');
  const main = verified.filter((one) => one.id === user.primaryEmailAddressId);
  const addresses = [...main, ...verified].map((one) => one.emailAddress.toLowerCase());
  return { userId, name: nameOf(user), verifiedEmails: [...new Set(addresses)] };
}

/** A user's name and verified addresses, remembered for {@link KEPT_MS}; a failed look-up is not remembered. */
function knownUser(userId: string): Promise<SignedIn> {
  const found = kept.get(userId);
  if (found && found.until > Date.now()) return found.known;
  if (kept.size >= KEPT_MAX) kept.clear();
  const known = readUser(userId);
  kept.set(userId, { until: Date.now() + KEPT_MS, known });
  known.catch(() => kept.delete(userId));
  return known;
}

/** The user id of the request's session, checked with the public key alone; null when nobody is signed in. */
export async function signedInUserId(): Promise<string | null> {
  return (await auth()).userId;
}

/** Who the request comes from; null when nobody is signed in. Throws {@link SignInServiceFault}. */
export async function signedIn(): Promise<SignedIn | null> {
  const userId = await signedInUserId();
  if (!userId) return null;
  try {
    return await knownUser(userId);
  } catch (error) {
    // A token outlives a deleted user by a minute at most.
    if (error instanceof SignInServiceFault && error.kind === 'notFound') return null;
    throw error;
  }
}

/** What the browser may know. */
export function publicSignInSettings(): SignInSettings {
  const { CLERK_PUBLISHABLE_KEY, CLERK_PROXY_PATH } = environment();
  return { publishableKey: CLERK_PUBLISHABLE_KEY, proxyPath: CLERK_PROXY_PATH ?? null };
}

/** Null when nobody signs in with this address. Throws {@link SignInServiceFault}. */
export async function findUserByEmail(email: string): Promise<SignInUser | null> {
  const address = email.trim().toLowerCase();
  const { data } = await ask((client) => client.users.getUserList({ emailAddress: [address], limit: 1 }));
  const [user] = data;
  return user ? { userId: user.id, name: nameOf(user), email: address } : null;
}

/** Makes somebody able to sign in; without a password, by codes sent by mail. Throws {@link SignInServiceFault}. */
export async function createUser(given: {
  readonly name: string;
  readonly email: string;
  readonly password?: string;
}): Promise<{ readonly userId: string }> {
  const user = await ask((client) =>
    client.users.createUser({
      emailAddress: [given.email.trim().toLowerCase()],
      ...splitName(given.name),
      ...(given.password === undefined ? { skipPasswordRequirement: true } : { password: given.password }),
    }),
  );
  return { userId: user.id };
}

/** Null when no contractor has this slug at the sign-in service. Throws {@link SignInServiceFault}. */
export async function findOrganizationBySlug(
  slug: string,
): Promise<{ readonly organizationId: string } | null> {
  try {
    const organization = await ask((client) => client.organizations.getOrganization({ slug }));
    return { organizationId: organization.id };
  } catch (error) {
    if (error instanceof SignInServiceFault && error.kind === 'notFound') return null;
    throw error;
  }
}

/** Makes a contractor's organisation, which `createdBy` then owns. Throws {@link SignInServiceFault}. */
export async function createOrganization(given: {
  readonly name: string;
  readonly slug: string;
  readonly createdBy: string;
}): Promise<{ readonly organizationId: string }> {
  const organization = await ask((client) => client.organizations.createOrganization(given));
  return { organizationId: organization.id };
}

/** Makes a user a member with a role, or gives a member that role. Throws {@link SignInServiceFault}. */
export async function addMember(given: {
  readonly organizationId: string;
  readonly userId: string;
  readonly role: 'owner' | 'salesperson';
}): Promise<{ readonly membershipId: string }> {
  const { organizationId, userId } = given;
  const role = `org:${given.role}`;
  const membership = await ask(async ({ organizations }) => {
    const { data } = await organizations.getOrganizationMembershipList({ organizationId, userId: [userId] });
    const [known] = data;
    if (!known) return organizations.createOrganizationMembership({ organizationId, userId, role });
    if (known.role === role) return known;
    return organizations.updateOrganizationMembership({ organizationId, userId, role });
  });
  return { membershipId: membership.id };
}

const ROLES: Readonly<Record<string, 'owner' | 'salesperson'>> = {
  'org:owner': 'owner',
  'org:salesperson': 'salesperson',
};

/**
 * Checks the signature over the body exactly as it came and reads the event. Null when it does not hold, is too old,
 * or the headers are missing.
 */
export async function verifyClerkWebhook(request: Request): Promise<ClerkEvent | null> {
  const id = request.headers.get('svix-id') ?? '';
  const event = await verifyWebhook(new NextRequest(request), {
    signingSecret: environment().CLERK_WEBHOOK_SIGNING_SECRET,
  }).catch(() => null);
  if (!event) return null;
  switch (event.type) {
    case 'user.created':
    case 'user.updated': {
      const { data } = event;
      const main = data.email_addresses.find((one) => one.id === data.primary_email_address_id);
      return {
        id,
        type: 'userSaved',
        userId: data.id,
        email: main?.email_address.toLowerCase() ?? null,
        name: nameOf({ firstName: data.first_name, lastName: data.last_name }),
      };
    }
    case 'user.deleted':
      if (event.data.id === undefined) return { id, type: 'other', name: event.type };
      return { id, type: 'userDeleted', userId: event.data.id };
    case 'organizationMembership.created':
    case 'organizationMembership.updated':
    case 'organizationMembership.deleted': {
      const { data } = event;
      const { user_id: userId, identifier, first_name, last_name } = data.public_user_data;
      const about = { id, membershipId: data.id, organizationId: data.organization.id, userId };
      if (event.type === 'organizationMembership.deleted') return { ...about, type: 'membershipDeleted' };
      const role = ROLES[data.role];
      // A role that this program does not know opens nothing.
      if (!role) return { ...about, type: 'membershipShut' };
      return {
        ...about,
        type: 'membershipSaved',
        role,
        email: identifier.toLowerCase(),
        name: nameOf({ firstName: first_name, lastName: last_name }) || identifier,
      };
    }
    default:
      return { id, type: 'other', name: event.type };
  }
}
