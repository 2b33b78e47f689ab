import { environmentShape, parseEnvironment, EnvironmentError } from '@/lib/contracts/environment';
import type { Variables } from './processes';
import { SetupFault } from './progress';
import type { Settings } from './settings';

/** The services that something on this machine can stand in for, and what names the real one instead. */
export const REPLACEABLE = {
  postgres: { name: 'PostgreSQL', variables: ['DATABASE_URL', 'DATABASE_OWNER_URL'] },
  clerk: {
    name: 'Clerk',
    variables: ['CLERK_PUBLISHABLE_KEY', 'CLERK_SECRET_KEY', 'CLERK_JWT_KEY', 'CLERK_WEBHOOK_SIGNING_SECRET'],
  },
  stripe: {
    name: 'Stripe',
    variables: ['STRIPE_PUBLISHABLE_KEY', 'STRIPE_SECRET_KEY', 'STRIPE_WEBHOOK_SECRET'],
  },
  mail: { name: 'Mail', variables: ['SMTP_URL'] },
} as const;
export type Service = keyof typeof REPLACEABLE;
const SERVICES = ['postgres', 'clerk', 'stripe', 'mail'] as const;

/**
 * Which services are real, by what the surroundings already name. A service named by halves is a fault, and so is
 * any that is not named when `NODE_ENV` says production: there, nothing may stand in.
 */
export function realServices(source: Variables): ReadonlySet<Service> {
  const missing = (service: Service) =>
    REPLACEABLE[service].variables.filter((variable) => !source[variable]);
  const absent = SERVICES.filter((service) => missing(service).length > 0);
  const halved = absent.find((service) => missing(service).length < REPLACEABLE[service].variables.length);
  if (halved) {
    const { name } = REPLACEABLE[halved];
    throw new SetupFault(
      `${name} is only named in part. Also set ${missing(halved).join(', ')}, or none of its variables.`,
    );
  }
  if (source.NODE_ENV === 'production' && absent.length > 0) {
    throw new SetupFault(
      'NODE_ENV is production, where nothing stands in for a real service. Set these variables too:',
      absent.flatMap(missing).join('\n'),
    );
  }
  return new Set(SERVICES.filter((service) => !absent.includes(service)));
}

/** Read by the libraries themselves. The first four are taken into the build, so they are the same on every machine. */
export const BUILD_VARIABLES = {
  NEXT_PUBLIC_CLERK_TELEMETRY_DISABLED: '1',
  NEXT_PUBLIC_CLERK_KEYLESS_DISABLED: '1',
  NEXT_PUBLIC_CLERK_PREFETCH_UI: 'false',
  NEXT_TELEMETRY_DISABLED: '1',
} as const;

/** Set in what a stack writes for the shell: the variables beside it name its stand-ins, no real service. */
export const FROM_A_STACK = 'STILEWRIGHT_FROM_A_STACK';

export interface Addresses {
  readonly databaseUrl: string;
  readonly databaseOwnerUrl: string;
}

/** Where each part of the stack listens. */
export const origins = (settings: Settings) => ({
  web: `http://localhost:${settings.ports.web}`,
  clerk: `http://localhost:${settings.ports.clerk}`,
  stripe: `http://localhost:${settings.ports.stripe}`,
  mailbox: `http://localhost:${settings.ports.mailbox}`,
  smtp: `smtp://127.0.0.1:${settings.ports.smtp}`,
});

/** The name that mails come from while the mailbox stands in. */
export const MAIL_DOMAIN = 'mail.stilewright.example';

/**
 * The variables that the program's processes read, exactly as `lib/contracts/environment.ts` names them: the
 * real services' as given, the others' pointing at what stands in for them. `DATABASE_OWNER_URL` is for
 * migrations alone and is not among them.
 */
export function programVariables(
  settings: Settings,
  addresses: Pick<Addresses, 'databaseUrl'>,
  real: ReadonlySet<Service>,
  source: Variables,
): Record<string, string> {
  const at = origins(settings);
  const own: Variables = { APP_ORIGIN: at.web, MAIL_DOMAIN, DATABASE_URL: addresses.databaseUrl };
  if (!real.has('clerk')) {
    Object.assign(own, {
      CLERK_PUBLISHABLE_KEY: settings.clerk.publishableKey,
      CLERK_SECRET_KEY: settings.clerk.secretKey,
      CLERK_JWT_KEY: settings.clerk.publicKeyPem,
      CLERK_WEBHOOK_SIGNING_SECRET: settings.clerk.webhookSecret,
      CLERK_API_URL: at.clerk,
      CLERK_FAPI_URL: at.clerk,
      CLERK_PROXY_PATH: '/__clerk',
    });
  }
  if (!real.has('stripe')) {
    Object.assign(own, {
      STRIPE_PUBLISHABLE_KEY: settings.stripe.publishableKey,
      STRIPE_SECRET_KEY: settings.stripe.secretKey,
      STRIPE_WEBHOOK_SECRET: settings.stripe.webhookSecret,
      STRIPE_API_BASE: at.stripe,
      STRIPE_SCRIPT_URL: `${at.stripe}/v3/stripe.js`,
    });
  }
  if (!real.has('mail')) own.SMTP_URL = at.smtp;

  const variables: Record<string, string> = {};
  for (const name of Object.keys(environmentShape.shape)) {
    if (name === 'NODE_ENV') continue;
    // Given variables of a real service count; a stray one of a service that is stood in for does not.
    const value = name in own ? (isFree(name) ? source[name] || own[name] : own[name]) : source[name];
    if (value) variables[name] = value;
  }
  try {
    parseEnvironment(variables);
  } catch (error) {
    if (error instanceof EnvironmentError) throw new SetupFault(error.message);
    throw error;
  }
  return { ...variables, ...BUILD_VARIABLES };
}

/** Variables that belong to no service and may be given alone. */
const isFree = (name: string) => name === 'APP_ORIGIN' || name === 'MAIL_DOMAIN';

/** The surroundings without anything that the program reads or that would colour a child's behaviour. */
export function plainSurroundings(source: Variables): Record<string, string> {
  const owned = new Set([
    ...Object.keys(environmentShape.shape),
    'DATABASE_OWNER_URL',
    'NODE_ENV',
    'PORT',
    'HOSTNAME',
  ]);
  return Object.fromEntries(
    Object.entries(source).filter((entry): entry is [string, string] => {
      const [name, value] = entry;
      return value !== undefined && !owned.has(name) && !/^(npm_|NEXT_PUBLIC_|NODE_CHANNEL)/.test(name);
    }),
  );
}

/** Shell text that sets the variables; `.` it to run one of the program's commands by hand. */
export function asShell(variables: Record<string, string>): string {
  const quote = (value: string) => `'${value.replaceAll("'", `'\\''`)}'`;
  return `${Object.entries(variables)
    .map(([name, value]) => `export ${name}=${quote(value)}`)
    .join('\n')}\n`;
}
