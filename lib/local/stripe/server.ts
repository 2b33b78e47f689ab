import http, { type IncomingMessage, type ServerResponse } from 'node:http';
import { z } from 'zod';
import { Api } from './api';
import { CARDS } from './cards';
import { ApiFault, invalid } from './fault';
import { FaultsOnDemand } from './faults-on-demand';
import { parseForm, textAt } from './form';
import { IdempotencyKeys } from './idempotency';
import { API_VERSION, newId } from './objects';
import { browserFiles } from './pages';
import { Store } from './store';
import { carries, Deliveries } from './webhooks';

export interface StripeFakeOptions {
  /** 0 takes any free port. */
  readonly port: number;
  /** Where the state is kept between runs. */
  readonly stateFile: string;
  readonly secretKey: string;
  readonly publishableKey: string;
  /** Where events are delivered; '' delivers nowhere. */
  readonly webhookUrl: string;
  readonly webhookSecret: string;
  /** The only origin whose pages may frame the card form. */
  readonly webOrigin: string;
}

export interface StripeFake {
  readonly origin: string;
  stop(): Promise<void>;
}

const BODY_MAX_BYTES = 1_000_000;

const holdShape = z.object({
  account: z.string().optional(),
  metadata: z.record(z.string(), z.string()).optional(),
});
const releaseShape = holdShape.extend({ order: z.enum(['forward', 'reverse']).default('forward') });
const pathShape = z.object({ path: z.string().startsWith('/') });
const dropShape = pathShape.extend({ times: z.number().int().min(1).max(20).default(1) });

async function readBody(request: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of request) {
    const bytes = Buffer.from(chunk);
    size += bytes.length;
    if (size > BODY_MAX_BYTES) throw invalid('The body is too large.', { status: 413 });
    chunks.push(bytes);
  }
  return Buffer.concat(chunks).toString('utf8');
}

const header = (request: IncomingMessage, name: string): string | null => {
  const value = request.headers[name];
  return typeof value === 'string' && value !== '' ? value : null;
};

function sendJson(
  response: ServerResponse,
  status: number,
  body: unknown,
  headers: Record<string, string> = {},
) {
  response.writeHead(status, { 'content-type': 'application/json', ...headers });
  response.end(JSON.stringify(body, null, 2));
}

/**
 * Stands in for the payment service on one machine: REST interface, browser script, card form, webhooks.
 *
 * Besides what the service itself offers, tests may ask (never from a browser's page):
 * `GET /_fake/events?account=&type=&intent=&draw=`, `POST /_fake/events/ID/redeliver`,
 * `POST /_fake/deliveries/hold {account?, metadata?}`, `GET /_fake/deliveries/held`,
 * `POST /_fake/deliveries/release {order, account?, metadata?}`, `POST /_fake/requests/hold {path}`,
 * `GET /_fake/requests/hanging?count=`, `POST /_fake/requests/release`,
 * `POST /_fake/requests/drop-answer {path, times}`, `GET /_fake/cards`; and, with key and account as for the
 * service itself, `POST /_fake/payment_intents/ID/arrive` (a bank debit ends), `POST /_fake/refunds/ID/fail`.
 */
