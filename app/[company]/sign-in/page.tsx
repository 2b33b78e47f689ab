import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { readCompany } from '@/app/[company]/read-company';
import { Entrance } from '@/components/sign-in/entrance';
import { SignInForm } from '@/components/sign-in/sign-in-form';
import { SignOutButton } from '@/components/sign-in/sign-out-button';
import { ButtonLink } from '@/components/ui/button';
import { paths } from '@/lib/paths';
import { findSignedIn } from '@/lib/services/session/signed-in';
import { wayBack } from './way-back';

export const metadata: Metadata = { title: 'Sign in' };

interface Props {
  readonly params: Promise<{ company: string }>;
  readonly searchParams: Promise<{ back?: string | string[]; email?: string | string[] }>;
}

const one = (value: string | string[] | undefined): string => (Array.isArray(value) ? value[0] : value) ?? '';

/** The contractor's own sign-in. */
export default async function SignInPage({ params, searchParams }: Props) {
  const { company: slug } = await params;
  const company = await readCompany(slug);
  if (!company) notFound();
  const asked = await searchParams;
  const back = wayBack(slug, one(asked.back));
  const visitor = await findSignedIn();
  if (!visitor) {
    return (
      <Entrance company={company}>
        <SignInForm contractor={company} back={back} email={one(asked.email)} />
      </Entrance>
    );
  }
  return (
    <Entrance company={company}>
      <h1 className="font-title text-page font-semibold">You are signed in</h1>
      <p className="max-w-prose">
        On this device you are signed in as{' '}
        <strong className="break-words">{visitor.verifiedEmails[0] ?? visitor.name}</strong>.
      </p>
      <div className="flex flex-wrap gap-3">
        <ButtonLink href={back}>Go on</ButtonLink>
        <SignOutButton to={paths.signIn(slug)}>Sign in with another address</SignOutButton>
      </div>
    </Entrance>
  );
}
