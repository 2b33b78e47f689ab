import { notFound } from 'next/navigation';
import { readCompany } from '@/app/[company]/read-company';
import { requireActor } from '@/app/[company]/visitor';
import { ReviewScreen } from '@/components/offer/review-screen';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/states';
import { paths } from '@/lib/paths';
import { listSchemes } from '@/lib/services/scheme/list';

export const metadata = { title: 'Review and sign' };

export default async function ReviewPage({
  params,
  searchParams,
}: {
  params: Promise<{ company: string; job: string }>;
  searchParams: Promise<{ scheme?: string | string[] }>;
}) {
  const { company: slug, job: jobId } = await params;
  const company = await readCompany(slug);
  if (!company) notFound();
  const actor = await requireActor(slug, jobId);
  const schemes = await listSchemes(actor, { jobId });
  if (!schemes.ok) notFound();
  const { scheme: asked } = await searchParams;
  const newest = [...schemes.value].sort((a, b) => b.updatedAt.localeCompare(a.updatedAt))[0];
  const scheme = schemes.value.find((one) => one.id === asked) ?? newest;
  const contact = { name: company.name, phone: company.phone };
  if (!scheme)
    return (
      <EmptyState
        title="There is nothing to review yet"
        contact={contact}
        actions={<ButtonLink href={paths.job(slug, jobId)}>Back to the kitchen</ButtonLink>}
      >
        <p>A scheme has to be proposed first.</p>
      </EmptyState>
    );
  return (
    <ReviewScreen
      company={slug}
      jobId={jobId}
      schemeId={scheme.id}
      viewer={{ personId: actor.personId, name: actor.name, role: actor.role }}
      timeZone={company.timeZone}
      contact={contact}
    />
  );
}
