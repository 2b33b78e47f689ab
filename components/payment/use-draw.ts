import useSWR from 'swr';
import { scheduleViewShape, type DrawView } from '@/lib/contracts/payment';
import { paths } from '@/lib/paths';
import { readJson } from '@/components/ui/json';

const WAITING_MS = 1500;
/** Somebody else of the household may pay meanwhile, or the bank may take days. */
const OTHERWISE_MS = 15_000;

/** A draw as the program holds it, looked at again and again; soon, while a webhook is `awaited`. */
export function useDraw(company: string, jobId: string, first: DrawView, awaited: boolean): DrawView {
  const address = paths.api.draws(company, jobId);
  const { data } = useSWR(
    [address, first.id],
    async () => {
      const schedule = scheduleViewShape.parse(await readJson(address));
      return schedule.draws.find((draw) => draw.id === first.id) ?? first;
    },
    {
      fallbackData: first,
      refreshInterval: (draw) => (awaited && draw?.state === 'due' ? WAITING_MS : OTHERWISE_MS),
      dedupingInterval: 500,
      errorRetryInterval: WAITING_MS,
    },
  );
  return data;
}
