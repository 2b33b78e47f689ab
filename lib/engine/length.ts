import type { Sixtyfourths } from './types';

const PER_INCH = 64;

/** A length of `count` 64ths of an inch. Throws `RangeError` when it is not a whole number. */
export function sixtyfourths(count: number): Sixtyfourths {
  if (!Number.isSafeInteger(count)) throw new RangeError(`${count} is not a whole number of 64ths.`);
  return (count === 0 ? 0 : count) as Sixtyfourths;
}

/** A length in inches that is exact in 64ths, for data in code. Throws `RangeError` when it is not. */
export function inches(value: number): Sixtyfourths {
  return sixtyfourths(value * PER_INCH);
}

export const toInches = (length: Sixtyfourths): number => length / PER_INCH;
/** Exact: 1 in = 25.4 mm (D1). */
export const toMillimetres = (length: Sixtyfourths): number => (length * 25.4) / PER_INCH;

/** Rounds down to a multiple of 1/`per` inch (D3). */
export const roundDown = (length: number, per: number): Sixtyfourths =>
  sixtyfourths(Math.floor(length / (PER_INCH / per)) * (PER_INCH / per));
/** Rounds up to a multiple of 1/`per` inch (D3). */
export const roundUp = (length: number, per: number): Sixtyfourths =>
  sixtyfourths(Math.ceil(length / (PER_INCH / per)) * (PER_INCH / per));

const VULGAR: Readonly<Record<string, string>> = {
  '½': '1/2',
  '¼': '1/4',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};

/** The sentence shown for a text that is not a length. */
export const LENGTH_SENTENCE = 'Write a length as 24 1/2, 24.5, 2\'-0 1/2" or 622 mm.';

export type ParsedLength =
  | { readonly ok: true; readonly value: Sixtyfourths; readonly typed: string }
  | { readonly ok: false; readonly sentence: string };

const refusal: ParsedLength = { ok: false, sentence: LENGTH_SENTENCE };

/** 64ths of `whole numerator/denominator`, or `null` when it is not exact. */
function fromFraction(whole: string | undefined, numerator?: string, denominator?: string): number | null {
  const inch = Number(whole ?? 0);
  if (numerator === undefined || denominator === undefined) return Math.round(inch * PER_INCH);
  const below = Number(denominator);
  if (below === 0 || PER_INCH % below !== 0) return null;
  return inch * PER_INCH + Number(numerator) * (PER_INCH / below);
}

/**
 * Reads a length as a tape is read (D2): `24 1/2`, `24-1/2"`, `24½`, `24.5`, `2'-0 1/2"`, `622.3 mm`, `62.2cm`.
 * Metric is converted exactly and stored to the nearest 1/64, half up. Anything else is refused with a sentence.
 */
export function parseLength(text: string): ParsedLength {
  const typed = text;
  let rest = text
    .trim()
    .replace(/[″”]/g, '"')
    .replace(/[′’]/g, "'")
    .replace(/⁄/g, '/')
    .replace(/[½¼¾⅛⅜⅝⅞]/g, (sign) => ` ${VULGAR[sign] ?? ''}`)
    .replace(/\s+/g, ' ')
    .trim();
  if (rest === '' || rest.length > 40) return refusal;

  const metric = /^(\d{1,6}(?:\.\d{1,6})?) ?(mm|cm)$/.exec(rest);
  if (metric?.[1]) {
    // Decimal digits as an integer, so that 622.3 mm is exactly 24 1/2 in.
    const [whole, fraction = ''] = metric[1].split('.');
    const scaled = BigInt(`${whole}${fraction}`) * (metric[2] === 'cm' ? 10n : 1n);
    const below = 10n ** BigInt(fraction.length) * 254n;
    const value = (scaled * 640n * 2n + below) / (below * 2n);
    return accept(Number(value), typed);
  }

  let feet = 0;
  const footed = /^(\d{1,4})'(?:[ -]*)(.*)$/.exec(rest);
  if (footed) {
    feet = Number(footed[1]) * 12 * PER_INCH;
    rest = footed[2] ?? '';
    if (rest === '') return accept(feet, typed);
  }
  rest = rest.replace(/ ?"$/, '');
  const decimal = /^(\d{1,5})(\.\d{1,6})?$/.exec(rest);
  if (decimal) {
    const exact = Number(rest) * PER_INCH;
    return Number.isInteger(exact) ? accept(feet + exact, typed) : refusal;
  }
  const fraction = /^(?:(\d{1,5})[ -])?(\d{1,3})\/(\d{1,2})$/.exec(rest);
  if (fraction) {
    const value = fromFraction(fraction[1], fraction[2], fraction[3]);
    return value === null ? refusal : accept(feet + value, typed);
  }
  return refusal;
}

function accept(value: number, typed: string): ParsedLength {
  return Number.isSafeInteger(value) ? { ok: true, value: sixtyfourths(value), typed } : refusal;
}

/** Whole inches and a reduced fraction to the nearest 1/16, half up: `{ whole: 24, numerator: 1, denominator: 2 }`. */
export function readLength(length: Sixtyfourths): {
  readonly negative: boolean;
  readonly whole: number;
  readonly numerator: number;
  readonly denominator: number;
} {
  const negative = length < 0;
  const sixteenths = Math.floor((Math.abs(length) * 16) / PER_INCH + 0.5);
  const whole = Math.floor(sixteenths / 16);
  let numerator = sixteenths % 16;
  let denominator = 16;
  while (numerator > 0 && numerator % 2 === 0) {
    numerator /= 2;
    denominator /= 2;
  }
  return { negative, whole, numerator, denominator: numerator === 0 ? 1 : denominator };
}

/** `24 1/2`, to the nearest 1/16 (D3). */
export function formatLength(length: Sixtyfourths): string {
  const { negative, whole, numerator, denominator } = readLength(length);
  const fraction = numerator === 0 ? '' : `${numerator}/${denominator}`;
  const text = whole === 0 && fraction ? fraction : [whole, fraction].filter((one) => one !== '').join(' ');
  return negative ? `-${text}` : text;
}

/** `6′ 1″`, to the nearest 1/16. */
export function formatFeet(length: Sixtyfourths): string {
  const sixteenths = Math.floor((Math.abs(length) * 16) / PER_INCH + 0.5);
  const feet = Math.floor(sixteenths / (12 * 16));
  const rest = sixtyfourths((sixteenths - feet * 12 * 16) * 4);
  return `${length < 0 ? '-' : ''}${feet}′ ${formatLength(rest)}″`;
}
