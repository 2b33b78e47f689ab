import { formatCents } from '@/lib/engine/money';
import { classNames } from './class-names';

/** A sum in tabular numerals, never broken over two lines. Integer cents. */
export function Money({ cents, className }: { cents: number; className?: string }) {
  return (
    <span className={classNames('whitespace-nowrap tabular-nums', className)}>{formatCents(cents)}</span>
  );
}
