/** Lines of grain for a drawn block; the same wood and seed give the same lines. */

export type GrainKind = 'fine' | 'medium' | 'coarse' | 'none';

export interface GrainLine {
  readonly path: string;
  readonly width: number;
  /** 0 to 1. */
  readonly depth: number;
  /** Pores: a broken line; unbroken when absent. */
  readonly dashes?: string;
}

/** A small generator of numbers in [0, 1) from a word (mulberry32 on an FNV-1a hash). */
export function seeded(word: string): () => number {
  let state = 0x811c9dc5;
  for (const letter of word) state = Math.imul(state ^ letter.charCodeAt(0), 0x01000193);
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const SPACING: Readonly<Record<Exclude<GrainKind, 'none'>, number>> = { fine: 7, medium: 5.5, coarse: 4.5 };
const at = (value: number): string => value.toFixed(1);

/** Plain-sawn grain over a field of `width` by `height`: arches in the middle, straighter lines to the sides. */
export function grainLines(kind: GrainKind, seed: string, width: number, height: number): GrainLine[] {
  if (kind === 'none') return [];
  const random = seeded(seed);
  const lines: GrainLine[] = [];
  const middle = width * (0.35 + random() * 0.3);
  const arches = kind === 'fine' ? 3 : 5;
  const pores = kind === 'coarse' ? '7 4' : kind === 'medium' ? '16 5' : undefined;
  for (let n = 0; n < arches; n++) {
    const spread = 5 + n * (SPACING[kind] + 1.5) + random() * 2;
    const apex = height * (0.08 + 0.1 * n + random() * 0.05) - height * 0.25;
    const lean = (random() - 0.5) * 6;
    lines.push({
      path: `M${at(middle - spread)} ${at(height + 4)} C${at(middle - spread * 0.9)} ${at(height * 0.5)} ${at(middle - spread * 0.35)} ${at(apex + 10)} ${at(middle + lean)} ${at(apex)} C${at(middle + spread * 0.4)} ${at(apex + 10)} ${at(middle + spread * 0.92)} ${at(height * 0.5)} ${at(middle + spread)} ${at(height + 4)}`,
      width: 0.6 + random() * 0.8,
      depth: 0.35 + random() * 0.35,
      dashes: pores,
    });
  }
  const clear = 5 + arches * (SPACING[kind] + 1.5);
  for (const side of [-1, 1]) {
    let x = middle + side * clear;
    while (x > -4 && x < width + 4) {
      const sway = 1 + random() * 2.2;
      const drift = side * random() * 3;
      lines.push({
        path: `M${at(x)} -3 C${at(x + sway)} ${at(height * 0.3)} ${at(x - sway)} ${at(height * 0.65)} ${at(x + drift)} ${at(height + 3)}`,
        width: 0.5 + random() * 0.9,
        depth: 0.2 + random() * 0.45,
        dashes: random() < 0.7 ? pores : undefined,
      });
      x += side * SPACING[kind] * (0.55 + random() * 0.9);
    }
  }
  return lines;
}
