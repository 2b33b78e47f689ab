import { randomBytes, scryptSync, timingSafeEqual } from 'node:crypto';
import { ClerkFault, formFault } from './fault';
import type { Store, User } from './store';

const LENGTH_MIN = 8;
const LENGTH_MAX = 72;
const WRONG_MAX = 10;
const WRONG_WITHIN_MS = 10 * 60_000;

/** Salt and key of scrypt in hexadecimal. Throws when the password is too short or too long. */
export function hashPassword(password: string): string {
  if (password.length < LENGTH_MIN) {
    throw formFault(
      'form_password_length_too_short',
      'password',
      `Passwords must be ${LENGTH_MIN} characters or more.`,
    );
  }
  if (password.length > LENGTH_MAX) {
    throw formFault(
      'form_password_length_too_long',
      'password',
      `Passwords must be ${LENGTH_MAX} characters or less.`,
    );
  }
  const salt = randomBytes(16);
  return `${salt.toString('hex')}:${scryptSync(password, salt, 32).toString('hex')}`;
}

function matches(password: string, hash: string): boolean {
  const [salt = '', key = ''] = hash.split(':');
  const given = scryptSync(password, Buffer.from(salt, 'hex'), 32);
  return timingSafeEqual(given, Buffer.from(key, 'hex'));
}

/** Throws unless the password is the user's. After ten wrong ones in ten minutes none is looked at. */
export function checkPassword(store: Store, user: User, password: string): void {
  const since = Date.now() - WRONG_WITHIN_MS;
  const wrong = (store.state.wrongPasswords[user.id] ?? []).filter((at) => at > since);
  if (wrong.length >= WRONG_MAX) {
    const seconds = Math.ceil(((wrong[0] ?? Date.now()) + WRONG_WITHIN_MS - Date.now()) / 1000);
    throw new ClerkFault(403, 'user_locked', 'Your account is locked. Please try again later.', {
      lockout_expires_in_seconds: seconds,
    });
  }
  if (user.passwordHash !== null && matches(password, user.passwordHash)) {
    delete store.state.wrongPasswords[user.id];
    return;
  }
  store.state.wrongPasswords[user.id] = [...wrong, Date.now()];
  store.save();
  throw formFault(
    'form_password_incorrect',
    'password',
    'Password is incorrect. Try again, or use another method.',
  );
}
