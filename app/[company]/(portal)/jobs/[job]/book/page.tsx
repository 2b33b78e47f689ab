import { notFound } from 'next/navigation';
import { requireActor } from '@/app/[company]/visitor';
import { BookPages } from '@/components/book/book-pages';
import { ButtonLink } from '@/components/ui/button';
import { PageTitle } from '@/components/ui/frame';
import { EmptyState } from '@/components/ui/states';
import { paths } from '@/lib/paths';
import { listPages } from '@/lib/services/page/list';

export const metadata = { title: 'Job book' };

export default async function BookPage({ params }: { params: Promise<{ company: string; job: string }> }) {
  const { company, job: jobId } = await params;
  const actor = await requireActor(company, jobId);
  const pages = await listPages(actor, { jobId });
  if (!pages.ok) notFound();
  if (pages.value.length === 0)
    return (
      <EmptyState
        title="The job book is empty"
        actions={<ButtonLink href={paths.job(company, jobId)}>Back to the kitchen</ButtonLink>}
      >
        <p>Its first page is the agreement. It is sealed once everyone who has to sign it has signed.</p>
      </EmptyState>
    );
  return (
    <>
      <PageTitle
        about="Every page is sealed and names the one before it. The file can be checked by anyone, without us."
        actions={
          <a
            href={paths.api.book(company, jobId)}
            download
            className="inline-flex min-h-target items-center rounded-frame border border-ink/45 bg-panel px-5 font-semibold no-underline hover:border-ink"
          >
            Save the book as a file
          </a>
        }
      >
        Job book
      </PageTitle>
      <BookPages company={company} jobId={jobId} pages={pages.value} />
    </>
  );
}
