import { environment } from '@/lib/adapters/environment';

/** Whether a browser's `Origin` header names this program itself; a missing one does not. */
export function isOwnOrigin(origin: string | null): boolean {
  return origin !== null && origin === new URL(environment().APP_ORIGIN).origin;
}
