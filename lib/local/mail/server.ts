import { existsSync, readFileSync } from 'node:fs';
import http from 'node:http';
import path from 'node:path';
import { simpleParser, type AddressObject } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { root } from '../places';
import { listPage, mailPage, notFoundPage } from './page';
import { MailStore, type MailFilter, type StoredMail } from './store';

export interface MailFakeOptions {
  /** Where mails are handed in, on 127.0.0.1. */
  readonly smtpPort: number;
  /** Where they can be read, on 127.0.0.1. */
  readonly mailboxPort: number;
  readonly stateFolder: string;
}

const MAX_WAIT_MS = 60_000;

const FONTS: Record<string, string> = {
  '/fonts/reading.woff2': 'atkinson-hyperlegible-next-latin-wght-normal.woff2',
  '/fonts/title.woff2': 'bricolage-grotesque-latin-wght-normal.woff2',
};

const addressesOf = (field: AddressObject | AddressObject[] | undefined): string[] =>
  [field ?? []]
    .flat()
    .flatMap((entry) =>
      entry.value.flatMap((one) => one.address ?? one.group?.map((each) => each.address ?? '') ?? []),
    );

/** What the JSON answers give of a mail; `links` are the addresses in it, in order, each once. */
function publicMail(mail: StoredMail, mailbox: string) {
  const source = `${mail.html ?? ''}\n${mail.text}`;
  const links = [...source.matchAll(/https?:\/\/[^\s"'<>)\]]+/g)].map(([url]) =>
    url.replaceAll('&amp;', '&'),
  );
  return {
    ...mail,
    links: [...new Set(links)],
    attachments: mail.attachments.map(({ filename, contentType }, index) => ({
      filename,
      contentType,
      url: `${mailbox}/mail/${mail.id}/attachment/${index}`,
    })),
  };
}

function filterOf(query: URLSearchParams): MailFilter {
  const after = query.get('after');
  return {
    to: query.get('to') ?? undefined,
    subject: query.get('subject') ?? undefined,
    after: after && /^\d+$/.test(after) ? Number(after) : undefined,
  };
}

const listening = (server: http.Server | SMTPServer, port: number) =>
  new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });

/**
 * Stands in for a mail service: takes mails by SMTP, keeps them, and shows them on a page of its own.
 * For programs: `GET /api/mails?to=&subject=&after=` answers `{ mails, newest }`, newest first; `GET
 * /api/wait?to=&subject=&after=&timeout=` answers `{ mail }` as soon as one matches, or 404 after `timeout` ms
 * (30,000 when not given, 60,000 at most). `after` is the id of a mail.
 */
export async function startMailFake({ smtpPort, mailboxPort, stateFolder }: MailFakeOptions): Promise<{
  origin: string;
  stop(): Promise<void>;
}> {
  const origin = `http://localhost:${mailboxPort}`;
  const store = new MailStore(stateFolder);

  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    logger: false,
    // The mail counts as taken only once it is stored, as with a real service.
    onData(stream, session, done) {
      simpleParser(stream)
        .then((parsed) => {
          store.add({
            receivedAt: new Date().toISOString(),
            from: addressesOf(parsed.from)[0] ?? '',
            // The envelope tells who gets it; the header may say less.
            to: session.envelope.rcptTo.map((recipient) => recipient.address),
            subject: parsed.subject ?? '',
            text: parsed.text ?? '',
            html: parsed.html || null,
            attachments: parsed.attachments.map((file, index) => ({
              filename: file.filename ?? `attachment-${index + 1}`,
              contentType: file.contentType,
              contentBase64: file.content.toString('base64'),
            })),
          });
          done();
        })
        .catch((error: unknown) => done(error instanceof Error ? error : new Error(String(error))));
    },
  });
  smtp.on('error', (error) => console.error('mail:', error.message));

  const web = http.createServer((request, response) => {
    const url = new URL(request.url ?? '/', origin);
    const send = (
      status: number,
      type: string,
      body: string | Buffer,
      headers: Record<string, string> = {},
    ) => {
      response.writeHead(status, {
        'content-type': type,
        'cache-control': 'no-store',
        'x-content-type-options': 'nosniff',
        ...headers,
      });
      response.end(body);
    };
    const page = (status: number, body: string) =>
      send(status, 'text/html; charset=utf-8', body, {
        'content-security-policy':
          "default-src 'none'; style-src 'unsafe-inline'; font-src 'self'; img-src data:; form-action 'self'; base-uri 'self'",
        'referrer-policy': 'no-referrer',
      });
    const json = (status: number, body: unknown) => send(status, 'application/json', JSON.stringify(body));

    if (request.method !== 'GET') return json(405, { error: 'Only GET is answered here.' });
    const filter = filterOf(url.searchParams);
    const font = FONTS[url.pathname];
    const [, kind, id, part, index] = url.pathname.split('/');

    if (url.pathname === '/')
      return page(200, listPage(store.list(filter), store.recipients(), filter.to ?? ''));
    if (url.pathname === '/api/mails') {
      const mails = store.list(filter).map((mail) => publicMail(mail, origin));
      return json(200, { mails, newest: store.list()[0]?.id ?? 0 });
    }
    if (url.pathname === '/api/wait') {
      const asked = Number(url.searchParams.get('timeout') ?? 30_000);
      const gone = new AbortController();
      response.once('close', () => gone.abort());
      void store
        .waitFor(filter, Math.min(Number.isFinite(asked) ? asked : 30_000, MAX_WAIT_MS), gone.signal)
        .then((mail) => {
          if (gone.signal.aborted) return;
          if (mail) json(200, { mail: publicMail(mail, origin) });
          else json(404, { error: 'No such mail came in that time.' });
        });
      return;
    }
    if (font) {
      const file = path.join(root, 'fonts', font);
      return existsSync(file) ? send(200, 'font/woff2', readFileSync(file)) : page(404, notFoundPage());
    }
    const mail = kind === 'mail' ? store.find(Number(id)) : undefined;
    if (mail && part === undefined) return page(200, mailPage(mail));
    const file = part === 'attachment' ? mail?.attachments[Number(index)] : undefined;
    if (file) {
      const name = encodeURIComponent(file.filename);
      return send(200, file.contentType, Buffer.from(file.contentBase64, 'base64'), {
        'content-disposition': `attachment; filename*=UTF-8''${name}`,
        'content-security-policy': 'sandbox',
      });
    }
    return page(404, notFoundPage());
  });

  await Promise.all([listening(smtp, smtpPort), listening(web, mailboxPort)]);
  return {
    origin,
    async stop() {
      web.closeAllConnections();
      await Promise.all([
        new Promise<void>((resolve) => web.close(() => resolve())),
        new Promise<void>((resolve) => smtp.close(() => resolve())),
      ]);
    },
  };
}
