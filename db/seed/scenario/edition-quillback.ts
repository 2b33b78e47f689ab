import type { Edition } from '@/lib/engine/edition-types';
import type { Cents } from '@/lib/engine/types';
import { ternHollowEdition } from './edition';

const STYLES = ['square-flat-panel', 'broad-flat-panel', 'raised-square-panel', 'plain-slab'];
const SPECIES = ['red-oak', 'red-maple', 'black-cherry', 'paint-grade'];

const dearer = (price: Cents): Cents => Math.round(price * 1.06) as Cents;

/** The first edition of Quillback's price book: fewer things, at its own prices. */
export const quillbackEdition: Edition = {
  ...ternHollowEdition,
  title: 'Price book 2026',
  publishedOn: '2026-10-01',
  styles: ternHollowEdition.styles
    .filter((style) => STYLES.includes(style.id))
    .map(({ species, ...style }) => ({
      ...style,
      price: dearer(style.price),
      slabPrice: dearer(style.slabPrice),
      ...(species ? { species: species.filter((id) => SPECIES.includes(id)) } : {}),
    })),
  species: ternHollowEdition.species.filter((species) => SPECIES.includes(species.id)),
  finishes: ternHollowEdition.finishes
    .filter((finish) => finish.family !== 'thermofoil')
    .map(({ colours, ...finish }) => ({
      ...finish,
      ...(colours
        ? { colours: Object.fromEntries(Object.entries(colours).filter(([id]) => SPECIES.includes(id))) }
        : {}),
    })),
  crowns: ternHollowEdition.crowns.filter((profile) => profile.id !== 'stepped-4-1-4'),
  labour: ternHollowEdition.labour.map((rate) => ({ ...rate, price: dearer(rate.price) })),
  leadTimeDays: 25,
};
