import { isClerkAPIResponseError } from '@clerk/nextjs/errors';

/** Why a step of signing in did not go on, as a sentence a person can act on. */
export interface Problem {
  /** The field it belongs to; null when it is about the whole step. */
  readonly field: 'email' | 'code' | 'password' | null;
  readonly sentence: string;
  /** Only a new code helps. */
  readonly newCode?: boolean;
  /** Seconds after which it may be tried again. */
  readonly waitSeconds?: number;
}

/** What the sign-in service answered, taken apart. */
interface Refusal {
  readonly code: string;
  readonly waitSeconds: number | undefined;
}

function refusalOf(error: unknown): Refusal {
  if (isClerkAPIResponseError(error)) {
    const [first] = error.errors;
    return { code: first?.code ?? 'unknown', waitSeconds: error.retryAfter };
  }
  const code: unknown = error instanceof Error ? Reflect.get(error, 'code') : null;
  return { code: typeof code === 'string' ? code : 'unknown', waitSeconds: undefined };
}

/** Whether the service knows no such user. */
export const isUnknownAddress = (error: unknown): boolean =>
  refusalOf(error).code === 'form_identifier_not_found';

/** Whether this browser is signed in already. */
export const isSignedInAlready = (error: unknown): boolean =>
  ['session_exists', 'identifier_already_signed_in'].includes(refusalOf(error).code);

function inMinutes(seconds: number): string {
  const minutes = Math.max(1, Math.ceil(seconds / 60));
  return minutes === 1 ? 'a minute' : `${minutes} minutes`;
}

/** The sentence for what the sign-in service refused at a contractor's. */
export function problemOf(error: unknown, contractor: { readonly name: string }): Problem {
  const { code, waitSeconds } = refusalOf(error);
  const wait = inMinutes(waitSeconds ?? 60);
  switch (code) {
    case 'form_identifier_not_found':
      return {
        field: 'email',
        sentence: `Nobody signs in to ${contractor.name} with this address. Look at it once more, or use the one your invitation came to.`,
      };
    case 'form_param_format_invalid':
    case 'form_param_nil':
      return { field: 'email', sentence: 'This is not a whole mail address.' };
    case 'form_code_incorrect':
      return { field: 'code', sentence: 'This is not the code of the newest mail. Please look once more.' };
    case 'verification_expired':
      return {
        field: null,
        newCode: true,
        sentence: 'This code is too old. Codes are good for 10 minutes; please have a new one sent.',
      };
    case 'verification_failed':
      return {
        field: null,
        newCode: true,
        sentence: 'That was a wrong code too many times. Please have a new one sent.',
      };
    case 'too_many_requests':
      return {
        field: null,
        waitSeconds: waitSeconds ?? 60,
        sentence: `Several codes were sent already. The newest is good; another can be sent in ${wait}.`,
      };
    case 'form_password_incorrect':
      return { field: 'password', sentence: 'This password does not go with the address.' };
    case 'user_locked':
      return {
        field: null,
        sentence: 'Wrong passwords came too often. Sign in with a code by mail, or try again later.',
      };
    case 'strategy_for_user_invalid':
    case 'factor_not_found':
      return {
        field: null,
        sentence: 'This address has no password here. Sign in with a code by mail instead.',
      };
    case 'form_password_length_too_short':
      return { field: 'password', sentence: 'A password has 8 characters or more.' };
    case 'form_password_length_too_long':
      return { field: 'password', sentence: 'A password has 72 characters or less.' };
    case 'form_password_pwned':
      return {
        field: 'password',
        sentence: 'This password is known from a leak at some other service. Please choose another.',
      };
    default:
      return {
        field: null,
        sentence: 'Signing in cannot be reached just now. Please try again in a moment.',
      };
  }
}
