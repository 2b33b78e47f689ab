import { requireMember } from '@/app/[company]/member';
import { ApprovalQueue } from '@/components/desk/approval-queue';
import { PageTitle } from '@/components/ui/frame';
import { Panel } from '@/components/ui/panel';
import { NotAllowed } from '@/components/ui/states';
import { reasonNot } from '@/lib/contracts/rights';
import { listApprovals } from '@/lib/services/approval/list';

export const metadata = { title: 'Approvals' };

export default async function ApprovalsPage({ params }: { params: Promise<{ company: string }> }) {
  const { company } = await params;
  const member = await requireMember(company);
  const approvals = await listApprovals(member);
  if (!approvals.ok) return <NotAllowed reason={approvals.fault.sentence} />;
  return (
    <>
      <PageTitle about="A yes seals the next page of the job book; a no leaves the sum as it was.">
        Approvals
      </PageTitle>
      <Panel>
        <ApprovalQueue
          company={company}
          initial={approvals.value}
          reasonNot={reasonNot(member.role, 'changeOrder.decide')}
        />
      </Panel>
    </>
  );
}
