import { createClerkClient } from '@clerk/nextjs/server';
import { environment } from './environment';

/** The organisation roles that a fresh instance of the sign-in service has. */
const ROLE_KEYS = { owner: 'org:admin', salesperson: 'org:member' } as const;

function client() {
  const { CLERK_SECRET_KEY, CLERK_PUBLISHABLE_KEY, CLERK_API_URL } = environment();
  return createClerkClient({
    secretKey: CLERK_SECRET_KEY,
    publishableKey: CLERK_PUBLISHABLE_KEY,
    ...(CLERK_API_URL ? { apiUrl: CLERK_API_URL } : {}),
    telemetry: { disabled: true },
  });
}

const isNotFound = (error: unknown) =>
  typeof error === 'object' && error !== null && Reflect.get(error, 'status') === 404;

/** The id of the user with this mail address, who is made when there is none; without a password, codes by mail. */
export async function ensureUser(wanted: {
  readonly name: string;
  readonly email: string;
  readonly password?: string;
}): Promise<string> {
  const { users } = client();
  const { data } = await users.getUserList({ emailAddress: [wanted.email], limit: 1 });
  const [known] = data;
  if (known) return known.id;
  const [firstName = wanted.name, ...rest] = wanted.name.split(' ');
  const made = await users.createUser({
    emailAddress: [wanted.email],
    firstName,
    lastName: rest.join(' '),
    ...(wanted.password ? { password: wanted.password } : { skipPasswordRequirement: true }),
  });
  return made.id;
}

/** The id of the organisation with this slug, which is made when there is none; who makes it is its owner. */
export async function ensureOrganization(wanted: {
  readonly name: string;
  readonly slug: string;
  readonly createdBy: string;
}): Promise<string> {
  const { organizations } = client();
  try {
    return (await organizations.getOrganization({ slug: wanted.slug })).id;
  } catch (error) {
    if (!isNotFound(error)) throw error;
  }
  return (await organizations.createOrganization(wanted)).id;
}

/** The id of a user's membership in an organisation, which is made when there is none. */
export async function ensureMembership(wanted: {
  readonly organizationId: string;
  readonly userId: string;
  readonly role: keyof typeof ROLE_KEYS;
}): Promise<string> {
  const { organizationId, userId } = wanted;
  const { organizations } = client();
  const { data } = await organizations.getOrganizationMembershipList({
    organizationId,
    userId: [userId],
    limit: 100,
  });
  const known = data.find((membership) => membership.publicUserData?.userId === userId);
  if (known) return known.id;
  const role = ROLE_KEYS[wanted.role];
  return (await organizations.createOrganizationMembership({ organizationId, userId, role })).id;
}
