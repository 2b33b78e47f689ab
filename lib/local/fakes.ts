import { readFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';
import { startClerkFake } from './clerk/server';
import { MAIL_DOMAIN, origins } from './environment';
import { startMailFake } from './mail/server';
import { startStripeFake } from './stripe/server';
import { settingsShape, type Settings } from './settings';

/** What the process of the fakes is told: which of them to start, and where they keep their state. */
export const fakesPlanShape = z.object({
  settings: settingsShape,
  stateFolder: z.string(),
  fakes: z.array(z.enum(['clerk', 'stripe', 'mail'])),
});
export type FakesPlan = z.infer<typeof fakesPlanShape>;

interface Fake {
  stop(): Promise<void>;
}

function clerkOptions(settings: Settings, stateFolder: string) {
  const at = origins(settings);
  return {
    port: settings.ports.clerk,
    stateFile: path.join(stateFolder, 'clerk.json'),
    publishableKey: settings.clerk.publishableKey,
    secretKey: settings.clerk.secretKey,
    privateKeyPem: settings.clerk.privateKeyPem,
    webhookUrl: `${at.web}/api/webhooks/clerk`,
    webhookSecret: settings.clerk.webhookSecret,
    smtpUrl: at.smtp,
    mailDomain: MAIL_DOMAIN,
    webOrigin: at.web,
  };
}

function stripeOptions(settings: Settings, stateFolder: string) {
  const at = origins(settings);
  return {
    port: settings.ports.stripe,
    stateFile: path.join(stateFolder, 'stripe.json'),
    secretKey: settings.stripe.secretKey,
    publishableKey: settings.stripe.publishableKey,
    webhookUrl: `${at.web}/api/webhooks/stripe`,
    webhookSecret: settings.stripe.webhookSecret,
    webOrigin: at.web,
  };
}

async function main(planFile: string): Promise<void> {
  const { settings, stateFolder, fakes } = fakesPlanShape.parse(JSON.parse(readFileSync(planFile, 'utf8')));
  const started: Fake[] = [];
  if (fakes.includes('mail')) {
    started.push(
      await startMailFake({
        smtpPort: settings.ports.smtp,
        mailboxPort: settings.ports.mailbox,
        stateFolder: path.join(stateFolder, 'mail'),
      }),
    );
  }
  if (fakes.includes('clerk')) started.push(await startClerkFake(clerkOptions(settings, stateFolder)));
  if (fakes.includes('stripe')) started.push(await startStripeFake(stripeOptions(settings, stateFolder)));
  console.log('ready');
  let stopping = false;
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.on(signal, () => {
      if (stopping) return;
      stopping = true;
      void Promise.allSettled(started.map((fake) => fake.stop())).then(() => process.exit(0));
    });
  }
}

const planFile = process.argv[2];
if (planFile) {
  main(planFile).catch((error: unknown) => {
    console.error(error);
    process.exit(1);
  });
}
