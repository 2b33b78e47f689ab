import { answer } from '@/app/api/answer';
import { createScheme } from '@/lib/services/scheme/create';
import { duplicateScheme } from '@/lib/services/scheme/duplicate';
import { listSchemes } from '@/lib/services/scheme/list';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** A job's schemes. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => listSchemes(actor, { jobId: (await params).job }));
}

/** Adds a scheme: a copy of another (`{ schemeId }`), or a whole set of choices (`{ name, choices }`). */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) => {
    const asked: Record<string, unknown> = { ...Object(body), jobId: (await params).job };
    return 'schemeId' in asked ? duplicateScheme(actor, asked) : createScheme(actor, asked);
  });
}
