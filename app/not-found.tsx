import { Frame } from '@/components/ui/frame';
import { NotFound } from '@/components/ui/states';

export default function NotFoundPage() {
  return (
    <Frame className="mx-auto max-w-5xl">
      <main className="grid gap-frame">
        <NotFound>
          <p>The address may be incomplete. The mail from your contractor holds the right one.</p>
        </NotFound>
      </main>
    </Frame>
  );
}
