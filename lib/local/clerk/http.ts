import type http from 'node:http';
import { ClerkFault } from './fault';

const BODY_BYTES_MAX = 200_000;

/** A request, read whole. */
export interface Asked {
  /** What `_method` says when the browser's library tunnels another method through POST. */
  readonly method: string;
  readonly path: string;
  readonly query: URLSearchParams;
  /** Fields of a form or of a JSON object. */
  readonly fields: Readonly<Record<string, unknown>>;
  readonly headers: http.IncomingHttpHeaders;
  readonly cookies: Readonly<Record<string, string>>;
}

export interface Answer {
  readonly status: number;
  /** Sent as JSON unless it is bytes. */
  readonly body: unknown;
  readonly headers?: Readonly<Record<string, string | string[]>>;
}

async function readText(request: http.IncomingMessage): Promise<string> {
  const parts: Buffer[] = [];
  let size = 0;
  for await (const part of request) {
    const bytes = Buffer.from(part);
    size += bytes.length;
    if (size > BODY_BYTES_MAX) throw new ClerkFault(413, 'request_body_too_large', 'The body is too large.');
    parts.push(bytes);
  }
  return Buffer.concat(parts).toString();
}

function fieldsOf(text: string, type: string): Record<string, unknown> {
  if (text === '') return {};
  if (type.includes('urlencoded')) return Object.fromEntries(new URLSearchParams(text));
  try {
    const parsed: unknown = JSON.parse(text);
    return typeof parsed === 'object' && parsed !== null ? Object.fromEntries(Object.entries(parsed)) : {};
  } catch {
    throw new ClerkFault(400, 'request_body_invalid', 'The body cannot be read.');
  }
}

function cookiesOf(header: string | undefined): Record<string, string> {
  const pairs = (header ?? '').split(/;\s*/).filter((pair) => pair.includes('='));
  return Object.fromEntries(
    pairs.map((pair) => {
      const at = pair.indexOf('=');
      return [pair.slice(0, at), pair.slice(at + 1)];
    }),
  );
}

export async function readRequest(request: http.IncomingMessage): Promise<Asked> {
  const url = new URL(request.url ?? '/', 'http://localhost');
  const text = await readText(request);
  return {
    method: url.searchParams.get('_method') ?? request.method ?? 'GET',
    path: url.pathname,
    query: url.searchParams,
    fields: fieldsOf(text, request.headers['content-type'] ?? ''),
    headers: request.headers,
    cookies: cookiesOf(request.headers.cookie),
  };
}

export function sendAnswer(response: http.ServerResponse, { status, body, headers }: Answer): void {
  const bytes = Buffer.isBuffer(body) ? body : body === null ? '' : JSON.stringify(body);
  response.writeHead(status, {
    'content-type': 'application/json',
    'cache-control': 'no-store',
    'x-content-type-options': 'nosniff',
    ...headers,
  });
  response.end(bytes);
}

/** A field as text, or null when it is absent or something else. */
export const textField = (fields: Asked['fields'], name: string): string | null => {
  const value = fields[name];
  return typeof value === 'string' ? value : null;
};
