import { z } from 'zod';
import type { Edition, EditionCosts } from '@/lib/engine/edition-types';
import { CHOICE_KEYS } from '@/lib/engine/types';
import { faultsOf } from './faults';
import { centsShape, dateShape, lengthShape, positiveShape, readLengths, sizeShape } from './lengths';

const id = z
  .string()
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'An id is small letters, figures and hyphens.')
  .max(60);
const count = z.number().int().min(0);
const price = centsShape;
const colour = z.string().regex(/^#[0-9a-f]{6}$/i, 'Write a colour as #rrggbb.');
const section = z.array(z.strictObject({ x: lengthShape, y: lengthShape })).max(60);
const option = {
  id,
  name: z.string().min(1).max(80),
  about: z.string().max(300).optional(),
  leadTimeDays: count.optional(),
  specialOrder: z.boolean().optional(),
};
const families = z.enum(['clear', 'stain', 'paint', 'thermofoil']);
const unit = z.enum(['each', 'squareFoot', 'foot', 'sheet', 'hour', 'lump']);
const slideId = z.string().max(60);

const moulding = z.strictObject({
  ...option,
  kind: z.enum(['crown', 'base', 'lightRail']),
  section,
  face: positiveShape,
  spring: z.number().int().min(0).max(90_000),
  height: positiveShape,
  projection: sizeShape,
  price,
  finishes: z.array(families).optional(),
});

const body = z.strictObject({
  version: z.literal(1, { error: 'This version of an edition is not known here.' }),
  number: z.number().int().min(1),
  title: z.string().min(1).max(120),
  publishedOn: dateShape,
  styles: z
    .array(
      z.strictObject({
        ...option,
        construction: z.enum(['fivePiece', 'slab', 'plank']),
        panel: z.enum(['flat', 'raised', 'beaded', 'none']),
        stile: positiveShape,
        rail: positiveShape,
        drawerRail: positiveShape,
        thickness: positiveShape,
        panelThickness: sizeShape,
        groove: sizeShape,
        solidPanel: z.boolean().optional(),
        panelPlay: sizeShape.optional(),
        innerEdge: section,
        outerEdge: section,
        panelProfile: section,
        plankWidth: positiveShape.optional(),
        smallestPanel: sizeShape,
        smallestDrawerHeight: sizeShape,
        smallestHeight: sizeShape,
        widestLeaf: positiveShape,
        smallestRowGap: sizeShape,
        minimumArea: count,
        price,
        slabPrice: price,
        glassPrice: price.optional(),
        overlays: z.array(id).optional(),
        species: z.array(id).optional(),
      }),
    )
    .min(1),
  species: z
    .array(
      z.strictObject({
        ...option,
        family: z.enum(['hardwood', 'paintGrade', 'thermofoil']),
        radial: count,
        tangential: count,
        janka: count,
        density: count,
        colour,
        grain: z.enum(['fine', 'medium', 'coarse', 'none']),
        frontPrice: price,
        veneerPrice: price,
        mouldingPrice: price,
        panelPrice: price,
        finishes: z.array(families).min(1),
      }),
    )
    .min(1),
  finishes: z
    .array(
      z.strictObject({
        ...option,
        family: families,
        colour: colour.optional(),
        colours: z.record(id, colour).optional(),
        price,
        mouldingPrice: price,
      }),
    )
    .min(1),
  overlays: z
    .array(z.strictObject({ ...option, amount: sizeShape, gap: sizeShape, hingeSet: id, setback: sizeShape }))
    .min(1),
  hingeSets: z
    .array(
      z.strictObject({
        ...option,
        overlay: sizeShape,
        softClose: z.boolean(),
        openingAngle: z.number().min(60).max(180),
        intrusion: sizeShape,
        smallestReveal: sizeShape,
        byHeight: z.array(z.strictObject({ upTo: positiveShape, hinges: z.number().int().min(1) })).min(1),
        byWeight: z
          .array(z.strictObject({ upTo: z.number().int().min(1), hinges: z.number().int().min(1) }))
          .min(1),
        extraAboveWidth: z.strictObject({ width: positiveShape, hinges: count }).optional(),
        price,
        fold: z.strictObject({ name: z.string(), hinges: count, price }).optional(),
      }),
    )
    .min(1),
  crowns: z.array(moulding),
  bases: z.array(moulding),
  lightRails: z.array(moulding),
  pulls: z
    .array(
      z.strictObject({
        ...option,
        form: z.enum(['knob', 'bar', 'cup', 'arch', 'none']),
        centres: sizeShape,
        projection: sizeShape,
        colour,
        price,
      }),
    )
    .min(1),
  storage: z.array(
    z.strictObject({
      ...option,
      kind: z.enum(['pullOut', 'trayDivider', 'bin', 'none']),
      openings: z.array(z.enum(['door', 'pair', 'drawer'])),
      smallestWidth: sizeShape,
      smallestDepth: sizeShape,
      perOpening: count,
      slide: slideId.optional(),
      price,
    }),
  ),
  drawerBoxes: z
    .array(
      z.strictObject({
        ...option,
        material: z.enum(['melamine', 'birch', 'none']),
        thickness: sizeShape,
        slide: slideId,
        price,
      }),
    )
    .min(1),
  slides: z.array(
    z.strictObject({
      id,
      name: z.string().min(1).max(80),
      space: sizeShape,
      ratedPounds: count,
      softClose: z.boolean(),
      price,
    }),
  ),
  ends: z
    .array(
      z.strictObject({
        ...option,
        kind: z.enum(['flat', 'panelled']),
        price,
        bonded: z.boolean().optional(),
        stile: positiveShape.optional(),
        rail: positiveShape.optional(),
        widestPanel: positiveShape.optional(),
      }),
    )
    .min(1),
  counters: z
    .array(
      z.strictObject({
        ...option,
        kind: z.enum(['keep', 'allowance', 'priced']),
        overhang: sizeShape,
        thickness: positiveShape,
        pricePerSquareFoot: price,
        pricePerEdgeFoot: price,
        pricePerCutOut: price,
        pricePerSplashFoot: price.optional(),
        allowance: price,
      }),
    )
    .min(1),
  labour: z.array(
    z.strictObject({
      code: id,
      label: z.string().min(1).max(80),
      per: z.enum([
        'front',
        'hinge',
        'veneerArea',
        'mouldingFoot',
        'nailerFoot',
        'fillerStrip',
        'panel',
        'toeFoot',
        'box',
        'removal',
        'newCabinet',
        'job',
      ]),
      unit,
      class: z.enum(['material', 'labour', 'other']),
      hours: count,
      price,
    }),
  ),
  newCabinets: z.array(
    z.strictObject({ tier: z.enum(['base', 'wall', 'tall']), each: price, foot: price, hours: count }),
  ),
  zonedKeys: z.array(z.enum(CHOICE_KEYS)),
  shop: z.strictObject({
    bumper: sizeShape,
    crownClearance: sizeShape,
    nailerLap: sizeShape,
    veneerTrim: sizeShape,
    baseClearance: sizeShape,
    valanceClearance: sizeShape,
    slideRearAllowance: sizeShape,
    boxHeightClearance: sizeShape,
    panelThickness: positiveShape,
    kerf: sizeShape,
    stockLengths: z.array(positiveShape).min(1),
    sheet: z.strictObject({ width: positiveShape, height: positiveShape }),
    adhesiveCoverage: z.number().int().min(1),
    crewHoursPerDay: z.number().int().min(1).max(24),
    boxBack: sizeShape,
    boxThickness: positiveShape,
    pullOutHeight: positiveShape,
    loadPerCubicFoot: count,
    moisture: z.strictObject({ from: z.number().min(0).max(30), to: z.number().min(0).max(30) }),
    endAllowance: sizeShape,
  }),
  hiddenDamage: z.array(z.strictObject({ code: id, label: z.string(), unit, price })),
  restocking: z.array(z.strictObject({ part: z.enum(['front', 'moulding', 'box', 'panel']), price })),
  leadTimeDays: count,
});

interface PathFault {
  readonly path: (string | number)[];
  readonly message: string;
}

/** Ids that stand twice or point to nothing, and colours that a choice would not find. */
function crossFaults(edition: Edition): PathFault[] {
  const faults: PathFault[] = [];
  const tell = (message: string, ...path: (string | number)[]) => faults.push({ path, message });
  const lists = {
    styles: edition.styles,
    species: edition.species,
    finishes: edition.finishes,
    overlays: edition.overlays,
    hingeSets: edition.hingeSets,
    crowns: edition.crowns,
    bases: edition.bases,
    lightRails: edition.lightRails,
    pulls: edition.pulls,
    storage: edition.storage,
    drawerBoxes: edition.drawerBoxes,
    slides: edition.slides,
    ends: edition.ends,
    counters: edition.counters,
  };
  const known = (name: keyof typeof lists) => new Set<string>(lists[name].map((one) => one.id));
  for (const [name, options] of Object.entries(lists)) {
    const seen = new Set<string>();
    options.forEach((one, index) => {
      if (seen.has(one.id)) tell(`${one.id} stands here twice.`, name, index, 'id');
      seen.add(one.id);
    });
  }
  const species = known('species');
  const overlays = known('overlays');
  const slides = known('slides');
  edition.styles.forEach((style, index) => {
    for (const one of style.species ?? [])
      if (!species.has(one)) tell(`There is no species ${one}.`, 'styles', index, 'species');
    for (const one of style.overlays ?? [])
      if (!overlays.has(one)) tell(`There is no overlay ${one}.`, 'styles', index, 'overlays');
  });
  edition.overlays.forEach((overlay, index) => {
    const set = edition.hingeSets.find((one) => one.id === overlay.hingeSet);
    if (!set) tell(`There is no hinge set ${overlay.hingeSet}.`, 'overlays', index, 'hingeSet');
    else if (set.overlay !== overlay.amount)
      tell('The hinge set is made for another overlay.', 'overlays', index, 'hingeSet');
  });
  edition.hingeSets.forEach((set, index) => {
    for (const name of ['byHeight', 'byWeight'] as const) {
      const rows = set[name];
      if (rows.some((row, at) => at > 0 && row.upTo <= (rows[at - 1]?.upTo ?? 0)))
        tell('The rows of a chart rise.', 'hingeSets', index, name);
    }
  });
  edition.finishes.forEach((finish, index) => {
    if (finish.family === 'paint' && !finish.colour)
      tell('A paint has a colour.', 'finishes', index, 'colour');
    if (finish.family === 'stain' && !finish.colours)
      tell('A stain has its colour on each species.', 'finishes', index, 'colours');
    for (const one of Object.keys(finish.colours ?? {}))
      if (!species.has(one)) tell(`There is no species ${one}.`, 'finishes', index, 'colours', one);
  });
  edition.drawerBoxes.forEach((box, index) => {
    if (box.material !== 'none' && !slides.has(box.slide))
      tell(`There is no slide ${box.slide}.`, 'drawerBoxes', index, 'slide');
  });
  edition.storage.forEach((one, index) => {
    if (one.slide !== undefined && !slides.has(one.slide))
      tell(`There is no slide ${one.slide}.`, 'storage', index, 'slide');
  });
  const codes = new Set<string>();
  edition.labour.forEach((rate, index) => {
    if (codes.has(rate.code)) tell(`${rate.code} stands here twice.`, 'labour', index, 'code');
    codes.add(rate.code);
  });
  return faults;
}

/** An edition of a price book from outside, without costs. Lengths may be typed text (D2). */
export const editionShape: z.ZodType<Edition> = z.unknown().transform((json, context): Edition => {
  const parsed = body.safeParse(readLengths(json, {}));
  const faults = parsed.success
    ? crossFaults(parsed.data)
    : parsed.error.issues.map(({ path, message }) => ({ path, message }));
  for (const { path, message } of faults) context.addIssue({ code: 'custom', path: [...path], message });
  return parsed.success && faults.length === 0 ? parsed.data : z.NEVER;
});

/** What an edition costs the contractor: shares of the price in parts per million. */
export const editionCostsShape: z.ZodType<EditionCosts> = z.strictObject({
  version: z.literal(1),
  number: z.number().int().min(1),
  costShare: z.record(z.string(), z.number().int().min(0).max(1_000_000)),
});

export type ParsedEdition =
  | { readonly ok: true; readonly value: Edition }
  | { readonly ok: false; readonly faults: readonly { readonly path: string; readonly message: string }[] };

/** Reads an edition; every fault by path. Never throws. */
export function parseEdition(json: unknown): ParsedEdition {
  const parsed = editionShape.safeParse(json);
  return parsed.success ? { ok: true, value: parsed.data } : { ok: false, faults: faultsOf(parsed.error) };
}
