'use client';

import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { LengthText } from '@/components/ui/length';
import { Money } from '@/components/ui/money';
import type { Edition } from '@/lib/engine/edition-types';
import type { ChoiceChange } from '@/lib/engine/types';
import { changeWords } from './decisions';

/** Two people changed the same thing: both answers side by side, and one is taken. */
export function ConflictDialog({
  edition,
  mine,
  theirs,
  onMine,
  onTheirs,
}: {
  edition: Edition;
  mine: { readonly changes: readonly ChoiceChange[]; readonly cents: number };
  theirs: { readonly changes: readonly ChoiceChange[]; readonly cents: number };
  onMine: () => void;
  onTheirs: () => void;
}) {
  return (
    <Dialog
      open
      onOpenChange={() => undefined}
      closable={false}
      title="Changed twice at once"
      about="This scheme was changed on another screen while yours was open. Which shall it be?"
      wide
    >
      <div className="grid gap-frame md:grid-cols-2">
        <Side title="Yours" {...mine} edition={edition}>
          <Button onClick={onMine}>Keep mine</Button>
        </Side>
        <Side title="The other" {...theirs} edition={edition}>
          <Button tone="quiet" onClick={onTheirs}>
            Take the other
          </Button>
        </Side>
      </div>
    </Dialog>
  );
}

function Side({
  title,
  changes,
  cents,
  edition,
  children,
}: {
  title: string;
  changes: readonly ChoiceChange[];
  cents: number;
  edition: Edition;
  children: React.ReactNode;
}) {
  return (
    <section className="grid content-between gap-3 rounded-frame border border-hairline p-3">
      <div>
        <h3 className="font-title text-lead font-semibold">{title}</h3>
        <ul>
          {changes.map((change) => (
            <li key={JSON.stringify(change)}>
              <LengthText text={changeWords(edition, change)} />
            </li>
          ))}
        </ul>
        <p className="text-price font-semibold">
          <Money cents={cents} />
        </p>
      </div>
      <div>{children}</div>
    </section>
  );
}
