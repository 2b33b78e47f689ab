import { z } from 'zod';

/**
 * Every environment variable the program reads, checked once at start.
 * The first group is always required; an `_API_BASE` or `_SCRIPT_URL` is set only when a local fake stands in
 * for the hosted service.
 */
const optionalUrl = z.url().optional();

export const environmentShape = z.object({
  NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
  /** Public origin of the web server, without a trailing slash; links in mails start with it. */
  APP_ORIGIN: z.url(),
  /** Connects as the application role, which owns nothing. */
  DATABASE_URL: z.url(),

  CLERK_PUBLISHABLE_KEY: z.string().startsWith('pk_'),
  CLERK_SECRET_KEY: z.string().startsWith('sk_'),
  /** SPKI PEM with real newlines; session tokens are verified with it, without a network call. */
  CLERK_JWT_KEY: z
    .string()
    .includes('BEGIN PUBLIC KEY')
    // With `\n` in two characters every token would be refused, and everybody led back to sign-in.
    .refine((pem) => !pem.includes('\\n'), 'It needs real line breaks.'),
  CLERK_WEBHOOK_SIGNING_SECRET: z.string().startsWith('whsec_'),
  CLERK_API_URL: optionalUrl,
  CLERK_FAPI_URL: optionalUrl,
  /** `/__clerk` when sign-in traffic goes through this origin (the SDK's own proxy). */
  CLERK_PROXY_PATH: z.string().startsWith('/').optional(),

  STRIPE_SECRET_KEY: z.string().startsWith('sk_'),
  STRIPE_PUBLISHABLE_KEY: z.string().startsWith('pk_'),
  STRIPE_WEBHOOK_SECRET: z.string().startsWith('whsec_'),
  STRIPE_API_BASE: optionalUrl,
  /** Where the browser loads the payment script from, when not from the service itself. */
  STRIPE_SCRIPT_URL: optionalUrl,

  SMTP_URL: z.url(),
  MAIL_DOMAIN: z.string().min(3),

  /** Stops the clock at an instant; heeded only where something stands in for a real service. */
  STILEWRIGHT_CLOCK: z.iso.datetime().optional(),
});

export type Environment = z.infer<typeof environmentShape>;

/** Thrown at start; names every variable that is missing or malformed. */
export class EnvironmentError extends Error {
  constructor(readonly faults: string[]) {
    super(`The environment is not complete:\n${faults.map((f) => `  - ${f}`).join('\n')}`);
    this.name = 'EnvironmentError';
  }
}

/** Parses `source` (usually `process.env`); empty strings count as absent. Throws {@link EnvironmentError}. */
export function parseEnvironment(source: Record<string, string | undefined>): Environment {
  const present = Object.fromEntries(Object.entries(source).filter(([, v]) => v !== undefined && v !== ''));
  const parsed = environmentShape.safeParse(present);
  if (parsed.success) return parsed.data;
  throw new EnvironmentError(parsed.error.issues.map((i) => `${i.path.join('.')}: ${i.message}`));
}
