/** One strand of a knot: its path in a field of 96 by 24, and whether it lies over the other. */
export interface Strand {
  readonly d: string;
  readonly over: boolean;
}

const CELLS = 8;
const LEVELS = [4, 12, 20] as const;

/**
 * Two threads plaited along eight crossings. Each crossing takes four bits of the hash: where either thread goes
 * next (three levels each, never the same one) and which of them lies over.
 */
export function knotOf(sha256: string): Strand[] {
  const strands: Strand[] = [];
  let upper: number = LEVELS[0];
  let lower: number = LEVELS[2];
  for (let cell = 0; cell < CELLS; cell++) {
    const bits = parseInt(sha256[cell] ?? '0', 16);
    const pairs = [
      [0, 1],
      [0, 2],
      [1, 0],
      [1, 2],
      [2, 0],
      [2, 1],
    ] as const;
    const [a, b] = pairs[bits % pairs.length] ?? [0, 2];
    const x = cell * (96 / CELLS);
    const nextUpper = LEVELS[a];
    const nextLower = LEVELS[b];
    const upperOver = (bits & 8) !== 0;
    const thread = (from: number, to: number) =>
      `M${x} ${from}C${x + 6} ${from} ${x + 6} ${to} ${x + 12} ${to}`;
    const both: Strand[] = [
      { d: thread(upper, nextUpper), over: upperOver },
      { d: thread(lower, nextLower), over: !upperOver },
    ];
    strands.push(...both.sort((one, other) => Number(one.over) - Number(other.over)));
    upper = nextUpper;
    lower = nextLower;
  }
  return strands;
}
