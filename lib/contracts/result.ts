/** Why a verb was refused; each maps to one HTTP status. */
export const FAULT_STATUS = {
  signedOut: 401,
  notAllowed: 403,
  notFound: 404,
  conflict: 409,
  /** What was shown is no longer what would be signed or charged. */
  moved: 409,
  invalid: 422,
  tooMany: 429,
  unavailable: 503,
} as const;

export type FaultCode = keyof typeof FAULT_STATUS;

/** An error as a value: a code and a sentence that a person can act on. */
export interface Fault {
  readonly code: FaultCode;
  readonly sentence: string;
  /** Faults of an input by path, or other data the screen shows. */
  readonly faults?: readonly { readonly path: string; readonly message: string }[];
  readonly detail?: unknown;
}

export type Result<T> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly fault: Fault };

export const ok = <T>(value: T): Result<T> => ({ ok: true, value });

export const refuse = (code: FaultCode, sentence: string, more: Partial<Fault> = {}): Result<never> => ({
  ok: false,
  fault: { ...more, code, sentence },
});
