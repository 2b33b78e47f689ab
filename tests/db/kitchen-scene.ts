import type { DoorStyle, Edition, EditionCosts, MouldingProfile } from '@/lib/engine/edition-types';
import type { Cents, Choices, Sixtyfourths, Survey } from '@/lib/engine/types';

/** Inches as the computation counts them. */
const inches = (value: number) => (value * 64) as Sixtyfourths;
const cents = (value: number) => value as Cents;

/** One wall, one wall cabinet with one door of 15 by 27 inches, and room for any crown above it. */
export const SURVEY: Survey = {
  version: 1,
  kitchen: 'One cabinet',
  measuredOn: '2026-11-02',
  yearBuilt: 1990,
  room: {
    outline: [
      { x: inches(0), y: inches(0) },
      { x: inches(120), y: inches(0) },
      { x: inches(120), y: inches(120) },
      { x: inches(0), y: inches(120) },
    ],
    ceiling: inches(96),
    soffits: [],
  },
  // Seen from the room, the north wall runs from its left end in the west to its right end in the east.
  walls: [
    {
      id: 'N',
      name: 'North wall',
      kind: 'wall',
      from: { x: inches(0), y: inches(120) },
      to: { x: inches(120), y: inches(120) },
    },
  ],
  cabinets: [
    {
      id: 'N-01',
      wall: 'N',
      zone: 'wall',
      tier: 'wall',
      at: inches(24),
      width: inches(18),
      height: inches(30),
      bottom: inches(54),
      depth: inches(12),
      frame: {
        stileLeft: inches(1.5),
        stileRight: inches(1.5),
        railTop: inches(1.5),
        railBottom: inches(1.5),
        thickness: inches(0.75),
        layout: {
          opening: {
            n: 1,
            kind: 'door',
            width: inches(15),
            height: inches(27),
            hinge: 'left',
            existing: [{ width: inches(15.75), height: inches(27.75) }],
          },
        },
      },
      left: { exposed: true },
      right: { exposed: true },
      box: 'faceFrame',
      action: 'reface',
      material: 'wood',
      bondTest: 'passed',
      condition: 'sound',
      coated: true,
    },
  ],
  fillers: [],
  appliances: [],
  gaps: [],
  typed: {},
};

const style = (id: string, name: string, price: number, more: Partial<DoorStyle> = {}): DoorStyle => ({
  id,
  name,
  construction: 'fivePiece',
  panel: 'flat',
  stile: inches(2.25),
  rail: inches(2.25),
  drawerRail: inches(1.5),
  thickness: inches(0.75),
  panelThickness: inches(0.25),
  groove: inches(0.375),
  innerEdge: [],
  outerEdge: [],
  panelProfile: [],
  smallestPanel: inches(2),
  smallestDrawerHeight: inches(5),
  smallestHeight: inches(4),
  widestLeaf: inches(24),
  smallestRowGap: inches(0.125),
  minimumArea: 150,
  price: cents(price),
  slabPrice: cents(price),
  ...more,
});

const crown: MouldingProfile = {
  id: 'cove',
  name: 'Cove crown',
  kind: 'crown',
  section: [
    { x: inches(0), y: inches(0) },
    { x: inches(2), y: inches(2.5) },
    { x: inches(0), y: inches(2.5) },
  ],
  face: inches(3.25),
  spring: 38_000,
  height: inches(2.5),
  projection: inches(2),
  price: cents(950),
};

