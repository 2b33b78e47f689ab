import { knotOf } from './knot';

/** A seal's hash drawn as a short knot; the same hash always gives the same one. */
export function SealKnot({ sha256, className }: { sha256: string; className?: string }) {
  const knot = knotOf(sha256);
  return (
    <svg viewBox="0 0 96 24" className={className} role="img" aria-label={`Seal ${sha256.slice(0, 8)}`}>
      {knot.map((strand, index) => (
        <path
          key={index}
          d={strand.d}
          fill="none"
          stroke={strand.over ? 'var(--brand)' : 'var(--ink-quiet)'}
          strokeWidth={strand.over ? 2.4 : 1.6}
          strokeLinecap="round"
        />
      ))}
    </svg>
  );
}
