import { notFound } from 'next/navigation';
import { requireMember } from '@/app/[company]/member';
import { ChoosingScreen } from '@/components/choosing/choosing-screen';
import { EmptyState } from '@/components/ui/states';
import { readKitchen } from '@/lib/services/scheme/read-kitchen';

export const metadata = { title: 'Room view' };

/** The household's own choosing screen, opened from the desk. */
export default async function DeskRoomPage({
  params,
}: {
  params: Promise<{ company: string; job: string }>;
}) {
  const { company, job } = await params;
  const kitchen = await readKitchen(await requireMember(company), { jobId: job });
  if (!kitchen.ok && kitchen.fault.code === 'notFound') notFound();
  if (!kitchen.ok)
    return <EmptyState title="There is no room to show yet">{kitchen.fault.sentence}</EmptyState>;
  if (kitchen.value.schemes.length === 0)
    return <EmptyState title="There is no room to show yet">This job has no scheme yet.</EmptyState>;
  return <ChoosingScreen kitchen={kitchen.value} initial={null} />;
}