/** A price book of two styles, two species and two finishes; style `plank` is made in oak alone. */
export const edition = (number: number): Edition => ({
  version: 1,
  number,
  title: `Edition ${number}`,
  publishedOn: '2026-11-01',
  styles: [
    style('frame', 'Flat frame', 4200),
    style('plank', 'Plank', 5100, { construction: 'plank', panel: 'none', species: ['oak'] }),
  ],
  species: [
    {
      id: 'maple',
      name: 'Maple',
      family: 'hardwood',
      // Red maple, USDA FPL-GTR-190 table 13-5; hardness from the same book, density from memory.
      radial: 1370,
      tangential: 2890,
      janka: 950,
      density: 20,
      colour: '#d9bd94',
      grain: 'fine',
      frontPrice: cents(900),
      veneerPrice: cents(500),
      mouldingPrice: cents(300),
      panelPrice: cents(700),
      finishes: ['clear', 'paint'],
    },
    {
      id: 'oak',
      name: 'Red oak',
      family: 'hardwood',
      radial: 1580,
      tangential: 3690,
      janka: 1290,
      density: 23,
      colour: '#c79a63',
      grain: 'coarse',
      frontPrice: cents(600),
      veneerPrice: cents(400),
      mouldingPrice: cents(250),
      panelPrice: cents(600),
      finishes: ['clear'],
    },
  ],
  finishes: [
    { id: 'clear', name: 'Clear', family: 'clear', price: cents(0), mouldingPrice: cents(0) },
    {
      id: 'paint-3',
      name: 'Paint 3, linen',
      family: 'paint',
      colour: '#ece5d6',
      price: cents(350),
      mouldingPrice: cents(80),
    },
  ],
  overlays: [
    {
      id: 'half',
      name: 'Half inch overlay',
      amount: inches(0.5),
      gap: inches(0.125),
      hingeSet: 'soft',
      setback: inches(0.9375),
    },
  ],
  hingeSets: [
    {
      id: 'soft',
      name: 'Soft-close hinge',
      overlay: inches(0.5),
      softClose: true,
      openingAngle: 105,
      intrusion: inches(1),
      smallestReveal: inches(0.125),
      byHeight: [
        { upTo: inches(40), hinges: 2 },
        { upTo: inches(60), hinges: 3 },
      ],
      byWeight: [
        { upTo: 15_000, hinges: 2 },
        { upTo: 30_000, hinges: 3 },
      ],
      price: cents(650),
    },
  ],
  crowns: [crown],
  bases: [],
  lightRails: [],
  pulls: [
    {
      id: 'bar',
      name: 'Bar pull',
      form: 'bar',
      centres: inches(5),
      projection: inches(1.25),
      colour: '#333333',
      price: cents(780),
    },
  ],
  storage: [],
  drawerBoxes: [
    {
      id: 'keep',
      name: 'Keep the drawer boxes',
      material: 'none',
      thickness: inches(0),
      slide: '',
      price: cents(0),
    },
  ],
  slides: [],
  ends: [{ id: 'flat', name: 'Flat end panel', kind: 'flat', price: cents(900) }],
  counters: [
    {
      id: 'keep',
      name: 'Keep the counter',
      kind: 'keep',
      overhang: inches(1),
      thickness: inches(1.5),
      pricePerSquareFoot: cents(0),
      pricePerEdgeFoot: cents(0),
      pricePerCutOut: cents(0),
      allowance: cents(0),
    },
  ],
  labour: [
    {
      code: 'hang',
      label: 'Hanging fronts',
      per: 'front',
      unit: 'each',
      class: 'labour',
      hours: 50,
      price: cents(2500),
    },
  ],
  zonedKeys: ['style', 'species', 'finish', 'pull'],
  shop: {
    bumper: inches(0.125),
    crownClearance: inches(0.125),
    nailerLap: inches(0),
    veneerTrim: inches(0.125),
    baseClearance: inches(0.25),
    valanceClearance: inches(0.25),
    slideRearAllowance: inches(0.5),
    boxHeightClearance: inches(1),
    panelThickness: inches(0.25),
    kerf: inches(0.125),
    stockLengths: [inches(96)],
    sheet: { width: inches(48), height: inches(96) },
    adhesiveCoverage: 308,
    crewHoursPerDay: 14,
  },
  hiddenDamage: [],
  restocking: [{ part: 'front', price: cents(3000) }],
  leadTimeDays: 15,
});

export const costs = (number: number): EditionCosts => ({
  version: 1,
  number,
  costShare: { default: 550_000 },
});

export const CHOICES: Choices = {
  version: 1,
  kitchen: {
    style: 'frame',
    species: 'maple',
    finish: 'clear',
    overlay: 'half',
    pull: 'bar',
    crown: 'none',
    base: 'none',
    lightRail: 'none',
    ends: 'flat',
    drawerBox: 'keep',
    counter: 'keep',
  },
  zones: {},
  inside: {},
};
