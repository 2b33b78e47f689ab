import { closePool } from '@/db/client';
import { environment } from '@/lib/adapters/environment';
import { workQueues, type Handlers } from '@/lib/adapters/queue';
import { EnvironmentError } from '@/lib/contracts/environment';
import { announcePage } from './mail/announce-page';
import { deliverMail } from './mail/deliver';
import { sendReceipt } from './payment/send-receipt';

/** What is done with the jobs of each queue. Every handler may be called twice for one job. */
const HANDLERS: Handlers = {
  mail: deliverMail,
  paymentReceipt: sendReceipt,
  pageSealed: announcePage,
};

/** `npm run start:worker`: does what was put in the queues until it is told to stop. */
async function main(): Promise<void> {
  environment();
  const worker = await workQueues(HANDLERS);
  console.log('The worker waits for jobs.');
  let stopping = false;
  for (const signal of ['SIGINT', 'SIGTERM'] as const) {
    process.on(signal, () => {
      if (stopping) return;
      stopping = true;
      void worker
        .stop()
        .then(closePool)
        .then(() => process.exit(0));
    });
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof EnvironmentError ? error.message : error);
  process.exit(1);
});
