import { notFound } from 'next/navigation';
import { requireMember } from '@/app/[company]/member';
import { InviteForm } from '@/components/desk/invite-form';
import { Record } from '@/components/desk/record';
import { Schedule } from '@/components/payment/schedule';
import { StageRule } from '@/components/portal/stage-rule';
import { ButtonLink } from '@/components/ui/button';
import { PageTitle } from '@/components/ui/frame';
import { Panel } from '@/components/ui/panel';
import { Table, Td, Th } from '@/components/ui/table';
import type { InvitationState } from '@/lib/contracts/invitation';
import { JOB_STAGE_NAMES } from '@/lib/contracts/states';
import { paths } from '@/lib/paths';
import { listChangeOrders } from '@/lib/services/change-order/list';
import { listDraws } from '@/lib/services/draw/list';
import { listInvitations } from '@/lib/services/invitation/list';
import { readJob } from '@/lib/services/job/read';
import { listPages } from '@/lib/services/page/list';

export const metadata = { title: 'Job' };

const INVITATION_WORDS: Readonly<Record<InvitationState, string>> = {
  open: 'not opened yet',
  accepted: 'accepted',
  expired: 'expired',
  revoked: 'taken back',
};

/** All that the staff needs of one job. */
export default async function DeskJobPage({ params }: { params: Promise<{ company: string; job: string }> }) {
  const { company, job: jobId } = await params;
  const member = await requireMember(company);
  const job = await readJob(member, { jobId });
  if (!job.ok) notFound();
  const { name, number, address, stage, salesperson } = job.value;
  const [invitations, schedule, pages, orders] = await Promise.all([
    listInvitations(member, { jobId }),
    listDraws(member, { jobId }),
    listPages(member, { jobId }),
    listChangeOrders(member, { jobId }),
  ]);
  const people = invitations.ok ? invitations.value : [];
  return (
    <>
      <PageTitle
        about={`Job ${number}, ${address}. Salesperson: ${salesperson.name}.`}
        actions={
          <>
            <ButtonLink href={paths.deskRoom(company, jobId)}>Open the room view</ButtonLink>
            <ButtonLink href={paths.doorOrder(company, jobId)} tone="quiet">
              Door order
            </ButtonLink>
          </>
        }
      >
        {name}
      </PageTitle>
      <Panel title={`Stage: ${JOB_STAGE_NAMES[stage]}`}>
        <StageRule stage={stage} />
      </Panel>
      <div className="grid gap-frame lg:grid-cols-2">
        <Panel title="People of this job">
          {people.length === 0 ? (
            <p className="mb-5 text-quiet">Nobody is invited yet.</p>
          ) : (
            <Table caption="Invitations" className="mb-5">
              <thead>
                <tr>
                  <Th>Name</Th>
                  <Th>Mail address</Th>
                  <Th>Signs</Th>
                  <Th>Invitation</Th>
                </tr>
              </thead>
              <tbody>
                {people.map((one) => (
                  <tr key={one.id}>
                    <Td>{one.name}</Td>
                    <Td>{one.email}</Td>
                    <Td>{one.signer ? 'yes' : 'no'}</Td>
                    <Td>{INVITATION_WORDS[one.state]}</Td>
                  </tr>
                ))}
              </tbody>
            </Table>
          )}
          <h3 className="mb-2 font-title text-lead font-semibold">Invite somebody</h3>
          <InviteForm company={company} jobId={jobId} />
        </Panel>
        <Panel title="Record">
          <Record
            company={company}
            jobId={jobId}
            pages={pages.ok ? pages.value : []}
            orders={orders.ok ? orders.value : []}
          />
        </Panel>
      </div>
      {schedule.ok && <Schedule schedule={schedule.value} company={company} jobId={jobId} pays={false} />}
    </>
  );
}
