'use client';

import { useEffect, useRef, type KeyboardEvent, type ReactNode } from 'react';
import { classNames } from './class-names';

export interface RadioBlock<Value extends string> {
  readonly value: Value;
  /** What the group reads out, and what is shown unless `children` of the group draws it. */
  readonly label: string;
  /** Stays reachable, is read out with its reason, cannot be taken. */
  readonly disabled?: boolean;
  readonly reason?: string;
}

/**
 * A real radio group: one tab stop, arrows, Home and End move. With `select="follow"` moving chooses at once;
 * with `select="press"` (choices that cost money) it only moves the focus, and Space, Enter or a tap chooses.
 */
export function RadioBlocks<Value extends string>({
  label,
  blocks,
  value,
  onChoose,
  select = 'follow',
  className,
  blockClassName,
  render,
}: {
  label: string;
  blocks: readonly RadioBlock<Value>[];
  value: Value | null;
  onChoose: (value: Value) => void;
  select?: 'follow' | 'press';
  className?: string;
  blockClassName?: string;
  render?: (block: RadioBlock<Value>, chosen: boolean) => ReactNode;
}) {
  const group = useRef<HTMLDivElement>(null);
  const chosenIndex = blocks.findIndex((block) => block.value === value);
  const stop = chosenIndex === -1 ? 0 : chosenIndex;

  // In a group that scrolls sideways the chosen block is in sight.
  useEffect(() => {
    const scroller = group.current;
    const block = scroller?.querySelectorAll<HTMLElement>('[role=radio]')[stop];
    if (!scroller || !block || scroller.scrollWidth <= scroller.clientWidth) return;
    const left = block.getBoundingClientRect().left - scroller.getBoundingClientRect().left;
    scroller.scrollLeft += left - (scroller.clientWidth - block.clientWidth) / 2;
  }, [stop]);

  function move(event: KeyboardEvent<HTMLElement>, from: number) {
    const last = blocks.length - 1;
    const to = {
      ArrowRight: from === last ? 0 : from + 1,
      ArrowDown: from === last ? 0 : from + 1,
      ArrowLeft: from === 0 ? last : from - 1,
      ArrowUp: from === 0 ? last : from - 1,
      Home: 0,
      End: last,
    }[event.key];
    if (to === undefined) return;
    event.preventDefault();
    const target = group.current?.querySelectorAll<HTMLElement>('[role=radio]')[to];
    target?.focus();
    const block = blocks[to];
    if (select === 'follow' && block && !block.disabled) onChoose(block.value);
  }

  return (
    <div ref={group} role="radiogroup" aria-label={label} className={className}>
      {blocks.map((block, index) => {
        const chosen = block.value === value;
        return (
          <button
            key={block.value}
            type="button"
            role="radio"
            aria-checked={chosen}
            aria-disabled={block.disabled || undefined}
            tabIndex={index === stop ? 0 : -1}
            onKeyDown={(event) => move(event, index)}
            onClick={() => {
              if (!block.disabled) onChoose(block.value);
            }}
            className={
              blockClassName ??
              classNames(
                'relative inline-flex min-h-target min-w-target items-center justify-center border px-3 py-1 text-reading',
                chosen ? 'border-brand bg-brand font-semibold text-on-brand' : 'border-ink/45 bg-panel',
                block.disabled && 'cursor-not-allowed text-quiet',
              )
            }
          >
            {render ? render(block, chosen) : block.label}
            {block.disabled && block.reason && !render && <span className="sr-only">, {block.reason}</span>}
          </button>
        );
      })}
    </div>
  );
}
