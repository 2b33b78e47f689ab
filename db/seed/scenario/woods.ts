import type { Finish, FinishFamily, Species } from '@/lib/engine/edition-types';
import type { Cents } from '@/lib/engine/types';

interface Prices {
  readonly front: number;
  readonly veneer: number;
  readonly moulding: number;
  readonly panel: number;
}

const ALL: readonly FinishFamily[] = ['clear', 'stain', 'paint'];

const wood = (
  id: string,
  name: string,
  figures: readonly [radial: number, tangential: number, janka: number, density: number],
  colour: string,
  grain: Species['grain'],
  prices: Prices,
  finishes: readonly FinishFamily[] = ALL,
  more: Partial<Species> = {},
): Species => ({
  id,
  name,
  family: 'hardwood',
  radial: figures[0] * 10,
  tangential: figures[1] * 10,
  janka: figures[2],
  density: figures[3],
  colour,
  grain,
  frontPrice: prices.front as Cents,
  veneerPrice: prices.veneer as Cents,
  mouldingPrice: prices.moulding as Cents,
  panelPrice: prices.panel as Cents,
  finishes,
  ...more,
});

/**
 * Shrinkage coefficients: USDA FPL-GTR-190, table 13-5, in hundred-thousandths per percent; Janka hardness from the
 * same handbook; densities (thousandths of a pound per cubic inch at 8 %) from memory. Prices are invented.
 */
export const SPECIES: readonly Species[] = [
  wood('red-oak', 'Red oak', [158, 369, 1290, 25], '#c6a57b', 'coarse', {
    front: 900,
    veneer: 1330,
    moulding: 260,
    panel: 700,
  }),
  wood('red-maple', 'Soft maple', [137, 289, 950, 22], '#d6ba92', 'fine', {
    front: 1000,
    veneer: 1400,
    moulding: 280,
    panel: 750,
  }),
  wood('sugar-maple', 'Hard maple', [165, 353, 1450, 25], '#e0c9a3', 'fine', {
    front: 1150,
    veneer: 1470,
    moulding: 310,
    panel: 800,
  }),
  wood('black-cherry', 'Cherry', [126, 248, 950, 20], '#b08262', 'fine', {
    front: 1450,
    veneer: 1750,
    moulding: 390,
    panel: 980,
  }),
  wood('red-alder', 'Alder', [151, 256, 590, 16], '#bd9873', 'fine', {
    front: 1050,
    veneer: 1430,
    moulding: 290,
    panel: 760,
  }),
  wood('hickory', 'Hickory', [169, 315, 1820, 29], '#c4a47e', 'coarse', {
    front: 1200,
    veneer: 1570,
    moulding: 330,
    panel: 860,
  }),
  wood(
    'black-walnut',
    'Walnut',
    [190, 274, 1010, 22],
    '#715543',
    'medium',
    { front: 2450, veneer: 2660, moulding: 620, panel: 1500 },
    ['clear', 'stain'],
  ),
  wood(
    'paint-grade',
    'Paint grade',
    [0, 0, 0, 27],
    '#eae5d9',
    'none',
    { front: 600, veneer: 1120, moulding: 190, panel: 560 },
    ['paint'],
    { family: 'paintGrade', about: 'Smooth board under paint: no grain shows, and the panels do not move.' },
  ),
  wood(
    'foil',
    'Thermofoil',
    [0, 0, 0, 27],
    '#efece4',
    'none',
    { front: 300, veneer: 1150, moulding: 210, panel: 540 },
    ['thermofoil'],
    { family: 'thermofoil', about: 'A film pressed over shaped board; nothing is painted afterwards.' },
  ),
];

const stain = (n: number, tone: string, colours: Readonly<Record<string, string>>): Finish => ({
  id: `stain-${n}`,
  name: `Stain ${n}, ${tone}`,
  family: 'stain',
  colours,
  price: 320 as Cents,
  mouldingPrice: 90 as Cents,
});

const paint = (n: number, tone: string, colour: string): Finish => ({
  id: `paint-${n}`,
  name: `Paint ${n}, ${tone}`,
  family: 'paint',
  colour,
  price: 620 as Cents,
  mouldingPrice: 140 as Cents,
});

const foil = (n: number, tone: string, colour: string): Finish => ({
  id: `foil-${n}`,
  name: `Foil ${n}, ${tone}`,
  family: 'thermofoil',
  colour,
  price: 150 as Cents,
  mouldingPrice: 60 as Cents,
});

/** sRGB values of dry samples, invented; a stain has its own on each wood, never one laid over the wood's. */
export const FINISHES: readonly Finish[] = [
  {
    id: 'clear',
    name: 'Clear',
    about: 'The wood as it is, under a clear coat.',
    family: 'clear',
    price: 240 as Cents,
    mouldingPrice: 60 as Cents,
  },
  stain(1, 'pale brown', {
    'red-oak': '#b99b73',
    'red-maple': '#cbae86',
    'sugar-maple': '#d4ba90',
    'black-cherry': '#a17658',
    'red-alder': '#b08c67',
    hickory: '#b59570',
  }),
  stain(2, 'light brown', {
    'red-oak': '#a3845f',
    'red-maple': '#b3936c',
    'sugar-maple': '#ba9a70',
    'black-cherry': '#8d6550',
    'red-alder': '#9a775a',
    hickory: '#a1825f',
  }),
  stain(3, 'mid brown', {
    'red-oak': '#86694d',
    'red-maple': '#8f7053',
    'sugar-maple': '#957558',
    'black-cherry': '#76523f',
    'red-alder': '#80624a',
    hickory: '#84684d',
    'black-walnut': '#5e4738',
  }),
  stain(4, 'dark brown', {
    'red-oak': '#58453a',
    'red-maple': '#5c4638',
    'sugar-maple': '#60493a',
    'black-cherry': '#543a30',
    'red-alder': '#574237',
    hickory: '#594638',
    'black-walnut': '#46352d',
  }),
  stain(5, 'weathered grey', {
    'red-oak': '#968c7d',
    'red-maple': '#9c9282',
    'sugar-maple': '#a2998a',
    hickory: '#958a7b',
    'red-alder': '#948878',
  }),
  paint(1, 'white', '#f2f0e9'),
  paint(2, 'chalk', '#e8e4d7'),
  paint(3, 'linen', '#ded4c0'),
  paint(4, 'putty', '#c8bfaa'),
  paint(5, 'pale grey', '#ced1cb'),
  paint(6, 'mid grey', '#99a09b'),
  paint(7, 'slate', '#57646a'),
  paint(8, 'navy', '#26374a'),
  paint(9, 'sage', '#a4ae98'),
  paint(10, 'moss', '#6b7658'),
  paint(11, 'clay', '#a5826d'),
  paint(12, 'spruce', '#26463e'),
  foil(1, 'white', '#f3f2ed'),
  foil(2, 'bone', '#e6e0d2'),
];
