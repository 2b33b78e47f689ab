import { Frame } from '@/components/ui/frame';
import { EmptyState } from '@/components/ui/states';

export const dynamic = 'force-dynamic';

/** Nobody's address: every kitchen lives under its contractor's. */
export default function RootPage() {
  return (
    <Frame className="mx-auto max-w-5xl">
      <main className="grid gap-frame">
        <h1 className="font-title text-page font-semibold">Stilewright</h1>
        <EmptyState title="Your kitchen is at your contractor’s address">
          <p>
            Each contractor has an address of their own here. The mail with your invitation leads straight to
            your kitchen.
          </p>
        </EmptyState>
      </main>
    </Frame>
  );
}