export async function startStripeFake(options: StripeFakeOptions): Promise<StripeFake> {
  const store = new Store(options.stateFile);
  const deliveries = new Deliveries(store, options.webhookUrl, options.webhookSecret);
  const keys = new IdempotencyKeys(store);
  const faults = new FaultsOnDemand();
  const files = browserFiles(options.webOrigin);
  // Events leave only after the request that caused them has been written down.
  let told: Parameters<Deliveries['add']>[0][] = [];
  const api = new Api(store, (event) => told.push(event));

  function keyOf(request: IncomingMessage, form: ReturnType<typeof parseForm>): 'secret' | 'publishable' {
    const key =
      /^Bearer (.+)$/.exec(header(request, 'authorization') ?? '')?.[1] ?? textAt(form, 'key') ?? '';
    if (key === options.secretKey) return 'secret';
    if (key === options.publishableKey) return 'publishable';
    throw invalid(`Invalid API Key provided: ${key.slice(0, 8)}***`, { status: 401 });
  }

  async function answerApi(request: IncomingMessage, response: ServerResponse, url: URL): Promise<void> {
    const requestId = newId('req');
    const base = {
      'request-id': requestId,
      'stripe-version': header(request, 'stripe-version') ?? API_VERSION,
    };
    const body = await readBody(request);
    const method = request.method ?? 'GET';
    const form = parseForm(method === 'GET' ? url.search.slice(1) : body);
    const publicly = keyOf(request, form) === 'publishable';
    const account =
      (publicly ? textAt(form, '_stripe_account') : undefined) ?? header(request, 'stripe-account') ?? '';
    const idempotencyKey = method === 'POST' ? header(request, 'idempotency-key') : null;
    const claim = idempotencyKey ? keys.claim(idempotencyKey, account, method, url.pathname, body) : null;
    if (claim?.kind === 'replay') {
      const { status, body: first, requestId: original } = claim.answer;
      sendJson(response, status, first, {
        ...base,
        'idempotency-key': idempotencyKey ?? '',
        'idempotent-replayed': 'true',
        'original-request': original,
      });
      return;
    }
    try {
      await faults.pass(url.pathname);
      const asked = { method, path: url.pathname, form, account, publicly, requestId, idempotencyKey };
      const { status, object } = carryOut(asked);
      // Refusals of a card are kept like successes; a request that was never carried out may be asked anew.
      if (status === 200 || status === 402) claim?.keep(status, object, requestId);
      if (method !== 'GET') store.save();
      const events = told;
      told = [];
      for (const event of events) deliveries.add(event);
      if (faults.losesAnswer(url.pathname)) {
        request.socket.destroy();
        return;
      }
      sendJson(
        response,
        status,
        object,
        idempotencyKey ? { ...base, 'idempotency-key': idempotencyKey } : base,
      );
    } finally {
      if (claim?.kind === 'go') claim.release();
    }
  }

  function carryOut(asked: Parameters<Api['answer']>[0]): { status: number; object: unknown } {
    try {
      return { status: 200, object: api.answer(asked) };
    } catch (error) {
      if (!(error instanceof ApiFault)) throw error;
      return { status: error.status, object: { error: error.body } };
    }
  }

  async function answerHook(request: IncomingMessage, response: ServerResponse, url: URL): Promise<void> {
    if (request.headers.origin) throw invalid('Not from a page.', { status: 403 });
    const body = await readBody(request);
    const given: unknown = body === '' ? {} : JSON.parse(body);
    const hook = `${request.method} ${url.pathname}`;
    const redelivered = /^POST \/_fake\/events\/(\w+)\/redeliver$/.exec(hook)?.[1];
    if (redelivered) {
      const event = store.state.events.find((one) => one.id === redelivered);
      if (!event) throw invalid('No such event.', { status: 404 });
      return sendJson(response, 200, await deliveries.deliverOnce(event));
    }
    switch (hook) {
      case 'GET /_fake/events':
        return sendJson(response, 200, listEvents(url));
      case 'GET /_fake/cards':
        return sendJson(response, 200, CARDS);
      case 'POST /_fake/deliveries/hold':
        deliveries.hold(holdShape.parse(given));
        return sendJson(response, 200, { held: true });
      case 'GET /_fake/deliveries/held':
        return sendJson(response, 200, deliveries.listHeld());
      case 'POST /_fake/deliveries/release': {
        const { order, ...filter } = releaseShape.parse(given);
        return sendJson(response, 200, await deliveries.release(order, filter));
      }
      case 'POST /_fake/requests/hold':
        faults.hold(pathShape.parse(given).path);
        return sendJson(response, 200, { held: true });
      case 'GET /_fake/requests/hanging':
        await faults.untilHanging(Number(url.searchParams.get('count') ?? '1'));
        return sendJson(response, 200, { hanging: true });
      case 'POST /_fake/requests/release':
        faults.letGo();
        return sendJson(response, 200, { released: true });
      case 'POST /_fake/requests/drop-answer': {
        const { path, times } = dropShape.parse(given);
        faults.dropAnswers(path, times);
        return sendJson(response, 200, { path, times });
      }
      default:
        throw invalid('No such hook.', { status: 404 });
    }
  }

  function listEvents(url: URL) {
    const account = url.searchParams.get('account');
    const type = url.searchParams.get('type');
    const intent = url.searchParams.get('intent');
    const draw = url.searchParams.get('draw');
    return store.state.events.filter(
      (event) =>
        (account === null || event.account === account) &&
        (type === null || event.type === type) &&
        (draw === null || carries(event, { draw_id: draw })) &&
        (intent === null || event.data.object.id === intent || event.data.object.payment_intent === intent),
    );
  }

  async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const url = new URL(request.url ?? '/', 'http://localhost');
    try {
      const file = files.get(url.pathname);
      if (file) {
        response.writeHead(200, { ...file.headers });
        response.end(file.body);
      } else if (url.pathname.startsWith('/_fake/') && !request.headers.authorization)
        await answerHook(request, response, url);
      else await answerApi(request, response, url);
    } catch (error) {
      if (error instanceof ApiFault) return sendJson(response, error.status, { error: error.body });
      if (error instanceof z.ZodError || error instanceof SyntaxError) {
        return sendJson(response, 400, { error: { type: 'invalid_request_error', message: error.message } });
      }
      console.error(error);
      sendJson(
        response,
        500,
        { error: { type: 'api_error', message: 'An error occurred inside the fake.' } },
        { 'stripe-should-retry': 'false' },
      );
    }
  }

  const server = http.createServer((request, response) => void answer(request, response));
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port, '127.0.0.1', resolve);
  });
  const address = server.address();
  const port = typeof address === 'object' && address ? address.port : options.port;
  deliveries.resume();
  return {
    origin: `http://localhost:${port}`,
    stop: async () => {
      faults.letGo();
      server.closeAllConnections();
      await new Promise<void>((resolve) => server.close(() => resolve()));
      await deliveries.stop();
      store.save();
    },
  };
}
