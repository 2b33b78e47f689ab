import type { Role } from './actor';

/** Who may do what. Services decide with it, screens disable with its reason, tests walk it. */
export const RIGHTS = {
  'job.list': ['owner', 'salesperson'],
  'job.read': ['owner', 'salesperson', 'homeowner'],
  'job.create': ['owner', 'salesperson'],
  'job.moveStage': ['owner', 'salesperson'],
  'survey.import': ['owner', 'salesperson'],
  'edition.publish': ['owner'],
  'invitation.send': ['owner', 'salesperson'],
  'invitation.revoke': ['owner', 'salesperson'],
  'scheme.read': ['owner', 'salesperson', 'homeowner'],
  'scheme.write': ['owner', 'salesperson', 'homeowner'],
  'offer.prepare': ['owner', 'salesperson', 'homeowner'],
  'offer.read': ['owner', 'salesperson', 'homeowner'],
  'offer.sign': ['homeowner'],
  'offer.countersign': ['owner', 'salesperson'],
  'book.read': ['owner', 'salesperson', 'homeowner'],
  'changeOrder.read': ['owner', 'salesperson', 'homeowner'],
  'changeOrder.start': ['owner', 'salesperson', 'homeowner'],
  'changeOrder.withdraw': ['owner', 'salesperson', 'homeowner'],
  'changeOrder.decide': ['owner'],
  'draw.read': ['owner', 'salesperson', 'homeowner'],
  'draw.pay': ['homeowner'],
  'payment.refund': ['owner'],
  'doorOrder.read': ['owner', 'salesperson'],
  'approval.list': ['owner'],
  'cost.read': ['owner'],
} as const satisfies Record<string, readonly Role[]>;

export type Verb = keyof typeof RIGHTS;

export function may(role: Role, verb: Verb): boolean {
  return (RIGHTS[verb] as readonly Role[]).includes(role);
}

const WHO: Record<Role, string> = {
  owner: 'the owner',
  salesperson: 'a salesperson',
  homeowner: 'the homeowner',
};

/** The sentence a disabled control shows. */
export function reasonNot(role: Role, verb: Verb): string | null {
  if (may(role, verb)) return null;
  return `This is for ${RIGHTS[verb].map((r) => WHO[r]).join(' or ')}.`;
}
