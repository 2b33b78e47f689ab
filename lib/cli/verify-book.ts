import { readFileSync } from 'node:fs';
import { verifyBook } from '@/lib/record/verify';

/** `npm run -s verify-book FILE`: exit code 0 when all holds, 1 on a finding, 2 when the file cannot be read. */
async function main(): Promise<number> {
  const file = process.argv[2];
  if (!file) {
    console.error('Say which file: npm run -s verify-book FILE');
    return 2;
  }
  let book: unknown;
  try {
    book = JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    console.error(
      `${file} cannot be read as a job book: ${error instanceof Error ? error.message : 'unknown'}`,
    );
    return 2;
  }
  const { ok, pages, seal, findings } = await verifyBook(book);
  for (let page = 0; page <= pages; page++) {
    const own = findings.filter((finding) => finding.page === page);
    if (own.length === 0 && page > 0) console.log(`Page ${page}: holds.`);
    for (const { field, message } of own)
      console.log(`${page === 0 ? 'File' : `Page ${page}`}, ${field}: ${message}`);
  }
  if (ok) console.log(`The book holds. Its last seal: ${seal ?? ''}`);
  return ok ? 0 : 1;
}

void main().then((code) => {
  process.exitCode = code;
});
