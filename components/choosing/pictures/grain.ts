/** Lines of grain for a drawn block; the same wood and seed give the same lines. */

export type GrainKind = 'fine' | 'medium' | 'coarse' | 'none';

export interface GrainLine {
  readonly path: string;
  readonly width: number;
  /** 0 to 1. */
  readonly depth: number;
  /** Pores: a broken line; unbroken when absent. */
  readonly dashes?: string;
  readonly offset?: number;
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
  // Coarse woods show their pores as short strokes, fine ones hardly at all.
  const pore = { fine: 0, medium: 16, coarse: 9 }[kind];
  const broken = (): Pick<GrainLine, 'dashes' | 'offset'> => {
    if (pore === 0 || random() < 0.15) return {};
    const stroke = () => pore * (0.5 + random());
    const dashes = `${at(stroke())} ${at(2 + random() * 3)} ${at(stroke() * 1.8)} ${at(1.5 + random() * 4)}`;
    return { dashes, offset: Math.round(random() * 40) };
  };
  for (let n = 0; n < arches; n++) {
    const spread = 6 + n * (SPACING[kind] + 2) + random() * 2;
    const apex = height * (0.16 * n + random() * 0.08 - 0.3);
    const top = middle + (random() - 0.5) * 4;
    lines.push({
      path: `M${at(middle - spread)} ${at(height + 4)} C${at(middle - spread * 0.97)} ${at(height * 0.55)} ${at(top - spread * 0.62)} ${at(apex)} ${at(top)} ${at(apex)} C${at(top + spread * 0.62)} ${at(apex)} ${at(middle + spread * 0.97)} ${at(height * 0.55)} ${at(middle + spread)} ${at(height + 4)}`,
      width: 0.5 + random() * 0.8,
      depth: 0.3 + random() * 0.35,
      ...broken(),
    });
  }
  const clear = 6 + arches * (SPACING[kind] + 2);
  for (const side of [-1, 1]) {
    let x = middle + side * clear;
    while (x > -4 && x < width + 4) {
      const sway = 1 + random() * 2.2;
      const drift = side * random() * 3;
      lines.push({
        path: `M${at(x)} -3 C${at(x + sway)} ${at(height * 0.3)} ${at(x - sway)} ${at(height * 0.65)} ${at(x + drift)} ${at(height + 3)}`,
        width: 0.4 + random() * 0.8,
        depth: 0.18 + random() * 0.4,
        ...broken(),
      });
      x += side * SPACING[kind] * (0.4 + random() * 0.9);
    }
  }
  return lines;
}
