import { timingSafeEqual } from 'node:crypto';
import http from 'node:http';
import { z } from 'zod';
import { BackendApi } from './backend-api';
import { ClerkFault } from './fault';
import { FrontendApi } from './frontend-api';
import { readRequest, sendAnswer, type Answer, type Asked } from './http';
import { Instance, type ClerkFakeOptions } from './instance';
import { answerScript, isScript } from './script';
import { answerTest } from './test-hooks';

export type { ClerkFakeOptions } from './instance';

function sameText(a: string, b: string): boolean {
  const [one, other] = [Buffer.from(a), Buffer.from(b)];
  return one.length === other.length && timingSafeEqual(one, other);
}

function answerOf(error: unknown): Answer {
  if (error instanceof ClerkFault) {
    const headers = error.retryAfter === null ? undefined : { 'retry-after': String(error.retryAfter) };
    return { status: error.status, body: error.body, headers };
  }
  if (error instanceof z.ZodError) {
    return answerOf(new ClerkFault(422, 'form_param_value_invalid', error.message));
  }
  console.error(error);
  return answerOf(new ClerkFault(500, 'internal_clerk_error', 'An error occurred inside the fake.'));
}

/**
 * Stands in for the sign-in service: the addresses that the browser's library calls, those that servers call with
 * the secret key, and webhooks. Listens on 127.0.0.1 and keeps its state in a file. The tests' own addresses are in
 * `test-hooks.ts`.
 */
export async function startClerkFake(options: ClerkFakeOptions): Promise<{
  origin: string;
  stop(): Promise<void>;
}> {
  const instance = new Instance(options);
  const frontend = new FrontendApi(instance);
  const backend = new BackendApi(instance, (nonce) => frontend.takeDirectives(nonce));

  async function route(asked: Asked): Promise<Answer> {
    if (isScript(asked.path)) return answerScript(asked.path);
    if (asked.path === '/v1/jwks' || asked.path === '/.well-known/jwks.json') {
      return { status: 200, body: instance.tokens.keySet };
    }
    // The program's proxy names the secret key in a header of its own, so pages never reach what servers may.
    const isServer = sameText(asked.headers.authorization ?? '', `Bearer ${options.secretKey}`);
    if (isServer && asked.path.startsWith('/test/')) return answerTest(instance, asked);
    return isServer ? backend.answer(asked) : frontend.answer(asked);
  }

  async function answer(request: http.IncomingMessage, response: http.ServerResponse): Promise<void> {
    try {
      sendAnswer(response, await route(await readRequest(request)));
    } catch (error) {
      sendAnswer(response, answerOf(error));
    }
  }

  const server = http.createServer((request, response) => void answer(request, response));
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port, '127.0.0.1', resolve);
  });
  const address = server.address();
  const port = typeof address === 'object' && address ? address.port : options.port;
  instance.deliveries.resume();
  return {
    origin: `http://localhost:${port}`,
    async stop() {
      server.closeAllConnections();
      await new Promise<void>((resolve) => server.close(() => resolve()));
      await instance.deliveries.stop();
      instance.mail.close();
      instance.store.save();
    },
  };
}
