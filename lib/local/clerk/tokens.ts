import { createHash, createPrivateKey, createPublicKey, randomBytes, sign } from 'node:crypto';
import type { Organization, Session } from './store';

/** Seconds for which a session token is good; the browser's library asks for the next in time. */
export const TOKEN_SECONDS = 60;
const KEY_ID = 'ins_local';

const base64url = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url');

/** Signs session tokens (RS256) with the instance's private key. */
export class Tokens {
  private readonly key;
  private readonly issuer: string;
  /** Cookies carry it, so that several instances on one host keep apart. Source: the SDK's cookieSuffix. */
  readonly cookieSuffix: string;
  readonly frontendHost: string;

  constructor(privateKeyPem: string, publishableKey: string) {
    this.key = createPrivateKey(privateKeyPem);
    const encoded = publishableKey.split('_')[2] ?? '';
    this.frontendHost = Buffer.from(encoded, 'base64').toString().replace(/\$$/, '');
    this.issuer = `https://${this.frontendHost}`;
    this.cookieSuffix = createHash('sha1').update(publishableKey).digest('base64url').slice(0, 8);
  }

  /** The public half as the service publishes it. */
  get keySet() {
    const jwk = createPublicKey(this.key).export({ format: 'jwk' });
    return { keys: [{ ...jwk, kid: KEY_ID, use: 'sig', alg: 'RS256' }] };
  }

  /**
   * A session token with claims of version 2: `sub` the user, `sid` the session, `azp` the origin of the pages, and
   * `o` the active organisation with the role without its prefix. `expired` makes one that is no longer good.
   */
  mint(
    session: Pick<Session, 'id' | 'userId' | 'origin' | 'createdAt'>,
    active: { readonly organization: Organization; readonly role: string } | null,
    seconds: number = TOKEN_SECONDS,
  ): string {
    const issuedAt = Math.floor(Date.now() / 1000);
    const minutesSinceFactor = Math.max(0, Math.floor((Date.now() - session.createdAt) / 60_000));
    const claims = {
      azp: session.origin,
      exp: issuedAt + seconds,
      fva: [minutesSinceFactor, -1],
      iat: issuedAt,
      iss: this.issuer,
      jti: randomBytes(10).toString('hex'),
      nbf: issuedAt - 10,
      sid: session.id,
      sts: 'active',
      sub: session.userId,
      v: 2,
      ...(active && {
        o: {
          id: active.organization.id,
          slg: active.organization.slug,
          rol: active.role.replace(/^org:/, ''),
        },
      }),
    };
    const signed = `${base64url({ alg: 'RS256', cat: 'cl_B7d4PD111AAA', kid: KEY_ID, typ: 'JWT' })}.${base64url(claims)}`;
    return `${signed}.${sign('RSA-SHA256', Buffer.from(signed), this.key).toString('base64url')}`;
  }
}
