import { publicSignInSettings } from '@/lib/adapters/clerk';
import type { SignInSettings } from '@/lib/contracts/sign-in';

/** What the browser's part of sign-in is told. */
export function readSignInSettings(): SignInSettings {
  return publicSignInSettings();
}
