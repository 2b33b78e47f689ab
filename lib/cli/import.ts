import { readFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { closePool } from '@/db/client';
import type { Member } from '@/lib/contracts/actor';
import type { Result } from '@/lib/contracts/result';
import { findCompanyBySlug } from '@/lib/services/company/find-by-slug';
import { publishEdition } from '@/lib/services/edition/publish';
import { findJobByNumber } from '@/lib/services/job/find-by-number';
import { findMember } from '@/lib/services/person/find-member';
import { importSurvey } from '@/lib/services/survey/import';

const USAGE = `Usage:
  npm run -s import -- survey --company SLUG --job NUMBER [--as MAIL] FILE.json
  npm run -s import -- edition --company SLUG [--as MAIL] FILE.json
An edition's file holds { "edition": …, "costs": … }. Without --as, the company's owner is named as who did it.`;

/** Why a command cannot go on, in words for its caller. */
class Refusal extends Error {}

function readJson(file: string): unknown {
  let text: string;
  try {
    text = readFileSync(file, 'utf8');
  } catch {
    throw new Refusal(`${file} cannot be read.`);
  }
  try {
    return JSON.parse(text);
  } catch (error) {
    throw new Refusal(`${file} is not JSON: ${error instanceof Error ? error.message : String(error)}`);
  }
}

function valueOf<T>(result: Result<T>): T {
  if (result.ok) return result.value;
  const faults = (result.fault.faults ?? []).map(({ path, message }) => `  ${path}: ${message}`);
  throw new Refusal([result.fault.sentence, ...faults].join('\n'));
}

async function actorOf(slug: string, email: string | undefined): Promise<Member> {
  const company = await findCompanyBySlug(slug);
  if (!company) throw new Refusal(`There is no company at ${slug}.`);
  const member = await findMember(company.id, email);
  if (!member)
    throw new Refusal(email ? `${email} is not of the staff of ${slug}.` : `${slug} has no owner.`);
  return member;
}

async function run(args: string[]): Promise<string> {
  const { values, positionals } = parseArgs({
    args,
    allowPositionals: true,
    options: { company: { type: 'string' }, job: { type: 'string' }, as: { type: 'string' } },
  });
  const [kind, file, ...rest] = positionals;
  if (!kind || !file || rest.length > 0 || !values.company) throw new Refusal(USAGE);
  const content = readJson(file);
  if (kind === 'edition') {
    const actor = await actorOf(values.company, values.as);
    const { number, sha256 } = valueOf(await publishEdition(actor, content));
    return `Edition ${number} is published (${sha256}).`;
  }
  const jobNumber = Number(values.job);
  if (kind !== 'survey' || !Number.isInteger(jobNumber) || jobNumber < 1) throw new Refusal(USAGE);
  const actor = await actorOf(values.company, values.as);
  const jobId = valueOf(await findJobByNumber(actor, jobNumber));
  const { number, sha256 } = valueOf(await importSurvey(actor, { jobId, survey: content }));
  return `Survey ${number} of job ${jobNumber} is stored (${sha256}).`;
}

/** `npm run -s import`: brings a survey or an edition in from a file. Exit code 2 when it was refused. */
async function main(): Promise<number> {
  try {
    console.log(await run(process.argv.slice(2)));
    return 0;
  } catch (error) {
    const known =
      error instanceof Refusal ||
      (error instanceof Error && 'code' in error && String(error.code).startsWith('ERR_PARSE_ARGS'));
    if (!known) throw error;
    console.error(error.message);
    return 2;
  } finally {
    await closePool();
  }
}

main().then(
  (code) => process.exit(code),
  (error: unknown) => {
    console.error(error);
    process.exit(1);
  },
);
