import { notFound } from 'next/navigation';
import { requireMember } from '@/app/[company]/member';
import { DoorOrderSheet } from '@/components/desk/door-order-sheet';
import { PrintButton } from '@/components/desk/print-button';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/states';
import { paths } from '@/lib/paths';
import { readDoorOrder } from '@/lib/services/shop/door-order';

export const metadata = { title: 'Door order' };

export default async function DoorOrderPage({
  params,
}: {
  params: Promise<{ company: string; job: string }>;
}) {
  const { company, job } = await params;
  const order = await readDoorOrder(await requireMember(company), { jobId: job });
  const back = (
    <ButtonLink href={paths.deskJob(company, job)} tone="quiet">
      Back to the job
    </ButtonLink>
  );
  if (!order.ok && order.fault.code === 'notFound') notFound();
  if (!order.ok)
    return (
      <EmptyState title="There is no door order yet" actions={back}>
        <p>{order.fault.sentence}</p>
      </EmptyState>
    );
  return (
    <>
      <div className="flex flex-wrap gap-3 px-3 pt-3 print:hidden">
        <PrintButton />
        {back}
      </div>
      <DoorOrderSheet order={order.value} />
    </>
  );
}
