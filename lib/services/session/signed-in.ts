import { signedIn, signedInUserId } from '@/lib/adapters/clerk';
import type { SignedIn } from '@/lib/contracts/sign-in';

/** The sign-in's user id of the request, or null. Costs no call. */
export function findSignedInUserId(): Promise<string | null> {
  return signedInUserId();
}

/** Who the request comes from, with the addresses they have shown to be theirs, or null. */
export function findSignedIn(): Promise<SignedIn | null> {
  return signedIn();
}
