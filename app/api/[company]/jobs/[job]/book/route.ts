import { answer } from '@/app/api/answer';
import { exportBook } from '@/lib/services/page/export';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** The job book as a file to keep; `npm run verify-book` checks it with no server. */
export async function GET(request: Request, { params }: Context): Promise<Response> {
  const response = await answer(request, params, async (actor) =>
    exportBook(actor, { jobId: (await params).job }),
  );
  if (response.ok) response.headers.set('content-disposition', 'attachment; filename="job-book.json"');
  return response;
}
