import { inches } from '@/lib/engine/length';
import type { DoorStyle, ProfilePoint } from '@/lib/engine/edition-types';
import type { Cents } from '@/lib/engine/types';
import { section } from './profiles';

/**
 * Sections of a door, 3/4 in thick: y above the back face. An outer edge's x runs in from the door's edge, an inner
 * edge's from the frame's inner edge outwards, a panel's from the frame's inner edge towards the middle.
 */
const SQUARE_OUT = section([0, 0], [0, 46], [2, 48]);
const EASED_OUT = section([0, 0], [0, 42], [2, 46], [6, 48]);
const STEPPED_OUT = section([0, 0], [0, 36], [4, 36], [4, 44], [8, 48]);
const SQUARE_IN = section([0, 32], [0, 47], [1, 48]);
const BEVEL_IN = section([0, 32], [0, 38], [10, 48]);
const BEAD_IN = section([0, 32], [0, 40], [2, 44], [6, 46], [10, 44], [12, 42], [12, 48]);
const OGEE_IN = section([0, 32], [0, 36], [4, 38], [8, 42], [14, 44], [14, 48]);
const FLAT = section([0, 32], [32, 32]);
const RAISED = section([0, 26], [6, 26], [60, 38], [64, 38], [64, 44], [96, 44]);
const BEADED = section([0, 32], [20, 32], [22, 28], [24, 32], [96, 32]);
const NONE: ProfilePoint[] = [];

type Own = Partial<DoorStyle> & { readonly price: Cents; readonly slabPrice: Cents };
const dollars = (value: number): Cents => Math.round(value * 100) as Cents;

const style = (id: string, name: string, about: string, own: Own): DoorStyle => ({
  id,
  name,
  about,
  construction: 'fivePiece',
  panel: 'flat',
  stile: inches(2.25),
  rail: inches(2.25),
  drawerRail: inches(1.5),
  thickness: inches(0.75),
  panelThickness: inches(0.25),
  groove: inches(0.375),
  innerEdge: SQUARE_IN,
  outerEdge: SQUARE_OUT,
  panelProfile: FLAT,
  smallestPanel: inches(2),
  smallestDrawerHeight: inches(5.5),
  smallestHeight: inches(3.5),
  widestLeaf: inches(24),
  smallestRowGap: inches(0.125),
  minimumArea: 150,
  glassPrice: dollars(28),
  ...own,
});

/** Our own plain names; figures of construction and prices are invented, within what is ordinary. */
export const STYLES: readonly DoorStyle[] = [
  style('square-flat-panel', 'Square flat panel', 'Four square-edged pieces round a flat panel.', {
    price: dollars(86),
    slabPrice: dollars(71),
  }),
  style('narrow-flat-panel', 'Narrow flat panel', 'The same with slim stiles and rails.', {
    stile: inches(1.5),
    rail: inches(1.5),
    drawerRail: inches(1.125),
    smallestDrawerHeight: inches(4.5),
    price: dollars(95),
    slabPrice: dollars(74.5),
  }),
  style('broad-flat-panel', 'Broad flat panel', 'Wide stiles and rails with a beveled inner edge.', {
    stile: inches(3),
    rail: inches(3),
    drawerRail: inches(1.75),
    innerEdge: BEVEL_IN,
    outerEdge: EASED_OUT,
    smallestDrawerHeight: inches(6),
    price: dollars(90),
    slabPrice: dollars(71),
  }),
  style('stepped-flat-panel', 'Stepped flat panel', 'A small step runs round the panel.', {
    stile: inches(2.5),
    rail: inches(2.5),
    innerEdge: OGEE_IN,
    outerEdge: EASED_OUT,
    price: dollars(96.5),
    slabPrice: dollars(74.5),
  }),
  style('beaded-frame-flat-panel', 'Beaded frame, flat panel', 'A fine bead inside the frame.', {
    innerEdge: BEAD_IN,
    price: dollars(106),
    slabPrice: dollars(76),
  }),
  style('raised-square-panel', 'Raised square panel', 'A solid panel that rises towards the middle.', {
    panel: 'raised',
    panelThickness: inches(0.625),
    solidPanel: true,
    panelPlay: inches(0.375),
    stile: inches(2.375),
    rail: inches(2.375),
    innerEdge: OGEE_IN,
    outerEdge: STEPPED_OUT,
    panelProfile: RAISED,
    smallestPanel: inches(3),
    smallestDrawerHeight: inches(6.5),
    price: dollars(110),
    slabPrice: dollars(78),
    species: [
      'red-oak',
      'red-maple',
      'sugar-maple',
      'black-cherry',
      'red-alder',
      'hickory',
      'black-walnut',
      'paint-grade',
    ],
  }),
  style('board-panel', 'Board panel', 'A frame round a panel of narrow boards.', {
    panel: 'beaded',
    innerEdge: SQUARE_IN,
    panelProfile: BEADED,
    plankWidth: inches(2),
    price: dollars(102),
    slabPrice: dollars(74.5),
    species: ['red-oak', 'red-maple', 'sugar-maple', 'red-alder', 'paint-grade'],
  }),
  style('upright-planks', 'Upright planks', 'Boards side by side, held from behind.', {
    construction: 'plank',
    panel: 'none',
    panelThickness: inches(0.75),
    plankWidth: inches(3),
    outerEdge: EASED_OUT,
    innerEdge: NONE,
    panelProfile: NONE,
    widestLeaf: inches(21),
    price: dollars(100),
    slabPrice: dollars(100),
    species: ['red-oak', 'hickory', 'red-alder', 'red-maple', 'black-walnut'],
  }),
  style('plain-slab', 'Plain slab', 'One flat face, edges square.', {
    construction: 'slab',
    panel: 'none',
    panelThickness: inches(0.75),
    innerEdge: NONE,
    panelProfile: NONE,
    price: dollars(72.5),
    slabPrice: dollars(72.5),
  }),
  style('eased-slab', 'Eased slab', 'One flat face with softened edges, pressed in film.', {
    construction: 'slab',
    panel: 'none',
    panelThickness: inches(0.75),
    innerEdge: NONE,
    panelProfile: NONE,
    outerEdge: EASED_OUT,
    price: dollars(61),
    slabPrice: dollars(61),
    species: ['foil', 'paint-grade'],
  }),
];
