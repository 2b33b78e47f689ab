'use client';

import { useLayoutEffect, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import { classNames } from '@/components/ui/class-names';
import { Difference } from '@/components/ui/difference';
import { LengthText } from '@/components/ui/length';
import type { OptionState } from '@/lib/engine/types';

/**
 * The options of one decision as material blocks in one band: a radio group. Arrows move along it and choose what
 * is free to choose; what needs a swap, or cannot be had, is only reached, and says why, until it is pressed.
 */
export function OptionBand({
  label,
  options,
  confirmed,
  proposedBy,
  picture,
  swapWords,
  onChoose,
  onAsk,
  after,
}: {
  label: string;
  options: readonly OptionState[];
  /** Whether somebody decided; before that the chosen one is the contractor's proposal. */
  confirmed: boolean;
  /** First name of who proposed. */
  proposedBy: string;
  picture: (option: OptionState) => ReactNode;
  /** What else an option changes, such as `with Hard maple`. */
  swapWords: (option: OptionState) => string;
  onChoose: (option: OptionState) => void;
  /** Somebody wants to know about an option that cannot be had. */
  onAsk: (option: OptionState) => void;
  /** Stands behind the last block. */
  after?: ReactNode;
}) {
  const group = useRef<HTMLDivElement>(null);
  const band = useRef<HTMLDivElement>(null);
  const chosenAt = Math.max(
    0,
    options.findIndex((option) => option.chosen),
  );
  const [stop, setStop] = useState<number | null>(null);
  const tabStop = stop !== null && stop < options.length ? stop : chosenAt;

  // The chosen block is in sight when a decision opens; later the band stays where the person scrolled it.
  useLayoutEffect(() => {
    const scroller = band.current;
    const block = scroller?.querySelector<HTMLElement>('[aria-checked=true]');
    if (!scroller || !block) return;
    const left = block.getBoundingClientRect().left - scroller.getBoundingClientRect().left;
    scroller.scrollLeft += left - (scroller.clientWidth - block.clientWidth) / 2;
  }, [label]);

  function press(option: OptionState) {
    if (option.availability === 'notAvailable') onAsk(option);
    else onChoose(option);
  }

  function move(event: KeyboardEvent<HTMLElement>, from: number) {
    const last = options.length - 1;
    const to = {
      ArrowRight: from === last ? 0 : from + 1,
      ArrowDown: from === last ? 0 : from + 1,
      ArrowLeft: from === 0 ? last : from - 1,
      ArrowUp: from === 0 ? last : from - 1,
      Home: 0,
      End: last,
    }[event.key];
    const option = to === undefined ? undefined : options[to];
    if (to === undefined || !option) return;
    event.preventDefault();
    setStop(to);
    group.current?.querySelectorAll<HTMLElement>('[role=radio]')[to]?.focus();
    if (option.availability === 'available' && !option.chosen) onChoose(option);
  }

  return (
    <div
      ref={band}
      className="flex snap-x scroll-px-3 gap-2 overflow-x-auto overscroll-x-contain px-3 pt-3 pb-2 md:scroll-px-5 md:gap-3 md:px-5"
    >
      <div ref={group} role="radiogroup" aria-label={label} className="flex gap-2 md:gap-3">
        {options.map((option, index) => (
          <OptionBlock
            key={option.id}
            option={option}
            confirmed={confirmed}
            proposedBy={proposedBy}
            tabIndex={index === tabStop ? 0 : -1}
            onKeyDown={(event) => move(event, index)}
            onFocus={() => setStop(index)}
            onPress={() => press(option)}
            picture={picture(option)}
            swapWords={swapWords(option)}
          />
        ))}
      </div>
      {after}
    </div>
  );
}

function OptionBlock({
  option,
  confirmed,
  proposedBy,
  tabIndex,
  onKeyDown,
  onFocus,
  onPress,
  picture,
  swapWords,
}: {
  option: OptionState;
  confirmed: boolean;
  proposedBy: string;
  tabIndex: number;
  onKeyDown: (event: KeyboardEvent<HTMLElement>) => void;
  onFocus: () => void;
  onPress: () => void;
  picture: ReactNode;
  swapWords: string;
}) {
  const off = option.availability === 'notAvailable';
  return (
    <button
      type="button"
      role="radio"
      aria-checked={option.chosen}
      aria-disabled={off || undefined}
      tabIndex={tabIndex}
      onKeyDown={onKeyDown}
      onFocus={onFocus}
      onClick={onPress}
      className="relative grid w-34 shrink-0 snap-start content-start gap-1 text-left md:w-37.5"
    >
      <span
        className={classNames(
          'relative block h-19 transition-transform duration-swap md:h-24',
          option.chosen && '-translate-y-[3px]',
          off && 'opacity-45',
        )}
      >
        {picture}
        {option.chosen && <PencilTick />}
      </span>
      <span className={classNames('text-label', off ? 'text-quiet' : option.chosen && 'font-semibold')}>
        <LengthText text={option.name} />
      </span>
      {/* A comma for those who listen. */}
      <span className="sr-only">, </span>
      <span className="text-price font-semibold">
        {option.chosen ? (
          <span className="text-brand">{confirmed ? 'chosen' : `${proposedBy} proposes`}</span>
        ) : off || option.delta === null ? (
          <span className="text-note font-normal text-quiet">
            {option.reason ?? 'Not with these choices'}
          </span>
        ) : (
          <Difference cents={option.delta} none="same price" className="text-ink" />
        )}
      </span>
      {option.availability === 'availableWithSwap' && !option.chosen && (
        <span className="text-note text-quiet">
          <span className="sr-only">, </span>
          <LengthText text={swapWords} />
        </span>
      )}
    </button>
  );
}

/** A drawn tick in the contractor's colour with a light keyline: the mark of what is chosen. */
function PencilTick() {
  return (
    <svg
      viewBox="0 0 44 40"
      className="absolute top-1 right-2 w-10 md:w-11"
      aria-hidden="true"
      fill="none"
      strokeLinejoin="round"
    >
      <path d="M6 22 C9 25 12 29 15 33 C20 22 27 12 37 5" stroke="#fbfcf9" strokeWidth="8.5" />
      <path d="M6 22 C9 25 12 29 15 33 C20 22 27 12 37 5" stroke="var(--tape-mark)" strokeWidth="4.5" />
    </svg>
  );
}

/** Leaves a decision to the salesperson, or takes it back. */
export function UnsureBlock({
  unsure,
  salesperson,
  onPress,
}: {
  unsure: boolean;
  salesperson: string;
  onPress: () => void;
}) {
  return (
    <button
      type="button"
      aria-pressed={unsure}
      onClick={onPress}
      className="relative grid w-34 shrink-0 snap-start content-start gap-1 text-left md:w-37.5"
    >
      <span
        className={classNames(
          'relative block h-19 border border-dashed transition-transform duration-swap md:h-24',
          unsure ? '-translate-y-[3px] border-brand text-brand' : 'border-ink/45 text-quiet',
        )}
      >
        <svg
          viewBox="0 0 150 96"
          className="absolute inset-0 size-full"
          aria-hidden="true"
          fill="none"
          stroke="currentColor"
        >
          <path d="M60 38 C60 18 90 18 90 38 C90 51 75 50 75 62" strokeWidth="4" strokeLinecap="round" />
          <circle cx="75" cy="75" r="3" fill="currentColor" stroke="none" />
        </svg>
        {unsure && <PencilTick />}
      </span>
      <span className={classNames('text-label', unsure && 'font-semibold')}>Not sure, ask {salesperson}</span>
      {unsure && <span className="text-price font-semibold text-brand">asked</span>}
    </button>
  );
}
