export const ROLES = ['owner', 'salesperson', 'homeowner'] as const;
export type Role = (typeof ROLES)[number];

/** Somebody of the contractor's staff. */
export interface Member {
  readonly kind: 'member';
  readonly companyId: string;
  readonly personId: string;
  readonly role: 'owner' | 'salesperson';
  readonly name: string;
  readonly email: string;
}

/** A homeowner, who sees one job alone. */
export interface Guest {
  readonly kind: 'guest';
  readonly companyId: string;
  readonly jobId: string;
  readonly personId: string;
  readonly role: 'homeowner';
  readonly name: string;
  readonly email: string;
  /** Whether their signature is required. */
  readonly signer: boolean;
}

/** A background process inside one company. */
export interface Worker {
  readonly kind: 'worker';
  readonly companyId: string;
}

/** Who asks; every service takes one first. */
export type Actor = Member | Guest;
