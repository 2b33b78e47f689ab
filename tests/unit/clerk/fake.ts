import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { mkdtempSync } from 'node:fs';
import http from 'node:http';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { createClerkClient } from '@clerk/nextjs/server';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { startClerkFake } from '@/lib/local/clerk/server';

const { privateKey, publicKey } = generateKeyPairSync('rsa', {
  modulusLength: 2048,
  publicKeyEncoding: { type: 'spki', format: 'pem' },
  privateKeyEncoding: { type: 'pkcs8', format: 'pem' },
});

export const PUBLIC_KEY = publicKey;
export const SECRET_KEY = `sk_live_${randomBytes(20).toString('hex')}`;
export const WEBHOOK_SECRET = `whsec_${randomBytes(24).toString('base64')}`;
export const WEB_ORIGIN = 'http://localhost:4300';

export interface Delivery {
  readonly headers: Record<string, string>;
  readonly body: string;
}

const listen = (server: { listen(port: number, host: string, done: () => void): unknown }) =>
  new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()));

const portOf = (server: http.Server | SMTPServer) => {
  const address = server instanceof http.Server ? server.address() : server.server.address();
  return typeof address === 'object' && address ? address.port : 0;
};

/** A queue whose next entry can be awaited. */
class Inbox<T> {
  private readonly items: T[] = [];
  private waiting: ((item: T) => void)[] = [];

  put(item: T): void {
    const first = this.waiting.shift();
    if (first) first(item);
    else this.items.push(item);
  }

  next(): Promise<T> {
    const first = this.items.shift();
    return first ? Promise.resolve(first) : new Promise((resolve) => this.waiting.push(resolve));
  }
}

/** The fake with a mail server and a receiver of webhooks, all on ports of their own. */
export async function startScene() {
  const mails = new Inbox<{ to: string; subject: string }>();
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData(stream, session, done) {
      const to = session.envelope.rcptTo[0]?.address ?? '';
      void simpleParser(stream).then((mail) => {
        done();
        mails.put({ to, subject: mail.subject ?? '' });
      });
    },
  });
  const deliveries = new Inbox<Delivery>();
  const answers: number[] = [];
  const receiver = http.createServer((request, response) => {
    let body = '';
    request.on('data', (part: Buffer) => (body += part.toString()));
    request.on('end', () => {
      const headers = Object.fromEntries(
        Object.entries(request.headers).flatMap(([name, value]) =>
          typeof value === 'string' ? [[name, value]] : [],
        ),
      );
      response.writeHead(answers.shift() ?? 200);
      response.end();
      deliveries.put({ headers, body });
    });
  });
  await Promise.all([listen(smtp), listen(receiver)]);
  const options = {
    port: 0,
    stateFile: path.join(mkdtempSync(path.join(tmpdir(), 'clerk-')), 'clerk.json'),
    publishableKey: `pk_live_${Buffer.from('clerk.stilewright.example$').toString('base64').replace(/=+$/, '')}`,
    secretKey: SECRET_KEY,
    privateKeyPem: privateKey,
    webhookUrl: `http://127.0.0.1:${portOf(receiver)}/hook`,
    webhookSecret: WEBHOOK_SECRET,
    smtpUrl: `smtp://127.0.0.1:${portOf(smtp)}`,
    mailDomain: 'mail.example',
    webOrigin: WEB_ORIGIN,
  };
  let fake = await startClerkFake(options);
  const own = { options, mails, deliveries, answers };
  return {
    ...own,
    get origin() {
      return fake.origin;
    },
    backend: () => createClerkClient({ secretKey: SECRET_KEY, apiUrl: fake.origin }),
    /** Stops the fake and starts it again with the same state. */
    async restart() {
      await fake.stop();
      fake = await startClerkFake(options);
    },
    async stop() {
      await fake.stop();
      receiver.closeAllConnections();
      await new Promise((resolve) => receiver.close(resolve));
      await new Promise<void>((resolve) => smtp.close(() => resolve()));
    },
  };
}
export type Scene = Awaited<ReturnType<typeof startScene>>;

type Json = Record<string, unknown>;
const isObject = (value: unknown): value is Json => typeof value === 'object' && value !== null;

/** A browser as far as the service sees one: it keeps its cookie and sends forms as the browser's library does. */
export class Browser {
  cookie = '';

  constructor(private readonly scene: Pick<Scene, 'origin'>) {}

  async send(
    method: 'GET' | 'POST' | 'DELETE',
    address: string,
    fields: Record<string, string> = {},
  ): Promise<{ status: number; body: Json; headers: Headers }> {
    const tunnelled = method === 'GET' || method === 'POST' ? '' : `?_method=${method}`;
    const answer = await fetch(`${this.scene.origin}${address}${tunnelled}`, {
      method: method === 'GET' ? 'GET' : 'POST',
      headers: {
        origin: WEB_ORIGIN,
        cookie: this.cookie,
        ...(method === 'GET' ? {} : { 'content-type': 'application/x-www-form-urlencoded' }),
      },
      body: method === 'GET' ? undefined : new URLSearchParams(fields).toString(),
      redirect: 'manual',
    });
    const client = answer.headers.getSetCookie().find((one) => one.startsWith('__client='));
    if (client) this.cookie = client.split(';')[0] ?? '';
    const parsed: unknown = answer.status === 307 ? {} : await answer.json();
    return { status: answer.status, body: isObject(parsed) ? parsed : {}, headers: answer.headers };
  }
}

/** A value deep inside an answer, by its keys. */
export function at(value: unknown, ...keys: (string | number)[]): unknown {
  return keys.reduce<unknown>(
    (inner, key) => (isObject(inner) ? Reflect.get(inner, String(key)) : undefined),
    value,
  );
}

export const text = (value: unknown): string => {
  if (typeof value !== 'string') throw new Error(`Not a text: ${JSON.stringify(value)}`);
  return value;
};

export const codeOf = (mail: { subject: string }): string => mail.subject.slice(0, 6);
export const wrongCode = (code: string): string => (code === '000000' ? '000001' : '000000');
