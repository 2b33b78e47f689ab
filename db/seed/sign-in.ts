import {
  addMember,
  createOrganization,
  createUser,
  findOrganizationBySlug,
  findUserByEmail,
} from '@/lib/adapters/clerk';

/** The id of the user with this mail address, who is made when there is none; without a password, codes by mail. */
export async function ensureUser(wanted: {
  readonly name: string;
  readonly email: string;
  readonly password?: string;
}): Promise<string> {
  const known = await findUserByEmail(wanted.email);
  return (known ?? (await createUser(wanted))).userId;
}

/** The id of the organisation with this slug, which is made when there is none; who makes it is its owner. */
export async function ensureOrganization(wanted: {
  readonly name: string;
  readonly slug: string;
  readonly createdBy: string;
}): Promise<string> {
  const known = await findOrganizationBySlug(wanted.slug);
  return (known ?? (await createOrganization(wanted))).organizationId;
}

/** The id of a user's membership in an organisation, with this role from now on. */
export async function ensureMembership(wanted: {
  readonly organizationId: string;
  readonly userId: string;
  readonly role: 'owner' | 'salesperson';
}): Promise<string> {
  return (await addMember(wanted)).membershipId;
}
