/** What a sign-in service's webhook tells, in our own words. */
export type ClerkEvent =
  | {
      readonly id: string;
      readonly type: 'userSaved';
      readonly userId: string;
      readonly email: string | null;
      readonly name: string;
    }
  | { readonly id: string; readonly type: 'userDeleted'; readonly userId: string }
  | {
      readonly id: string;
      readonly type: 'membershipSaved';
      readonly membershipId: string;
      readonly organizationId: string;
      readonly userId: string;
      readonly role: 'owner' | 'salesperson';
      readonly email: string;
      readonly name: string;
    }
  | {
      readonly id: string;
      readonly type: 'membershipDeleted';
      readonly membershipId: string;
      readonly organizationId: string;
      readonly userId: string;
    }
  /** Its role is one that this program does not know: nothing is open until it has another. */
  | {
      readonly id: string;
      readonly type: 'membershipShut';
      readonly membershipId: string;
      readonly organizationId: string;
      readonly userId: string;
    }
  | { readonly id: string; readonly type: 'other'; readonly name: string };
