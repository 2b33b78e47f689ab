import { answer } from '@/app/api/answer';
import { changeScheme } from '@/lib/services/scheme/change';
import { discardScheme } from '@/lib/services/scheme/discard';
import { readScheme } from '@/lib/services/scheme/read';

interface Context {
  readonly params: Promise<{ company: string; job: string; scheme: string }>;
}

const named = async (params: Context['params']) => {
  const { job, scheme } = await params;
  return { jobId: job, schemeId: scheme };
};

/** One scheme. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => readScheme(actor, await named(params)));
}

/** Changes a scheme: `{ version, changes, decided, unsure, totalCents }`. */
export function PATCH(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) =>
    changeScheme(actor, { ...Object(body), ...(await named(params)) }),
  );
}

/** Throws a scheme away. */
export function DELETE(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => discardScheme(actor, await named(params)));
}
