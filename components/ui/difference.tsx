import { formatCents } from '@/lib/engine/money';
import { classNames } from './class-names';

/** `$1,240` when there are no odd cents, else `$1,240.50`. Integer cents, sign left out. */
export const roundSum = (cents: number): string => formatCents(Math.abs(cents)).replace(/\.00$/, '');

/** The drawn arrow: up for more, down for less. */
export function Arrow({ up }: { up: boolean }) {
  return (
    <svg viewBox="0 0 10 10" className="inline-block size-[0.62em]" aria-hidden="true">
      <path d={up ? 'M5 1 L9.5 9 H0.5 Z' : 'M5 9 L9.5 1 H0.5 Z'} fill="currentColor" />
    </svg>
  );
}

/**
 * A difference in price: arrow and sign first, hue second, and in words for those who listen. Integer cents.
 * `than` finishes the sentence (`than the first estimate`) and shows it.
 */
export function Difference({
  cents,
  than,
  none = 'no difference',
  className,
}: {
  cents: number;
  than?: string;
  /** What stands for zero. */
  none?: string;
  className?: string;
}) {
  if (cents === 0)
    return (
      <span className={classNames('tabular-nums', className)}>
        {than ? `the same ${asThan(than)}` : none}
      </span>
    );
  const up = cents > 0;
  const word = up ? 'more' : 'less';
  return (
    <span
      className={classNames(
        'whitespace-nowrap tabular-nums',
        !className && (up ? 'text-more' : 'text-less'),
        className,
      )}
    >
      <Arrow up={up} /> <span aria-hidden="true">{up ? '+' : '\u2212'} </span>
      {roundSum(cents)}
      <span className={than ? 'whitespace-normal' : 'sr-only'}>
        {' '}
        {word}
        {than ? ` ${than}` : ''}
      </span>
    </span>
  );
}

const asThan = (than: string): string => than.replace(/^than /, 'as ');
