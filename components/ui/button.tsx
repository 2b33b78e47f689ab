'use client';

import Link from 'next/link';
import { useId, type ComponentPropsWithoutRef, type ReactNode } from 'react';
import { classNames } from './class-names';

export type Tone = 'primary' | 'quiet' | 'danger';

const TONES: Readonly<Record<Tone, string>> = {
  primary: 'border-brand bg-brand text-on-brand',
  quiet: 'border-ink/45 bg-panel text-ink',
  danger: 'border-more bg-panel text-more',
};
const HOVER: Readonly<Record<Tone, string>> = {
  primary: 'hover:border-ink',
  quiet: 'hover:border-ink',
  danger: 'hover:bg-more hover:text-panel',
};

const FORM =
  'inline-flex min-h-target min-w-target items-center justify-center gap-2 rounded-frame border px-5 py-2 text-center text-reading font-semibold no-underline transition-colors duration-swap';

interface ButtonProps extends ComponentPropsWithoutRef<'button'> {
  readonly tone?: Tone;
  /** Why it cannot be pressed, shown beside it; `null` when it can. */
  readonly reason?: string | null;
}

/**
 * A button of at least 44 px. What cannot be pressed stays reachable by keyboard and says its reason; a press on
 * it, or a form's submission through it, does nothing.
 */
export function Button({
  tone = 'primary',
  reason = null,
  disabled = false,
  type = 'button',
  className,
  onClick,
  children,
  ...rest
}: ButtonProps) {
  const reasonId = useId();
  const off = disabled || reason !== null;
  const button = (
    <button
      type={type}
      aria-disabled={off || undefined}
      aria-describedby={reason === null ? undefined : reasonId}
      onClick={(event) => {
        if (off) event.preventDefault();
        else onClick?.(event);
      }}
      className={classNames(
        FORM,
        off
          ? 'cursor-not-allowed border-hairline bg-plaster text-quiet'
          : classNames(TONES[tone], HOVER[tone]),
        className,
      )}
      {...rest}
    >
      {children}
    </button>
  );
  if (reason === null) return button;
  return (
    <span className="inline-flex flex-wrap items-center gap-x-3 gap-y-1">
      {button}
      <span id={reasonId} className="text-note text-quiet">
        {reason}
      </span>
    </span>
  );
}

/** A link that looks and measures like a button. */
export function ButtonLink({
  href,
  tone = 'primary',
  className,
  children,
  ...rest
}: { href: string; tone?: Tone; children: ReactNode } & Omit<ComponentPropsWithoutRef<'a'>, 'href'>) {
  return (
    <Link href={href} className={classNames(FORM, TONES[tone], HOVER[tone], className)} {...rest}>
      {children}
    </Link>
  );
}
