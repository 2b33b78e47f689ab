/** How a wood is figured; lengths in metres, shares from 0 to 1. */
export interface Figure {
  readonly seed: number;
  readonly ring: number;
  /** How late in the year's growth the dark line begins; higher is thinner. */
  readonly sharpness: number;
  readonly taper: number;
  readonly warp: number;
  readonly pores: number;
  readonly poresInEarlywood: number;
  readonly streak: number;
  /** Darkness of latewood, of pores, of broad tone, and between staves. */
  readonly dark: readonly [number, number, number];
  readonly ringDepth: number;
  readonly poreDepth: number;
  readonly toneDepth: number;
  readonly staveDepth: number;
}

/** A tile of board: 0.4 by 1.6 m. */
export const TILE = { width: 0.4, height: 1.6, columns: 512, rows: 1024 } as const;

function random(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

/** Smooth noise between −1 and 1 that repeats after one tile. */
function noise(columns: number, rows: number, next: () => number): (u: number, v: number) => number {
  const values = Float32Array.from({ length: columns * rows }, () => next() * 2 - 1);
  const at = (x: number, y: number) => values[y * columns + x] ?? 0;
  return (u, v) => {
    const x = u * columns;
    const y = v * rows;
    const xi = Math.floor(x);
    const yi = Math.floor(y);
    const ease = (f: number) => f * f * (3 - 2 * f);
    const fx = ease(x - xi);
    const fy = ease(y - yi);
    const x0 = ((xi % columns) + columns) % columns;
    const y0 = ((yi % rows) + rows) % rows;
    const x1 = (x0 + 1) % columns;
    const y1 = (y0 + 1) % rows;
    const a = at(x0, y0);
    const b = at(x1, y0);
    const c = at(x0, y1);
    const d = at(x1, y1);
    return a + (b - a) * fx + (c - a) * fy + (a - b - c + d) * fx * fy;
  };
}

export interface GrainTile {
  /** RGBA: latewood, pores, broad tone, fibre. */
  readonly data: Uint8Array;
  /** Means of the first three, so that a material's average stays its chip's colour. */
  readonly mean: readonly [number, number, number];
}

/** A tile of figured wood. Deterministic. */
export function makeGrain(
  figure: Figure,
  columns: number = TILE.columns,
  rows: number = TILE.rows,
): GrainTile {
  const next = random(figure.seed);
  const wave = noise(3, 2, next);
  const wave2 = noise(7, 4, next);
  const wave3 = noise(19, 6, next);
  const wave4 = noise(61, 10, next);
  const fine = noise(170, 24, next);
  const fibre = noise(columns, Math.round(TILE.height / 0.012), next);
  const broad = noise(9, 2, next);
  const broad2 = noise(23, 3, next);
  const data = new Uint8Array(columns * rows * 4);
  const turns = Math.max(1, Math.round((figure.taper * TILE.height) / figure.ring));
  const sums = [0, 0, 0];
  const clamp = (value: number) => Math.min(1, Math.max(0, value));
  for (let j = 0; j < rows; j++) {
    const v = j / rows;
    for (let i = 0; i < columns; i++) {
      const u = i / columns;
      const x = (u - 0.5) * TILE.width;
      const wobble = wave(u, v) * 0.5 + wave2(u, v) * 0.3;
      const radius =
        Math.sqrt(x * x + 0.055 * 0.055) +
        figure.warp * (wobble * 0.018 + wave3(u, v) * 0.0022 + wave4(u, v) * 0.0005);
      const phase = radius / figure.ring + turns * v;
      const year = Math.floor(phase);
      const season = phase - year;
      const late = Math.pow(season, figure.sharpness) * (season > 0.93 ? (1 - season) / 0.07 : 1);
      const strength = 0.72 + 0.28 * Math.sin(year * 12.9898);
      const latewood = clamp(late * strength + fine(u, v) * 0.1);
      const early = season < 0.38 ? 1 - season / 0.38 : 0;
      const gate = figure.poresInEarlywood * early + (1 - figure.poresInEarlywood);
      const fibres = fibre(u, v);
      const pore = fibres > 1 - figure.pores * (0.25 + gate) ? clamp(0.35 + 0.65 * gate) : 0;
      const tone = clamp(
        0.5 + 0.5 * (broad(u, v) * 0.55 + broad2(u, v) * 0.3 + fine(u, v) * 0.15) * figure.streak,
      );
      const offset = (j * columns + i) * 4;
      [latewood, pore, tone].forEach((value, channel) => {
        const byte = Math.round(value * 255);
        data[offset + channel] = byte;
        sums[channel] = (sums[channel] ?? 0) + byte;
      });
      data[offset + 3] = Math.round(clamp(fibres * 0.5 + 0.5) * 255);
    }
  }
  const scale = 1 / (columns * rows * 255);
  return { data, mean: [(sums[0] ?? 0) * scale, (sums[1] ?? 0) * scale, (sums[2] ?? 0) * scale] };
}

const MEDIUM: Figure = {
  seed: 23,
  ring: 0.006,
  sharpness: 3,
  taper: 0.025,
  warp: 1,
  pores: 0.16,
  poresInEarlywood: 0.3,
  streak: 0.9,
  dark: [0.78, 0.7, 0.63],
  ringDepth: 0.75,
  poreDepth: 0.16,
  toneDepth: 0.16,
  staveDepth: 0.05,
};

/** Figures by the edition's coarseness of grain; a species keeps its own seed. */
const FIGURES: Readonly<Record<'fine' | 'medium' | 'coarse', Figure>> = {
  fine: {
    ...MEDIUM,
    ring: 0.007,
    sharpness: 5,
    taper: 0.03,
    warp: 0.9,
    pores: 0.1,
    poresInEarlywood: 0.2,
    streak: 0.8,
    dark: [0.86, 0.8, 0.73],
    poreDepth: 0.1,
    toneDepth: 0.1,
    staveDepth: 0.035,
  },
  medium: MEDIUM,
  coarse: {
    ...MEDIUM,
    ring: 0.007,
    sharpness: 1.7,
    taper: 0.036,
    pores: 0.5,
    poresInEarlywood: 0.85,
    streak: 0.7,
    dark: [0.68, 0.56, 0.45],
    ringDepth: 0.9,
    poreDepth: 0.26,
    toneDepth: 0.12,
    staveDepth: 0.07,
  },
};

/** The figure of a species, different for each. */
export function figureOf(species: {
  readonly id: string;
  readonly grain: 'fine' | 'medium' | 'coarse';
}): Figure {
  const figure = FIGURES[species.grain];
  let seed = 17;
  for (const letter of species.id) seed = (Math.imul(seed, 31) + letter.charCodeAt(0)) >>> 0;
  const turn = (seed % 97) / 97;
  return {
    ...figure,
    seed,
    ring: figure.ring * (0.88 + 0.3 * turn),
    warp: figure.warp * (0.9 + 0.5 * ((seed % 53) / 53)),
    streak: figure.streak * (0.9 + 0.4 * ((seed % 29) / 29)),
  };
}
