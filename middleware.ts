import { clerkMiddleware } from '@clerk/nextjs/server';
import { NextResponse, type NextRequest } from 'next/server';
import { paths } from './lib/paths';

// Signing in is routed here and nothing is authorised: services decide what anybody may see.

/** First parts of addresses that are no contractor's. */
const NO_COMPANY = new Set(['api', '_next', '__clerk', '__nextjs_original-stack-frames', 'clerk']);
/** Pages of a contractor that are there for whoever is not signed in. */
const OPEN_PAGES = new Set(['sign-in', 'invitation']);

const originOf = (address: string | undefined): string | null =>
  address && URL.canParse(address) ? new URL(address).origin : null;

/** The sign-in service's own host, which a publishable key names; null while all goes through this origin. */
function signInOrigin(): string | null {
  if (process.env.CLERK_FAPI_URL) return null;
  const encoded = (process.env.CLERK_PUBLISHABLE_KEY ?? '').split('_')[2] ?? '';
  return originOf(`https://${atob(encoded).replace(/\$$/, '')}`);
}

interface Sources {
  readonly scripts: readonly string[];
  readonly frames: readonly string[];
  readonly connections: readonly string[];
  readonly pictures: readonly string[];
}

/** The payment service's origins: those of its stand-in when one is set, else the service's published ones. */
function paymentSources(): Sources {
  const standIn = originOf(process.env.STRIPE_SCRIPT_URL);
  if (standIn) return { scripts: [standIn], frames: [standIn], connections: [standIn], pictures: [] };
  return {
    scripts: ['https://js.stripe.com', 'https://*.js.stripe.com'],
    frames: ['https://js.stripe.com', 'https://*.js.stripe.com', 'https://hooks.stripe.com'],
    connections: ['https://api.stripe.com'],
    pictures: ['https://*.stripe.com'],
  };
}

/** The sign-in service's origins; none while a stand-in answers through this origin. */
function signInSources(): Sources {
  const origin = signInOrigin();
  if (!origin) return { scripts: [], frames: [], connections: [], pictures: [] };
  // Its check that a person signs up comes from this host. Source: the service's guide to content policies.
  const challenge = 'https://challenges.cloudflare.com';
  return {
    scripts: [origin, challenge],
    frames: [challenge],
    connections: [origin],
    pictures: ['https://img.clerk.com'],
  };
}

const isDev = process.env.NODE_ENV === 'development';

function contentSecurityPolicy(nonce: string, request: NextRequest): string {
  const all = [paymentSources(), signInSources()];
  const of = (kind: keyof Sources) => all.flatMap((sources) => sources[kind]);
  const { host, protocol } = request.nextUrl;
  const directives: Record<string, readonly string[]> = {
    'default-src': ["'self'"],
    'script-src': [
      "'self'",
      `'nonce-${nonce}'`,
      "'strict-dynamic'",
      ...of('scripts'),
      // The development server evaluates what it reloads.
      ...(isDev ? ["'unsafe-eval'"] : []),
    ],
    // Dialogs and the 3D picture place style elements of their own after the page has come, where no nonce reaches.
    'style-src': ["'self'", "'unsafe-inline'"],
    'img-src': ["'self'", 'data:', 'blob:', ...of('pictures')],
    'font-src': ["'self'"],
    'connect-src': ["'self'", ...of('connections'), ...(isDev ? [`ws://${host}`] : [])],
    'frame-src': of('frames'),
    'worker-src': ["'self'", 'blob:'],
    'object-src': ["'none'"],
    'base-uri': ["'none'"],
    'form-action': ["'self'"],
    'frame-ancestors': ["'none'"],
    ...(protocol === 'https:' ? { 'upgrade-insecure-requests': [] } : {}),
  };
  return Object.entries(directives)
    .map(([name, values]) => [name, ...values].join(' '))
    .join('; ');
}

const PERMISSIONS = ['camera', 'microphone', 'geolocation', 'usb', 'serial', 'browsing-topics']
  .map((feature) => `${feature}=()`)
  .join(', ');

/** Headers of every page and every answer of the API. */
function setHeaders(response: NextResponse, policy: string): NextResponse {
  response.headers.set('content-security-policy', policy);
  response.headers.set('x-content-type-options', 'nosniff');
  response.headers.set('referrer-policy', 'strict-origin-when-cross-origin');
  response.headers.set('permissions-policy', PERMISSIONS);
  response.headers.set('x-frame-options', 'DENY');
  response.headers.set('cross-origin-opener-policy', 'same-origin-allow-popups');
  if ((process.env.APP_ORIGIN ?? '').startsWith('https:')) {
    response.headers.set('strict-transport-security', 'max-age=63072000; includeSubDomains');
  }
  return response;
}

/** The contractor's slug when a page is asked for that only somebody signed in may open. */
function companyToSignInTo({ pathname }: URL): string | null {
  const [, company = '', page = ''] = pathname.split('/');
  if (company === '' || NO_COMPANY.has(company) || OPEN_PAGES.has(page)) return null;
  try {
    return decodeURIComponent(company);
  } catch {
    return null;
  }
}

function newNonce(): string {
  return btoa(String.fromCharCode(...crypto.getRandomValues(new Uint8Array(16))));
}

export default clerkMiddleware(
  async (auth, request) => {
    const nonce = newNonce();
    const policy = contentSecurityPolicy(nonce, request);
    const company = companyToSignInTo(request.nextUrl);
    if (company !== null && !(await auth()).userId) {
      const signIn = new URL(paths.signIn(company), request.nextUrl);
      const back = request.nextUrl.pathname + request.nextUrl.search;
      if (back !== paths.home(company)) signIn.searchParams.set('back', back);
      return setHeaders(NextResponse.redirect(signIn, 303), policy);
    }
    const headers = new Headers(request.headers);
    // The framework reads the nonce out of the policy, the layout out of its own header.
    headers.set('content-security-policy', policy);
    headers.set('x-nonce', nonce);
    return setHeaders(NextResponse.next({ request: { headers } }), policy);
  },
  () => ({
    publishableKey: process.env.CLERK_PUBLISHABLE_KEY,
    jwtKey: process.env.CLERK_JWT_KEY,
    frontendApiProxy: { enabled: Boolean(process.env.CLERK_PROXY_PATH) },
    // A token made on somebody else's pages is not taken. Beside the stand-in, several servers may share it.
    ...(process.env.CLERK_FAPI_URL ? {} : { authorizedParties: [originOf(process.env.APP_ORIGIN) ?? ''] }),
  }),
);

export const config = {
  runtime: 'nodejs',
  matcher: [
    // Everything but the build's own files and what lies in public/ by its ending.
    '/((?!_next/static|_next/image|[^?]*\\.(?:svg|ico|png|jpg|webp|woff2?|txt|webmanifest)$).*)',
    '/__clerk/(.*)',
  ],
};
