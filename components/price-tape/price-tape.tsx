'use client';

import { useId, useState, type ReactNode } from 'react';
import { classNames } from '@/components/ui/class-names';
import { Arrow } from '@/components/ui/difference';
import { LengthText } from '@/components/ui/length';
import { formatCents } from '@/lib/engine/money';
import type { PriceLine } from '@/lib/engine/types';
import { longBlade, shortBlade, type Blade } from './blade';
import { BASELINE_NAMES, differenceWords, groupLines, type Baseline } from './words';

interface Priced {
  readonly lines: readonly PriceLine[];
  readonly discount: number;
  readonly tax: number;
  /** Integer cents. */
  readonly total: number;
}

/**
 * The price tape along the foot: a blade hooked at the baseline that ends at today's total, the total in large
 * figures, the difference in words. Opened, it unrolls into the lines it is made of.
 */
export function PriceTape({
  priced,
  baselineCents,
  baseline,
  action,
  taxPlace,
}: {
  priced: Priced;
  baselineCents: number;
  baseline: Baseline;
  /** What is done with the total, such as the way to the review. */
  action?: ReactNode;
  /** Where the tax is owed, as the terms name it. */
  taxPlace?: string;
}) {
  const [open, setOpen] = useState(false);
  const linesId = useId();
  const difference = priced.total - baselineCents;
  const words = differenceWords(priced.total, baselineCents, baseline);

  return (
    <section
      aria-label="Price"
      className="sticky bottom-0 z-20 rounded-frame border border-case bg-case text-on-case [--hairline:#4a5751] [--ink-quiet:#b9c2ba] [--plaster:#2a3530] dark:border-hairline"
      onKeyDown={(event) => {
        if (event.key === 'Escape') setOpen(false);
      }}
    >
      {/* Read out whenever its words change, and not when the page opens. */}
      <p role="status" className="sr-only">
        The total is {formatCents(priced.total)}, {words}.
      </p>
      <div
        id={linesId}
        inert={!open}
        className={classNames(
          'absolute inset-x-[-1px] bottom-full grid transition-[grid-template-rows] duration-swap',
          open ? 'grid-rows-[1fr]' : 'grid-rows-[0fr]',
        )}
      >
        <div className="min-h-0 overflow-hidden">
          <Lines priced={priced} taxPlace={taxPlace} />
        </div>
      </div>
      <div className="lg:grid lg:grid-cols-[auto_1fr_auto] lg:items-stretch">
        <div className="flex flex-wrap items-center justify-between gap-x-2 px-3 pt-2 pb-1 md:px-5 lg:block lg:py-2">
          <p className="font-title text-page leading-10 font-semibold tabular-nums md:text-tape">
            {formatCents(priced.total)}
          </p>
          <div className="lg:hidden [&_a]:px-3 [&_a]:text-label [&_button]:px-3 [&_button]:text-label">
            {action}
          </div>
          <button
            type="button"
            aria-expanded={open}
            aria-controls={linesId}
            onClick={() => setOpen(!open)}
            className="-mx-1 flex min-h-target w-full items-center gap-x-2 px-1 text-left text-label lg:min-h-7 lg:w-auto"
          >
            <span className="tabular-nums">
              {difference !== 0 && (
                <>
                  <Arrow up={difference > 0} />{' '}
                </>
              )}
              {difference === 0 ? capital(words) : words}
            </span>
            <span className="whitespace-nowrap underline underline-offset-4">
              {open ? 'Roll up' : 'See why'}
            </span>
          </button>
        </div>
        <div className="self-center lg:hidden">
          <BladeDrawing blade={shortBlade(baselineCents, priced.total)} baseline={baseline} numeral={17} />
        </div>
        <div className="hidden min-w-0 self-center lg:block">
          <BladeDrawing blade={longBlade(baselineCents, priced.total)} baseline={baseline} numeral={8} />
        </div>
        {action && <div className="hidden items-center px-5 lg:flex">{action}</div>}
      </div>
    </section>
  );
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** Whether the blade's end or the hook would cut a numeral. */
const cuts = (place: number, width: number, { end, hook }: Blade): boolean =>
  [end, hook].some((at) => at > place && at < place + width);

/** The steel itself; the figures beside it say the same, so it is hidden from those who listen. */
function BladeDrawing({
  blade,
  baseline,
  numeral,
}: {
  blade: Blade;
  baseline: Baseline;
  /** The width of a numeral in per cent of the window. */
  numeral: number;
}) {
  const less = blade.end < blade.hook;
  const from = Math.min(blade.hook, blade.end);
  return (
    <div aria-hidden="true" className="relative h-10 overflow-hidden text-on-blade lg:h-12">
      <div
        className="absolute inset-0 bg-blade transition-[clip-path] duration-swap"
        style={{ clipPath: `inset(0 ${(100 - blade.end).toFixed(3)}% 0 0)` }}
      >
        <svg width="100%" height="100%" className="absolute inset-0">
          {blade.ticks.map((tick) => (
            <line
              key={tick.cents}
              x1={`${tick.place}%`}
              x2={`${tick.place}%`}
              y1="0"
              y2={tick.numeral ? 22 : (tick.cents / 100) % 500 === 0 ? 15 : 10}
              stroke="currentColor"
              strokeWidth={tick.numeral ? 1.6 : 0.8}
            />
          ))}
          {blade.ticks
            .filter((tick) => tick.numeral && !cuts(tick.place, numeral, blade))
            .map((tick) => (
              <text
                key={tick.cents}
                x={`${tick.place}%`}
                dx="6"
                y="36"
                fontSize="15"
                fill="currentColor"
                className="font-title tabular-nums"
              >
                {formatCents(tick.cents).replace(/\.00$/, '')}
              </text>
            ))}
        </svg>
        {!less && (
          <div
            className="absolute top-0 h-[5px] bg-[var(--tape-mark)] transition-[left,width] duration-swap"
            style={{ left: `${from.toFixed(3)}%`, width: `${Math.abs(blade.end - blade.hook).toFixed(3)}%` }}
          />
        )}
      </div>
      {less && (
        // What was drawn back into the case since the baseline.
        <div
          className="absolute top-0 h-full border-y border-dashed border-blade/70 transition-[left,width] duration-swap"
          style={{ left: `${blade.end.toFixed(3)}%`, width: `${(blade.hook - blade.end).toFixed(3)}%` }}
        />
      )}
      <div
        className="absolute top-0 h-full w-[5px] -translate-x-full bg-[#b98a57] transition-[left] duration-swap"
        style={{ left: `${blade.end.toFixed(3)}%` }}
      />
      {blade.hookBeyond === null ? (
        <div
          className="absolute top-0 h-full w-[3px] bg-[var(--tape-mark)] transition-[left] duration-swap"
          style={{ left: `${blade.hook.toFixed(3)}%` }}
        />
      ) : (
        <div
          className={classNames(
            'absolute bottom-1 text-note text-on-case',
            blade.hookBeyond === 'left' ? 'left-2 text-on-blade' : 'right-2',
          )}
        >
          {blade.hookBeyond === 'left' ? '◂ ' : ''}
          {BASELINE_NAMES[baseline]}
          {blade.hookBeyond === 'right' ? ' ▸' : ''}
        </div>
      )}
    </div>
  );
}

/** The lines by zone, each with its because, and how they add up to the total. */
function Lines({ priced, taxPlace }: { priced: Priced; taxPlace?: string }) {
  return (
    <div
      tabIndex={0}
      role="region"
      aria-label="What the total is made of"
      className="max-h-[min(64dvh,40rem)] overflow-y-auto overscroll-contain rounded-t-frame border border-on-blade bg-blade px-3 py-3 text-on-blade outline-offset-[-3px] md:px-5"
    >
      <div className="grid gap-x-13 gap-y-5 lg:grid-cols-2">
        {groupLines(priced.lines).map((group) => (
          <section key={group.zone} aria-label={group.name}>
            <h2 className="flex items-baseline justify-between gap-3 border-b border-on-blade/60 font-title text-lead font-semibold">
              <span>{group.name}</span>
              <span className="text-price tabular-nums">{formatCents(group.sumCents)}</span>
            </h2>
            <ul>
              {group.lines.map((line) => (
                <li
                  key={line.code}
                  className="grid grid-cols-[1fr_auto] gap-x-5 border-b border-on-blade/25 py-2"
                >
                  <span>
                    <span className="font-semibold">
                      <LengthText text={line.label} />
                    </span>
                    {', '}
                    <LengthText text={line.quantityText} />
                    <span className="block text-note">
                      <LengthText text={line.because} />
                    </span>
                  </span>
                  <span className="text-right text-price whitespace-nowrap tabular-nums">
                    {formatCents(line.amount)}
                  </span>
                </li>
              ))}
            </ul>
          </section>
        ))}
      </div>
      <dl className="mt-5 ml-auto grid max-w-md grid-cols-[1fr_auto] gap-x-5 gap-y-1 text-price tabular-nums">
        {priced.discount !== 0 && (
          <>
            <dt>Discount</dt>
            <dd className="text-right">{formatCents(-priced.discount)}</dd>
          </>
        )}
        <dt>Sales tax{taxPlace ? `, ${taxPlace}` : ''}</dt>
        <dd className="text-right">{formatCents(priced.tax)}</dd>
        <dt className="border-t border-on-blade font-semibold">Total</dt>
        <dd className="border-t border-on-blade text-right font-semibold">{formatCents(priced.total)}</dd>
      </dl>
    </div>
  );
}
