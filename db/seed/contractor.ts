import type { Member } from '@/lib/contracts/actor';
import type { CompanyInput } from '@/lib/contracts/company';
import type { Result } from '@/lib/contracts/result';
import { createCompany } from '@/lib/services/company/create';
import { findCompanyBySlug } from '@/lib/services/company/find-by-slug';
import { findMember } from '@/lib/services/person/find-member';
import { syncClerkEvent } from '@/lib/services/person/sync-clerk-event';
import type { Staff } from './demo';
import { ensureMembership, ensureOrganization, ensureUser } from './sign-in';

/** The value, or an error that says what was refused. */
export function done<T>(result: Result<T>): T {
  if (result.ok) return result.value;
  const faults = (result.fault.faults ?? []).map(({ path, message }) => `\n  ${path}: ${message}`);
  throw new Error(`${result.fault.sentence}${faults.join('')}`);
}

/**
 * Sets a contractor up with its staff, who get a sign-in with the password, as far as that has not been done.
 * The first of the staff owns the organisation. Answers them in order.
 */
export async function ensureContractor(
  company: Omit<CompanyInput, 'clerkOrganizationId'>,
  staff: readonly Staff[],
  password: string,
): Promise<Member[]> {
  const users: string[] = [];
  for (const { name, email } of staff) users.push(await ensureUser({ name, email, password }));
  const organizationId = await ensureOrganization({
    name: company.name,
    slug: company.slug,
    createdBy: users[0] ?? '',
  });
  let companyId = (await findCompanyBySlug(company.slug))?.id;
  companyId ??= done(await createCompany({ ...company, clerkOrganizationId: organizationId })).companyId;
  const members: Member[] = [];
  for (const [index, { name, email, role }] of staff.entries()) {
    const userId = users[index] ?? '';
    const membershipId = await ensureMembership({ organizationId, userId, role });
    // What the sign-in service's webhook will tell, said before anybody listens for it.
    await syncClerkEvent({
      id: `seed/${membershipId}`,
      type: 'membershipSaved',
      membershipId,
      organizationId,
      userId,
      role,
      email,
      name,
    });
    const member = await findMember(companyId, email);
    if (!member) throw new Error(`${name} did not become a member of ${company.name}.`);
    members.push(member);
  }
  return members;
}
