import { bookFileShape, pageEnvelopeShape, type BookFile, type PageEnvelope } from '@/lib/contracts/page';
import { offerBodyShape, type OfferBody } from '@/lib/contracts/offer';
import { isCanonical } from './canonical';
import { sha256Hex } from './hash';

/** What does not hold in a book: on which page, in which field. Page 0 is the file itself. */
export interface Finding {
  readonly page: number;
  readonly field: string;
  readonly message: string;
}

export interface Verdict {
  readonly ok: boolean;
  readonly pages: number;
  /** The last page's seal; whoever holds it from another source knows that no page is missing at the end. */
  readonly seal: string | null;
  readonly findings: readonly Finding[];
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

/**
 * Checks an exported book by itself (R3): canonical texts, hashes, chain, sequence, signers, sums and contract
 * arithmetic. `input` is anything; what is no book is a finding too.
 */
export async function verifyBook(input: unknown): Promise<Verdict> {
  const parsed = bookFileShape.safeParse(input);
  if (!parsed.success) {
    const findings = parsed.error.issues.map((issue) => ({
      page: typeof issue.path[1] === 'number' ? issue.path[1] + 1 : 0,
      field: issue.path.join('.') || 'file',
      message: issue.message,
    }));
    return { ok: false, pages: 0, seal: null, findings };
  }
  const book = parsed.data;
  const findings: Finding[] = [];
  if (book.pages.length === 0) findings.push({ page: 0, field: 'pages', message: 'The book has no page.' });
  let previous: { sha256: string; body: OfferBody | null } | null = null;
  for (const [index, page] of book.pages.entries()) {
    const body: OfferBody | null = await verifyPage(book, page, index + 1, previous, findings);
    previous = { sha256: page.sha256, body };
  }
  return { ok: findings.length === 0, pages: book.pages.length, seal: previous?.sha256 ?? null, findings };
}

async function verifyPage(
  book: BookFile,
  page: BookFile['pages'][number],
  sequence: number,
  previous: { sha256: string; body: OfferBody | null } | null,
  findings: Finding[],
): Promise<OfferBody | null> {
  const find = (field: string, message: string) => void findings.push({ page: sequence, field, message });

  if (page.sequence !== sequence) find('sequence', `Page ${sequence} is numbered ${page.sequence}.`);
  if (!isCanonical(page.envelope)) find('envelope', 'The envelope is not canonical JSON.');
  if (!isCanonical(page.offer)) find('offer', 'What was signed is not canonical JSON.');
  if ((await sha256Hex(page.envelope)) !== page.sha256)
    find('sha256', 'The seal is not the hash of the envelope.');

  const envelope = pageEnvelopeShape.safeParse(parseJson(page.envelope));
  const body = offerBodyShape.safeParse(parseJson(page.offer));
  if (!envelope.success) {
    for (const issue of envelope.error.issues) find(`envelope.${issue.path.join('.')}`, issue.message);
  } else await verifyEnvelope(book, page.offer, envelope.data, sequence, previous?.sha256 ?? null, find);
  if (!body.success) {
    for (const issue of body.error.issues) find(`offer.${issue.path.join('.')}`, issue.message);
    return null;
  }
  if (envelope.success) verifySigners(envelope.data, body.data, find);
  if (body.data.job.id !== book.job) find('offer.job.id', 'What was signed belongs to another job.');
  await verifyTexts(body.data, find);
  verifySums(body.data, previous?.body ?? null, find);
  return body.data;
}

type Find = (field: string, message: string) => void;

async function verifyEnvelope(
  book: BookFile,
  offer: string,
  envelope: PageEnvelope,
  sequence: number,
  previousSha256: string | null,
  find: Find,
): Promise<void> {
  if (envelope.job !== book.job) find('envelope.job', 'The page belongs to another job.');
  if (envelope.sequence !== sequence)
    find('envelope.sequence', `Page ${sequence} says that it is page ${envelope.sequence}.`);
  if (envelope.previousSha256 !== previousSha256)
    find('envelope.previousSha256', 'The page does not name the seal of the page before it.');
  const offerSha256 = await sha256Hex(offer);
  if (envelope.offerSha256 !== offerSha256)
    find('envelope.offerSha256', 'The page does not name the hash of what was signed.');
  for (const [index, signature] of envelope.signatures.entries()) {
    if (signature.offerSha256 !== offerSha256)
      find(`envelope.signatures.${index}.offerSha256`, `${signature.name} signed something else.`);
    if (signature.signedAt > envelope.sealedAt)
      find(`envelope.signatures.${index}.signedAt`, `${signature.name} signed after the page was sealed.`);
  }
}

function verifySigners(envelope: PageEnvelope, body: OfferBody, find: Find): void {
  for (const signer of body.requiredSigners) {
    const own = envelope.signatures.filter((one) => one.personId === signer.personId);
    if (own.length !== 1) find('envelope.signatures', `${signer.name} has not signed once.`);
  }
  for (const [index, signature] of envelope.signatures.entries()) {
    if (signature.consentSha256 !== body.consent.sha256)
      find(`envelope.signatures.${index}.consentSha256`, `${signature.name} consented to another text.`);
  }
  if (envelope.kind !== body.kind) find('envelope.kind', 'The page is of another kind than what was signed.');
}

/** The text that a notice's hash is over. */
export const noticeText = (notice: { title: string; text: string; source: string }): string =>
  [notice.title, notice.text, notice.source].join('\n');

/** The text that the consent's hash is over. */
export const consentText = (consent: { title: string; paragraphs: readonly string[] }): string =>
  [consent.title, ...consent.paragraphs].join('\n');

async function verifyTexts(body: OfferBody, find: Find): Promise<void> {
  for (const [index, notice] of body.notices.entries()) {
    if ((await sha256Hex(noticeText(notice))) !== notice.sha256)
      find(`offer.notices.${index}.sha256`, `The notice "${notice.title}" is not the text of its hash.`);
  }
  if ((await sha256Hex(consentText(body.consent))) !== body.consent.sha256)
    find('offer.consent.sha256', 'The consent is not the text of its hash.');
}

function verifySums(body: OfferBody, before: OfferBody | null, find: Find): void {
  const lines = body.lines.reduce((sum, line) => sum + line.amountCents, 0);
  if (lines !== body.subtotalCents) find('offer.subtotalCents', 'The lines do not add up to the subtotal.');
  if (body.subtotalCents - body.discountCents + body.taxCents !== body.totalCents)
    find('offer.totalCents', 'Subtotal, discount and tax do not make the total.');
  const { sum } = body;
  if (sum.originalCents + sum.previousOrdersCents !== sum.beforeCents && body.kind === 'changeOrder')
    find('offer.sum.beforeCents', 'The original sum and the orders before do not make the sum before.');
  if (sum.beforeCents + sum.thisPageCents !== sum.afterCents)
    find('offer.sum.afterCents', 'The sum before and this page do not make the new sum.');
  if (body.kind === 'agreement' && sum.afterCents !== body.totalCents)
    find('offer.sum.afterCents', 'The agreement’s sum is not its total.');
  if (before && sum.beforeCents !== before.sum.afterCents)
    find('offer.sum.beforeCents', 'The page does not begin with the sum of the page before it.');
  if (!before && body.kind === 'changeOrder')
    find('offer.kind', 'A book does not begin with a change order.');
  const scheduled = body.schedule.reduce((total, draw) => total + draw.amountCents, 0);
  if (scheduled !== sum.afterCents)
    find('offer.schedule', 'The payments do not add up to the sum after this page.');
}
