/** Who a request comes from, as the sign-in service knows them. */
export interface SignedIn {
  readonly userId: string;
  /** Empty when the service knows none. */
  readonly name: string;
  /** Addresses that they have shown to be theirs, in lower case; the main one first. */
  readonly verifiedEmails: readonly string[];
}

/** Somebody who can sign in. */
export interface SignInUser {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
}

/** What the browser's part of sign-in is told by the server, so that one build serves every environment. */
export interface SignInSettings {
  readonly publishableKey: string;
  /** Path on this origin through which sign-in traffic goes; null when it goes to the service itself. */
  readonly proxyPath: string | null;
}

/** First and family name of a full one: the last word is the family name; a single word is the first name. */
export function splitName(name: string): { firstName: string; lastName?: string } {
  const words = name.trim().split(/\s+/);
  const lastName = words.length > 1 ? words.pop() : undefined;
  return { firstName: words.join(' '), lastName };
}
