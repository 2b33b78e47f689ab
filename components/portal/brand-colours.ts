import { clampChroma, converter, formatHex, wcagContrast } from 'culori';

const oklch = converter('oklch');

/** Grounds and inks of app/globals.css, by which a brand colour is judged. */
const LIGHT = { grounds: ['#f4f6f1', '#e6e9e3'], onBrand: ['#f4f6f1', '#17211d'] } as const;
const DARK = { grounds: ['#1f2624', '#161b19'], onBrand: ['#161b19', '#f4f6f1'] } as const;

/** WCAG 2.2, 1.4.3: text of ordinary size. */
export const LEAST_CONTRAST = 4.5;

const least = (colour: string, others: readonly string[]): number =>
  Math.min(...others.map((other) => wcagContrast(colour, other)));

/**
 * The nearest colour of the same hue that can be read on every ground: its lightness moves in steps of a hundredth
 * (OKLCH), towards black (`-1`) or white (`1`). A colour that cannot be parsed becomes the ink's extreme.
 */
export function readableOn(colour: string, grounds: readonly string[], direction: -1 | 1): string {
  const parsed = oklch(colour);
  const end = direction < 0 ? '#000000' : '#ffffff';
  if (!parsed) return end;
  for (let step = 0; step <= 100; step++) {
    const l = parsed.l + (direction * step) / 100;
    if (l <= 0 || l >= 1) break;
    const tried = formatHex(clampChroma({ ...parsed, l }, 'oklch'));
    if (least(tried, grounds) >= LEAST_CONTRAST) return tried;
  }
  return end;
}

/** The colour of text that stands on a brand-coloured field. */
function onBrand(colour: string, candidates: readonly string[]): string {
  return [...candidates].sort((a, b) => wcagContrast(colour, b) - wcagContrast(colour, a))[0] ?? '#000000';
}

export interface BrandColours {
  readonly light: string;
  readonly onLight: string;
  readonly dark: string;
  readonly onDark: string;
}

/** A contractor's colour and its partner for the dark theme, each moved only as far as reading asks. `#rrggbb`. */
export function brandColours(brand: { readonly light: string; readonly dark: string }): BrandColours {
  const light = readableOn(brand.light, LIGHT.grounds, -1);
  const dark = readableOn(brand.dark, DARK.grounds, 1);
  return { light, onLight: onBrand(light, LIGHT.onBrand), dark, onDark: onBrand(dark, DARK.onBrand) };
}

/** The colours as variables for the root, where sheets over the page inherit them too. */
export const brandStyle = (colours: BrandColours): string =>
  `:root{--brand-light:${colours.light};--on-brand-light:${colours.onLight};--brand-dark:${colours.dark};--on-brand-dark:${colours.onDark}}`;
