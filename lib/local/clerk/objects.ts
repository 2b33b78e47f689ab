import type { Client, Membership, Organization, Session, SignIn, SignUp, User, Verification } from './store';

export type Json = Record<string, unknown>;

/** The service's words for the state of a verification; null where none has begun. */
function verificationJson(verification: Verification | null): Json | null {
  if (!verification) return null;
  const { status, strategy, attempts, expireAt } = verification;
  const overdue = status === 'unverified' && expireAt !== null && expireAt <= Date.now();
  return {
    object: 'verification',
    status: overdue ? 'expired' : status,
    strategy,
    attempts,
    expire_at: expireAt,
  };
}

export const organizationJson = (organization: Organization, members: number): Json => ({
  object: 'organization',
  id: organization.id,
  name: organization.name,
  slug: organization.slug,
  image_url: '',
  has_image: false,
  members_count: members,
  pending_invitations_count: 0,
  max_allowed_memberships: 500,
  admin_delete_enabled: true,
  public_metadata: {},
  private_metadata: {},
  created_by: organization.createdBy,
  created_at: organization.createdAt,
  updated_at: organization.updatedAt,
});

export const primaryEmail = (user: User) =>
  user.emails.find((one) => one.id === user.primaryEmailId) ?? user.emails[0];

const publicUserData = (user: User): Json => ({
  user_id: user.id,
  first_name: user.firstName,
  last_name: user.lastName,
  image_url: '',
  has_image: false,
  identifier: primaryEmail(user)?.address ?? '',
});

export const membershipJson = (
  membership: Membership,
  organization: Organization,
  members: number,
  user: User,
): Json => ({
  object: 'organization_membership',
  id: membership.id,
  role: membership.role,
  role_name: membership.role.replace(/^org:/, ''),
  permissions: [],
  public_metadata: {},
  private_metadata: {},
  organization: organizationJson(organization, members),
  public_user_data: publicUserData(user),
  created_at: membership.createdAt,
  updated_at: membership.updatedAt,
});

export const userJson = (user: User): Json => ({
  object: 'user',
  id: user.id,
  external_id: user.externalId,
  username: null,
  first_name: user.firstName,
  last_name: user.lastName,
  image_url: '',
  has_image: false,
  primary_email_address_id: user.primaryEmailId,
  primary_phone_number_id: null,
  primary_web3_wallet_id: null,
  password_enabled: user.passwordHash !== null,
  two_factor_enabled: false,
  totp_enabled: false,
  backup_code_enabled: false,
  email_addresses: user.emails.map((email) => ({
    object: 'email_address',
    id: email.id,
    email_address: email.address,
    reserved: false,
    verification: {
      object: 'verification',
      status: email.verified ? 'verified' : 'unverified',
      strategy: 'email_code',
      attempts: 1,
      expire_at: null,
    },
    linked_to: [],
    created_at: user.createdAt,
    updated_at: user.createdAt,
  })),
  phone_numbers: [],
  web3_wallets: [],
  passkeys: [],
  external_accounts: [],
  enterprise_accounts: [],
  public_metadata: user.publicMetadata,
  private_metadata: {},
  unsafe_metadata: {},
  create_organization_enabled: false,
  delete_self_enabled: false,
  banned: false,
  locked: false,
  last_sign_in_at: user.lastSignInAt,
  last_active_at: user.lastSignInAt,
  created_at: user.createdAt,
  updated_at: user.updatedAt,
});

/** A session as the browser's library reads it, with its newest token. */
export const sessionJson = (
  session: Session,
  user: User,
  memberships: readonly Json[],
  token: string | null,
): Json => ({
  object: 'session',
  id: session.id,
  status: session.status,
  expire_at: session.expireAt,
  abandon_at: session.expireAt + 23 * 86_400_000,
  last_active_at: session.lastActiveAt,
  last_active_organization_id: session.organizationId,
  actor: null,
  tasks: null,
  factor_verification_age: [Math.max(0, Math.floor((Date.now() - session.createdAt) / 60_000)), -1],
  user: { ...userJson(user), organization_memberships: memberships },
  public_user_data: publicUserData(user),
  last_active_token: token === null ? null : { object: 'token', jwt: token },
  created_at: session.createdAt,
  updated_at: session.lastActiveAt,
});

/** A session as a server reads it. */
export const sessionRecordJson = (client: Client, session: Session): Json => ({
  object: 'session',
  id: session.id,
  client_id: client.id,
  user_id: session.userId,
  status: session.status,
  actor: null,
  last_active_organization_id: session.organizationId,
  last_active_at: session.lastActiveAt,
  expire_at: session.expireAt,
  abandon_at: session.expireAt + 23 * 86_400_000,
  created_at: session.createdAt,
  updated_at: session.lastActiveAt,
});

const hideMiddle = (address: string) => address.replace(/^(.).*(@.*)$/, '$1*****$2');

function firstFactors(user: User): Json[] {
  const email = primaryEmail(user);
  const mailed = (strategy: string): Json[] =>
    email
      ? [
          {
            strategy,
            email_address_id: email.id,
            safe_identifier: hideMiddle(email.address),
            primary: true,
          },
        ]
      : [];
  const withPassword =
    user.passwordHash === null ? [] : [{ strategy: 'password' }, ...mailed('reset_password_email_code')];
  return [...mailed('email_code'), ...withPassword];
}

export const signInJson = (signIn: SignIn, user: User | null): Json => ({
  object: 'sign_in',
  id: signIn.id,
  status: signIn.status,
  supported_identifiers: ['email_address'],
  supported_first_factors: user && signIn.status !== 'complete' ? firstFactors(user) : null,
  supported_second_factors: null,
  first_factor_verification: verificationJson(signIn.verification),
  second_factor_verification: null,
  identifier: signIn.identifier,
  user_data: user
    ? { first_name: user.firstName, last_name: user.lastName, image_url: '', has_image: false }
    : null,
  created_session_id: signIn.createdSessionId,
});

function nextAction(signUp: SignUp): string {
  if (signUp.verification?.status === 'verified') return '';
  return signUp.verification ? 'needs_attempt' : 'needs_prepare';
}

export const signUpJson = (signUp: SignUp): Json => ({
  object: 'sign_up',
  id: signUp.id,
  status: signUp.status,
  required_fields: ['email_address'],
  optional_fields: ['first_name', 'last_name', 'password'],
  missing_fields: [],
  unverified_fields: signUp.status === 'complete' ? [] : ['email_address'],
  verifications: {
    email_address: {
      ...(verificationJson(signUp.verification) ?? {
        object: 'verification',
        status: 'unverified',
        strategy: 'email_code',
        attempts: 0,
        expire_at: null,
      }),
      next_action: nextAction(signUp),
      supported_strategies: ['email_code'],
    },
    phone_number: null,
    web3_wallet: null,
    external_account: null,
  },
  username: null,
  first_name: signUp.firstName,
  last_name: signUp.lastName,
  email_address: signUp.email,
  phone_number: null,
  web3_wallet: null,
  external_account_strategy: null,
  external_account: null,
  has_password: signUp.passwordHash !== null,
  unsafe_metadata: {},
  public_metadata: {},
  created_session_id: signUp.createdSessionId,
  created_user_id: signUp.createdUserId,
  abandon_at: signUp.createdAt + 86_400_000,
  legal_accepted_at: null,
  locale: null,
});
