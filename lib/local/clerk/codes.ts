import { randomInt } from 'node:crypto';
import { ClerkFault, formFault } from './fault';
import type { Verification } from './store';

/** How long a mailed code is good. */
export const CODE_MS = 10 * 60_000;
/** Wrong codes after which only a new one helps. */
const ATTEMPTS_MAX = 5;
/** Mails with a code for one sign-in, counted over {@link CODE_MS}. */
const SENDS_MAX = 4;

/** Six digits; never the ones of the mail before. */
function otherThan(earlier: string | null): string {
  const code = randomInt(1_000_000).toString().padStart(6, '0');
  return code === earlier ? otherThan(earlier) : code;
}

/** A new code in place of any earlier one. Throws when too many were asked for. */
export function issueCode(
  earlier: Verification | null,
  strategy: 'email_code' | 'reset_password_email_code',
): Verification & { code: string } {
  const now = Date.now();
  const sentAt = (earlier?.sentAt ?? []).filter((at) => at > now - CODE_MS);
  if (sentAt.length >= SENDS_MAX) {
    const seconds = Math.ceil(((sentAt[0] ?? now) + CODE_MS - now) / 1000);
    throw new ClerkFault(
      429,
      'too_many_requests',
      'Too many requests. Please try again in a bit.',
      {},
      seconds,
    );
  }
  return {
    strategy,
    status: 'unverified',
    code: otherThan(earlier?.code ?? null),
    attempts: 0,
    sentAt: [...sentAt, now],
    expireAt: now + CODE_MS,
  };
}

/**
 * Counts an attempt and marks the verification verified, or throws: wrong code, expired, or too many attempts.
 * The caller stores the verification whatever happens.
 */
export function attemptCode(verification: Verification | null, code: string): void {
  if (!verification || verification.code === null) {
    throw new ClerkFault(400, 'verification_missing', 'No code was asked for.');
  }
  if (verification.status === 'verified') {
    throw new ClerkFault(
      400,
      'verification_already_verified',
      'This verification has already been verified.',
    );
  }
  if (verification.expireAt !== null && verification.expireAt <= Date.now()) {
    verification.status = 'expired';
    throw new ClerkFault(400, 'verification_expired', 'This verification has expired.');
  }
  if (verification.attempts >= ATTEMPTS_MAX) {
    verification.status = 'failed';
    throw new ClerkFault(
      400,
      'verification_failed',
      'Too many failed attempts. You have to try again with the same or another method.',
    );
  }
  verification.attempts += 1;
  if (code.replace(/\s/g, '') !== verification.code) {
    throw formFault('form_code_incorrect', 'code', 'Incorrect code');
  }
  verification.status = 'verified';
}
