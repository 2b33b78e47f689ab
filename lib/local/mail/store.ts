import { EventEmitter } from 'node:events';
import { mkdirSync, readdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';

const storedMailShape = z.object({
  id: z.number().int().positive(),
  receivedAt: z.string(),
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
  html: z.string().nullable(),
  attachments: z.array(
    z.object({ filename: z.string(), contentType: z.string(), contentBase64: z.string() }),
  ),
});

/** A received mail. `id` counts up from 1 in order of arrival; `receivedAt` is an instant in UTC. */
export type StoredMail = z.infer<typeof storedMailShape>;

/** Narrows a list of mails; absent fields do not narrow. */
export interface MailFilter {
  /** One recipient's address, compared without regard to case. */
  readonly to?: string | undefined;
  /** A part of the subject, without regard to case. */
  readonly subject?: string | undefined;
  /** Only mails that arrived after the one with this id. */
  readonly after?: number | undefined;
}

export function matches(mail: StoredMail, { to, subject, after }: MailFilter): boolean {
  if (to && !mail.to.some((address) => address.toLowerCase() === to.trim().toLowerCase())) return false;
  if (subject && !mail.subject.toLowerCase().includes(subject.toLowerCase())) return false;
  return after === undefined || mail.id > after;
}

/** The mails of one stack, one JSON file each in a folder. */
export class MailStore {
  private readonly mails: StoredMail[] = [];
  private readonly arrivals = new EventEmitter().setMaxListeners(0);

  constructor(private readonly folder: string) {
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    for (const name of readdirSync(folder).filter((file) => /^\d+\.json$/.test(file))) {
      const parsed = storedMailShape.safeParse(JSON.parse(readFileSync(path.join(folder, name), 'utf8')));
      if (parsed.success) this.mails.push(parsed.data);
    }
    this.mails.sort((a, b) => a.id - b.id);
  }

  add(mail: Omit<StoredMail, 'id'>): StoredMail {
    const stored = { ...mail, id: (this.mails.at(-1)?.id ?? 0) + 1 };
    const file = path.join(this.folder, `${stored.id}.json`);
    writeFileSync(`${file}.new`, JSON.stringify(stored), { mode: 0o600 });
    renameSync(`${file}.new`, file);
    this.mails.push(stored);
    this.arrivals.emit('mail');
    return stored;
  }

  /** Newest first. */
  list(filter: MailFilter = {}): StoredMail[] {
    return this.mails.filter((mail) => matches(mail, filter)).reverse();
  }

  find(id: number): StoredMail | undefined {
    return this.mails.find((mail) => mail.id === id);
  }

  /** Every address that got a mail, in order of the alphabet. */
  recipients(): string[] {
    return [...new Set(this.mails.flatMap((mail) => mail.to.map((to) => to.toLowerCase())))].sort();
  }

  /** The newest mail that matches, now or within `patience` ms; null when none came. */
  async waitFor(filter: MailFilter, patience: number, given: AbortSignal): Promise<StoredMail | null> {
    return new Promise((resolve) => {
      const settle = (mail: StoredMail | null) => {
        this.arrivals.off('mail', look);
        clearTimeout(timer);
        resolve(mail);
      };
      const look = () => {
        const mail = this.list(filter)[0];
        if (mail) settle(mail);
      };
      const timer = setTimeout(() => settle(null), patience);
      given.addEventListener('abort', () => settle(null), { once: true });
      this.arrivals.on('mail', look);
      look();
    });
  }
}
