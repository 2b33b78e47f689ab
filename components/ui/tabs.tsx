'use client';

import * as Radix from '@radix-ui/react-tabs';
import type { ReactNode } from 'react';

export interface Tab {
  readonly id: string;
  readonly label: ReactNode;
  readonly content: ReactNode;
}

/** Tabs as the upper edges of drawers; the open one continues into its content. */
export function Tabs({
  label,
  tabs,
  value,
  onChange,
}: {
  label: string;
  tabs: readonly Tab[];
  /** The open tab, when the page keeps it. */
  value?: string;
  onChange?: (id: string) => void;
}) {
  return (
    <Radix.Root value={value} defaultValue={tabs[0]?.id} onValueChange={onChange}>
      <Radix.List aria-label={label} className="flex overflow-x-auto border-b border-ink/50">
        {tabs.map((tab) => (
          <Radix.Trigger
            key={tab.id}
            value={tab.id}
            className="-mb-px min-h-target shrink-0 border border-transparent px-5 text-reading text-quiet data-[state=active]:border-ink/50 data-[state=active]:border-b-panel data-[state=active]:bg-panel data-[state=active]:font-semibold data-[state=active]:text-ink"
          >
            {tab.label}
          </Radix.Trigger>
        ))}
      </Radix.List>
      {tabs.map((tab) => (
        <Radix.Content key={tab.id} value={tab.id} className="pt-5">
          {tab.content}
        </Radix.Content>
      ))}
    </Radix.Root>
  );
}
