import { formatLength, sixtyfourths } from './length';
import { formatCents } from './money';
import { STEPS, type LineDraft } from './price';
import type { Quantities } from './quantities';
import type { Edition } from './edition-types';
import type { PriceLine, Unit, Zone, ZoneOrKitchen } from './types';

export const ZONE_NAMES: Readonly<Record<ZoneOrKitchen, string>> = {
  kitchen: 'the kitchen',
  wall: 'the wall cabinets',
  base: 'the base cabinets',
  island: 'the island or peninsula',
  tall: 'the tall cabinets',
};

/** `1 door`, `2 doors`. */
export const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

/** A list in a sentence: `a, b and c`. */
export const list = (items: readonly string[]): string =>
  items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items[items.length - 1] ?? ''}`;

/** Marks in a sentence, at most `most` of them. */
export const marks = (all: readonly string[], most = 6): string =>
  all.length <= most ? list(all) : `${all.slice(0, most).join(', ')} and ${all.length - most} more`;

export const inch = (length: number): string => `${formatLength(sixtyfourths(Math.round(length)))} in`;

const UNIT_NAMES: Readonly<Record<Unit, string>> = {
  each: '',
  squareFoot: 'ft²',
  foot: 'ft',
  sheet: 'sheets',
  hour: 'h',
  lump: '',
};

/** A line's quantity as it is printed: `74.31 ft²`, `12 ft 3 1/2 in`, `21`. */
export function quantityText(unit: Unit, quantity: number): string {
  if (unit === 'each' || unit === 'sheet') return String(quantity);
  if (unit === 'lump') return '1';
  if (unit === 'foot') {
    const feet = Math.floor(quantity / 768);
    const rest = quantity - feet * 768;
    const inches = `${sixtyFourths(rest)} in`;
    return feet === 0 ? inches : rest === 0 ? `${feet} ft` : `${feet} ft ${inches}`;
  }
  const steps = STEPS[unit];
  return `${(quantity / steps).toFixed(2)} ${UNIT_NAMES[unit]}`;
}

/** Inches with a fraction of 64ths, not rounded: what is multiplied is what is printed. */
function sixtyFourths(length: number): string {
  const whole = Math.floor(length / 64);
  let above = length - whole * 64;
  if (above === 0) return String(whole);
  let below = 64;
  while (above % 2 === 0) {
    above /= 2;
    below /= 2;
  }
  return whole === 0 ? `${above}/${below}` : `${whole} ${above}/${below}`;
}

type Words = { readonly label: string; readonly parts: readonly string[]; readonly because: string };

/** A price line with its words: what it is, of which parts, and why it is so much (M2). */
export function wordedLine(draft: LineDraft, q: Quantities, edition: Edition): PriceLine {
  const { label, parts, because } = wordsOf(draft, q, edition);
  const { code, zone, unit, quantity, unitPrice, amount } = draft;
  return {
    code,
    label,
    zone,
    class: draft.class,
    unit,
    quantity,
    quantityText: quantityText(unit, quantity),
    unitPrice,
    amount,
    parts,
    because,
    option: draft.option,
  };
}

function wordsOf(draft: LineDraft, q: Quantities, edition: Edition): Words {
  const { item, zone } = draft;
  const per = `at ${formatCents(draft.unitPrice)}`;
  const each = (text: string) => `${text}, ${per} each.`;
  const job = edition.labour.find((rate) => item === `labour-${rate.code}`);
  if (zone === 'kitchen') {
    if (job) return { label: job.label, parts: [], because: 'Once for the whole job.' };
    const counter = edition.counters.find((one) => one.id === draft.option);
    return {
      label: `${counter?.name ?? 'Counter'}`,
      parts: q.counters.map((piece) => piece.mark),
      because: 'A sum set aside; it is settled when the counter is chosen and templated.',
    };
  }
  const made = q.made[zone];
  const { style, species, finish } = made;
  const look = `${species.name.toLowerCase()}, ${lower(finish.name)}`;
  const measures = q.measures.filter((one) => one.face.cabinet.zone === zone);
  const openings = measures.flatMap((one) => one.openings);
  const fronts = openings.flatMap((one) => one.fronts);
  const area = quantityText('squareFoot', draft.quantity);

  if (item === 'fronts' || item === 'slabs') {
    const wanted = item === 'fronts' ? 'fivePiece' : 'slab';
    const here = fronts.filter((front) => front.build === wanted);
    const doors = here.filter((front) => front.kind === 'door').length;
    const others = here.length - doors;
    const things = list(
      [doors > 0 ? count(doors, 'door') : '', others > 0 ? count(others, 'drawer front') : ''].filter(
        (text) => text !== '',
      ),
    );
    const flat = here.some((front) => front.madeFlat);
    const what = flat ? `Flat fronts beside ${lower(style.name)}` : style.name;
    const minimum = here.some((front) => front.area === style.minimumArea * 147_456);
    return {
      label: `${what} in ${look}`,
      parts: here.map((front) => front.mark),
      because: `${things}, ${area} ${per} a square foot${minimum ? `; each counts at least ${(style.minimumArea / 100).toFixed(2)} ft²` : ''}.`,
    };
  }
  if (item === 'glass')
    return {
      label: 'Fronts made ready for glass',
      parts: fronts.filter((front) => front.glass).map((front) => front.mark),
      because: each(`${count(draft.quantity, 'front')} without a panel, finished inside`),
    };
  if (item === 'hinges')
    return {
      label: made.hingeSet.name,
      parts: fronts.filter((front) => front.hinges > front.joint).map((front) => front.mark),
      because: each(`${count(draft.quantity, 'hinge')} by the supplier’s chart of height and weight`),
    };
  if (item === 'joints')
    return {
      label: made.hingeSet.fold?.name ?? 'Joint hinges',
      parts: fronts.filter((front) => front.joint > 0).map((front) => front.mark),
      because: each(`${count(draft.quantity, 'hinge')} where corner doors fold`),
    };
  if (item === 'pulls')
    return {
      label: made.pull.name,
      parts: fronts.filter((front) => front.kind !== 'falseFront').map((front) => front.mark),
      because: each(`${draft.quantity}, one for every front that opens`),
    };
  if (item === 'veneer') {
    const refaced = measures.filter((one) => one.covered > 0).map((one) => one.face.cabinet.id);
    return {
      label: `Veneer on the frames, ${look}`,
      parts: [...new Set(refaced)],
      because: `${area} of stiles, rails and mullions covered, ${per} a square foot.`,
    };
  }
  if (item === 'crown' || item === 'base' || item === 'lightRail') {
    const pieces = q.mouldings[item].pieces.filter((piece) => piece.zone === zone && piece.kind === item);
    const ends = pieces.filter((piece) => piece.isReturn).length;
    const profile = made[item];
    return {
      label: `${profile?.name ?? 'Moulding'}, ${look}`,
      parts: pieces.map((piece) => piece.mark),
      because: `${count(pieces.length, 'piece')}${ends > 0 ? `, ${count(ends, 'return')} among them` : ''}, ${quantityText('foot', draft.quantity)} along the longer edges, ${per} a foot.`,
    };
  }
  if (item === 'ends') {
    const panels = q.panels.filter((panel) => panel.zone === zone && panel.kind !== 'toe');
    return {
      label: `${made.ends.name}, ${look}`,
      parts: panels.map((panel) => panel.mark),
      because: `${count(panels.length, 'panel')}, ${area} ${per} a square foot.`,
    };
  }
  if (item === 'toes') {
    const panels = q.panels.filter((panel) => panel.zone === zone && panel.kind === 'toe');
    return {
      label: `Toe skins, ${look}`,
      parts: panels.map((panel) => panel.mark),
      because: `${count(panels.length, 'skin')}, ${area} ${per} a square foot.`,
    };
  }
  if (item === 'boxes' || item === 'slides') {
    const boxes = q.boxes.boxes.filter((box) => box.zone === zone && box.kind === 'drawerBox');
    const slide = edition.slides.find((one) => one.id === made.drawerBox.slide);
    return {
      label: item === 'boxes' ? made.drawerBox.name : (slide?.name ?? 'Slides'),
      parts: boxes.map((box) => box.mark),
      because: each(item === 'boxes' ? count(boxes.length, 'drawer') : count(boxes.length, 'pair')),
    };
  }
  if (item.startsWith('storage-')) {
    const option = edition.storage.find((one) => item === `storage-${one.id}`);
    const here = q.boxes.storage.filter(
      (one) => one.option === option?.id && one.measure.face.cabinet.zone === zone,
    );
    return {
      label: option?.name ?? 'Storage',
      parts: here.map((one) => one.opening.mark),
      because: each(`In ${count(here.length, 'opening')}`),
    };
  }
  if (item.startsWith('new-'))
    return {
      label: item.endsWith('-width') ? 'New cabinets by their width' : 'New cabinets',
      parts: measures
        .filter((one) => one.face.cabinet.action === 'replace' || one.face.cabinet.action === 'add')
        .map((one) => one.face.cabinet.id),
      because: item.endsWith('-width')
        ? `${quantityText('foot', draft.quantity)} of width, ${per} a foot.`
        : each(count(draft.quantity, 'new cabinet')),
    };
  if (item.startsWith('damaged-')) {
    const floor = item === 'damaged-floor';
    const condition = floor ? 'damagedFloor' : 'damagedFrame';
    return {
      label: edition.hiddenDamage.find((one) => one.code === draft.option)?.label ?? 'Repair',
      parts: measures
        .filter((one) => one.face.cabinet.condition === condition)
        .map((one) => one.face.cabinet.id),
      because: floor
        ? each(`${count(draft.quantity, 'floor')} found damaged at the survey`)
        : `${quantityText('foot', draft.quantity)} of frame found damaged at the survey, ${per} a foot.`,
    };
  }
  if (item.startsWith('counter')) {
    const pieces = q.counters.filter((piece) => piece.zone === zone);
    const { counter } = made;
    const what =
      item === 'counter'
        ? `${area} ${per} a square foot`
        : item === 'counter-cut-outs'
          ? `${count(draft.quantity, 'cut-out')}, ${per} each`
          : `${quantityText('foot', draft.quantity)} ${per} a foot`;
    const name =
      item === 'counter'
        ? counter.name
        : item === 'counter-edge'
          ? 'Counter edges'
          : item === 'counter-splash'
            ? 'Splash at the wall'
            : 'Cut-outs in the counter';
    return { label: name, parts: pieces.map((piece) => piece.mark), because: `${capital(what)}.` };
  }
  const unit = {
    each: 'each',
    squareFoot: 'a square foot',
    foot: 'a foot',
    sheet: 'a sheet',
    hour: 'an hour',
    lump: '',
  };
  return {
    label: job?.label ?? item,
    parts: labourParts(draft, q, edition, zone),
    because: `${quantityText(draft.unit, draft.quantity)}, ${per} ${unit[draft.unit]}.`,
  };
}

function labourParts(draft: LineDraft, q: Quantities, edition: Edition, zone: Zone): readonly string[] {
  const rate = edition.labour.find((one) => draft.item === `labour-${one.code}`);
  const measures = q.measures.filter((one) => one.face.cabinet.zone === zone);
  const openings = measures.flatMap((one) => one.openings);
  const pieces = (['crown', 'base', 'lightRail'] as const)
    .flatMap((kind) => q.mouldings[kind].pieces)
    .filter((piece) => piece.zone === zone);
  switch (rate?.per) {
    case 'front':
      return openings.flatMap((one) => one.fronts.map((front) => front.mark));
    case 'hinge':
      return openings.flatMap((one) =>
        one.fronts.filter((front) => front.hinges > 0).map((front) => front.mark),
      );
    case 'veneerArea':
      return [...new Set(measures.filter((one) => one.covered > 0).map((one) => one.face.cabinet.id))];
    case 'mouldingFoot':
      return pieces.filter((piece) => piece.kind !== 'nailer').map((piece) => piece.mark);
    case 'nailerFoot':
      return pieces.filter((piece) => piece.kind === 'nailer').map((piece) => piece.mark);
    case 'fillerStrip':
      return openings.filter((one) => one.crownFiller > 0 || one.baseFiller > 0).map((one) => one.mark);
    case 'panel':
    case 'toeFoot':
      return q.panels
        .filter((panel) => panel.zone === zone && (panel.kind === 'toe') === (rate.per === 'toeFoot'))
        .map((panel) => panel.mark);
    case 'box':
      return q.boxes.boxes.filter((box) => box.zone === zone).map((box) => box.mark);
    default:
      return [];
  }
}

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
export const lower = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);
