import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';
import { writePrivately } from './places';
import { freePort } from './ports';
import { SetupFault } from './progress';

const port = z.number().int().min(1).max(65535);

/** What one machine remembers about its stack: ports, and secrets that its fakes and the program share. */
export const settingsShape = z.object({
  ports: z.object({ web: port, clerk: port, stripe: port, mailbox: port, smtp: port }),
  clerk: z.object({
    publishableKey: z.string(),
    secretKey: z.string(),
    privateKeyPem: z.string(),
    publicKeyPem: z.string(),
    webhookSecret: z.string(),
  }),
  stripe: z.object({ publishableKey: z.string(), secretKey: z.string(), webhookSecret: z.string() }),
});
export type Settings = z.infer<typeof settingsShape>;
export type Ports = Settings['ports'];

/** The ports a stack takes when nobody else has them. */
export const PREFERRED_PORTS: Ports = { web: 4300, clerk: 4310, stripe: 4320, mailbox: 4330, smtp: 4331 };

/** Fresh keys in the forms that the services' own libraries accept. */
export function generateSecrets(): Pick<Settings, 'clerk' | 'stripe'> {
  const { privateKey, publicKey } = generateKeyPairSync('rsa', {
    modulusLength: 2048,
    publicKeyEncoding: { type: 'spki', format: 'pem' },
    privateKeyEncoding: { type: 'pkcs8', format: 'pem' },
  });
  const hex = (bytes: number) => randomBytes(bytes).toString('hex');
  // A publishable key names a host; all traffic goes through the proxy path, so none is ever looked up.
  const host = Buffer.from('clerk.stilewright.example$').toString('base64').replace(/=+$/, '');
  return {
    clerk: {
      publishableKey: `pk_live_${host}`,
      secretKey: `sk_live_${hex(20)}`,
      privateKeyPem: privateKey.trim(),
      publicKeyPem: publicKey.trim(),
      webhookSecret: `whsec_${randomBytes(24).toString('base64')}`,
    },
    stripe: {
      publishableKey: `pk_test_${hex(16)}`,
      secretKey: `sk_test_${hex(16)}`,
      webhookSecret: `whsec_${hex(16)}`,
    },
  };
}

/**
 * Keeps each wanted port that is free and replaces a taken one by the next free. `free` tells whether nobody
 * listens on a port; no port is given twice.
 */
export async function choosePorts(
  wanted: Ports,
  pick: (preferred: number, taken: ReadonlySet<number>) => Promise<number> = freePort,
): Promise<Ports> {
  const taken = new Set<number>();
  const next = async (preferred: number) => {
    const chosen = await pick(preferred, taken);
    taken.add(chosen);
    return chosen;
  };
  return {
    web: await next(wanted.web),
    clerk: await next(wanted.clerk),
    stripe: await next(wanted.stripe),
    mailbox: await next(wanted.mailbox),
    smtp: await next(wanted.smtp),
  };
}

/** Reads `settings.json` of a stack's folder, or makes it; ports that others took meanwhile are replaced. */
export async function loadSettings(folder: string, preferred: Ports = PREFERRED_PORTS): Promise<Settings> {
  const file = path.join(folder, 'settings.json');
  let known: Settings | null = null;
  if (existsSync(file)) {
    const parsed = settingsShape.safeParse(JSON.parse(readFileSync(file, 'utf8')));
    if (!parsed.success) {
      throw new SetupFault(
        `${file} is not readable as settings. Delete it to have a new one made.`,
        parsed.error.message,
      );
    }
    known = parsed.data;
  }
  const settings: Settings = {
    ...(known ?? generateSecrets()),
    ports: await choosePorts(known?.ports ?? preferred),
  };
  writePrivately(file, JSON.stringify(settings, null, 2));
  return settings;
}
