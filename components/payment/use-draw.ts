import useSWR from 'swr';
import { scheduleViewShape, type DrawView } from '@/lib/contracts/payment';
import { paths } from '@/lib/paths';
import { ask } from './ask';

/** A draw as the program holds it, looked at again every `everyMs` and whenever the page is looked at again. */
export function useDraw(company: string, jobId: string, first: DrawView, everyMs: number): DrawView {
  const address = paths.api.draws(company, jobId);
  const { data } = useSWR(
    [address, first.id],
    async () => {
      const answer = await ask(scheduleViewShape, address);
      if (answer.kind !== 'value') throw new Error(answer.kind === 'lost' ? 'not reached' : answer.sentence);
      return answer.value.draws.find((draw) => draw.id === first.id) ?? first;
    },
    { fallbackData: first, refreshInterval: everyMs, dedupingInterval: 500, errorRetryInterval: everyMs },
  );
  return data;
}
