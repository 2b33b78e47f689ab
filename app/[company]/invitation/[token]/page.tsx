import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { readCompany } from '@/app/[company]/read-company';
import { Entrance } from '@/components/sign-in/entrance';
import { InvitationForm } from '@/components/sign-in/invitation-form';
import { SignOutButton } from '@/components/sign-in/sign-out-button';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Telephone } from '@/components/ui/telephone';
import type { OpenInvitation } from '@/lib/contracts/invitation';
import type { SignedIn } from '@/lib/contracts/sign-in';
import { paths } from '@/lib/paths';
import { readInvitation } from '@/lib/services/invitation/read';
import { findSignedIn } from '@/lib/services/session/signed-in';

export const metadata: Metadata = {
  title: 'Your invitation',
  // The address is the key to the invitation; it goes nowhere else.
  referrer: 'no-referrer',
  robots: { index: false },
};

interface Props {
  readonly params: Promise<{ company: string; token: string }>;
}

/** The day until which the invitation is good, as the contractor's clock has it. */
const dayOf = (instant: string, timeZone: string): string =>
  new Intl.DateTimeFormat('en-US', { weekday: 'long', month: 'long', day: 'numeric', timeZone }).format(
    new Date(instant),
  );

const Title = ({ children }: { children: ReactNode }) => (
  <h1 className="font-title text-page font-semibold">{children}</h1>
);

/** What somebody finds who is signed in with another address than the invited. */
function WrongAddress({
  invitation,
  visitor,
  here,
}: {
  invitation: OpenInvitation;
  visitor: SignedIn;
  here: string;
}) {
  const own = visitor.verifiedEmails[0] ?? visitor.name;
  return (
    <>
      <Notice kind="caution" title="This invitation is for another address">
        <p>
          It was sent to <strong className="break-words">{invitation.email}</strong>, and on this device you
          are signed in as <strong className="break-words">{own}</strong>.
        </p>
      </Notice>
      <div className="flex flex-wrap gap-3">
        <SignOutButton tone="primary" to={here}>
          Go on as {invitation.email}
        </SignOutButton>
        <ButtonLink tone="quiet" href={paths.home(invitation.company.slug)}>
          Stay as {own}
        </ButtonLink>
      </div>
    </>
  );
}

/** An invitation that lets nobody in any more, and whom to ask for another. */
function Ended({ invitation, why }: { invitation: OpenInvitation; why: string }) {
  const { company, invitedBy } = invitation;
  return (
    <Notice kind="caution" title={why}>
      <p>
        Please call {company.name} at <Telephone phone={company.phone} /> and ask {invitedBy} for a new one.
        If you opened an older mail, the newest mail has the link that works.
      </p>
    </Notice>
  );
}

function Accepted({ invitation, isOwn }: { invitation: OpenInvitation; isOwn: boolean }) {
  const { company, email, jobId, jobName } = invitation;
  const kitchen = paths.job(company.slug, jobId);
  const signIn = `${paths.signIn(company.slug)}?${new URLSearchParams({ back: kitchen, email }).toString()}`;
  return (
    <>
      <p className="max-w-prose">
        {isOwn
          ? `You have accepted it already. Your kitchen at ${jobName} is open to you.`
          : `It was accepted already. Whoever it was sent to can sign in with ${email} and see the kitchen at ${jobName}.`}
      </p>
      <div>
        <ButtonLink href={isOwn ? kitchen : signIn}>{isOwn ? 'Open my kitchen' : 'Sign in'}</ButtonLink>
      </div>
    </>
  );
}

/** Who invites to which kitchen, and the way in. */
export default async function InvitationPage({ params }: Props) {
  const { company: slug, token } = await params;
  const company = await readCompany(slug);
  if (!company) notFound();
  const read = await readInvitation({ slug, token });
  if (!read.ok) notFound();
  const invitation = read.value;
  const visitor = await findSignedIn();
  const isOwn = visitor?.verifiedEmails.includes(invitation.email) ?? false;
  const here = paths.invitation(slug, token);

  if (invitation.state === 'expired' || invitation.state === 'revoked') {
    const day = dayOf(invitation.expiresAt, company.timeZone);
    return (
      <Entrance company={company}>
        <Title>Your invitation</Title>
        <Ended
          invitation={invitation}
          why={
            invitation.state === 'expired'
              ? `It was good until ${day} and has run out`
              : `${company.name} took this invitation back or sent a newer one`
          }
        />
      </Entrance>
    );
  }
  if (visitor && !isOwn) {
    return (
      <Entrance company={company}>
        <Title>Your invitation</Title>
        <WrongAddress invitation={invitation} visitor={visitor} here={here} />
      </Entrance>
    );
  }
  if (invitation.state === 'accepted') {
    return (
      <Entrance company={company}>
        <Title>Your invitation</Title>
        <Accepted invitation={invitation} isOwn={isOwn} />
      </Entrance>
    );
  }
  return (
    <Entrance company={company}>
      <Title>Your kitchen at {invitation.jobName}</Title>
      <p className="max-w-prose">
        {invitation.invitedBy} of {company.name} invites you, {invitation.name}, to see your surveyed kitchen
        and to choose for it. The invitation is for you alone and good until{' '}
        {dayOf(invitation.expiresAt, company.timeZone)}.
      </p>
      <InvitationForm
        company={{ slug, name: company.name }}
        token={token}
        email={invitation.email}
        name={invitation.name}
        signedIn={isOwn}
      />
    </Entrance>
  );
}
