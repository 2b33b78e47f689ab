import { CompanyNotFound } from '@/components/portal/company-states';
import { Frame } from '@/components/ui/frame';

export default function CompanyNotFoundPage() {
  return (
    <Frame className="mx-auto max-w-5xl">
      <main className="grid gap-frame">
        <CompanyNotFound />
      </main>
    </Frame>
  );
}
