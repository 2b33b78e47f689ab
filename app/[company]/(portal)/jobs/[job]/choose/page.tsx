import { notFound } from 'next/navigation';
import { requireActor } from '@/app/[company]/visitor';
import { ChoosingScreen } from '@/components/choosing/choosing-screen';
import { EmptyState } from '@/components/ui/states';
import { readCompany } from '@/app/[company]/read-company';
import { readKitchen } from '@/lib/services/scheme/read-kitchen';

export const metadata = { title: 'Choose' };

export default async function ChoosePage({
  params,
  searchParams,
}: {
  params: Promise<{ company: string; job: string }>;
  searchParams: Promise<{ scheme?: string | string[] }>;
}) {
  const { company: slug, job } = await params;
  const { scheme } = await searchParams;
  const actor = await requireActor(slug, job);
  const kitchen = await readKitchen(actor, { jobId: job });
  if (!kitchen.ok && kitchen.fault.code === 'notFound') notFound();
  if (!kitchen.ok || kitchen.value.schemes.length === 0) {
    const company = await readCompany(slug);
    return (
      <EmptyState
        title="There is nothing to choose yet"
        contact={company && { name: company.name, phone: company.phone }}
      >
        <p>Your kitchen is being measured. As soon as a first proposal is ready you will find it here.</p>
      </EmptyState>
    );
  }
  return <ChoosingScreen kitchen={kitchen.value} initial={typeof scheme === 'string' ? scheme : null} />;
}
