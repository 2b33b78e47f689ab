import type { Edition, LabourRate, Terms } from './edition-types';
import { cents, lineAmount } from './money';
import { hundredths } from './openings';
import { panelArea } from './panels';
import type { Quantities } from './quantities';
import { discountOn, netAmounts, taxOn } from './tax';
import {
  ZONES,
  type Cents,
  type LineClass,
  type Survey,
  type Unit,
  type Zone,
  type ZoneOrKitchen,
} from './types';

/** A price line without words. `quantity` in the unit's least step (M1). */
export interface LineDraft {
  /** What it is for, such as `fronts`; with its zone, `fronts.wall`, it is unique. */
  readonly item: string;
  readonly code: string;
  readonly zone: ZoneOrKitchen;
  readonly class: LineClass;
  readonly unit: Unit;
  readonly quantity: number;
  readonly unitPrice: Cents;
  readonly amount: Cents;
  /** Hundredths of an hour of work that it stands for (T1). */
  readonly hours: number;
  /** The option it pays for, by which its cost is looked up (M8). */
  readonly option: string;
}

/** Least steps to one unit (M1). */
export const STEPS: Readonly<Record<Unit, number>> = {
  each: 1,
  squareFoot: 100,
  foot: 768,
  sheet: 1,
  hour: 100,
  lump: 1,
};

/** Square 64ths in hundredths of a square foot, half up. */
const squareFeet = (area: number): number => hundredths(area * 25);

const MOULDING_PRICES = { crown: 'crown', base: 'base', lightRail: 'lightRail' } as const;

/** Every price line with a quantity, in the order in which they are read (M1, M2). */
export function lineDrafts(q: Quantities, survey: Survey, edition: Edition): LineDraft[] {
  const drafts: LineDraft[] = [];
  const add = (
    item: string,
    zone: ZoneOrKitchen,
    kind: LineClass,
    unit: Unit,
    quantity: number,
    unitPrice: number,
    option: string,
    hours = 0,
  ): void => {
    if (quantity === 0 || unitPrice === 0) return;
    const price = cents(unitPrice);
    drafts.push({
      item,
      code: `${item}.${zone}`,
      zone,
      class: kind,
      unit,
      quantity,
      unitPrice: price,
      amount: lineAmount(quantity, STEPS[unit], price),
      hours,
      option,
    });
  };

  for (const zone of ZONES) {
    const made = q.made[zone];
    const sum = q.sums[zone];
    const { style, species, finish } = made;
    const material = (item: string, unit: Unit, quantity: number, price: number, option: string) =>
      add(item, zone, 'material', unit, quantity, price, option);

    material(
      'fronts',
      'squareFoot',
      hundredths(sum.fiveArea),
      style.price + species.frontPrice + finish.price,
      style.id,
    );
    material(
      'slabs',
      'squareFoot',
      hundredths(sum.slabArea),
      style.slabPrice + species.frontPrice + finish.price,
      style.id,
    );
    material('glass', 'each', sum.glass, style.glassPrice ?? 0, style.id);
    material('hinges', 'each', sum.hinges, made.hingeSet.price, made.hingeSet.id);
    material('joints', 'each', sum.joints, made.hingeSet.fold?.price ?? 0, made.hingeSet.id);
    material('pulls', 'each', made.pull.form === 'none' ? 0 : sum.pulls, made.pull.price, made.pull.id);

    const veneer = squareFeet(sum.covered);
    material('veneer', 'squareFoot', veneer, species.veneerPrice + finish.price, species.id);

    let moulding = 0;
    for (const kind of ['crown', 'base', 'lightRail'] as const) {
      const profile = made[MOULDING_PRICES[kind]];
      const length = q.mouldings[kind].length[zone];
      if (!profile || length === 0) continue;
      moulding += length;
      const price = profile.price + species.mouldingPrice + finish.mouldingPrice;
      material(kind, 'foot', length, price, profile.id);
    }
    const nailer = q.mouldings.crown.nailer[zone];

    const ends = squareFeet(panelArea(q.panels, zone, false));
    material('ends', 'squareFoot', ends, made.ends.price + species.panelPrice + finish.price, made.ends.id);
    const toes = squareFeet(panelArea(q.panels, zone, true));
    material('toes', 'squareFoot', toes, species.panelPrice + finish.price, species.id);

    let boxCount = 0;
    let fitted = 0;
    for (const box of q.boxes.boxes) {
      if (box.zone !== zone) continue;
      fitted += 1;
      if (box.kind === 'drawerBox') boxCount += 1;
    }
    if (boxCount > 0) {
      const slide = edition.slides.find((one) => one.id === made.drawerBox.slide);
      material('boxes', 'each', boxCount, made.drawerBox.price, made.drawerBox.id);
      material('slides', 'each', boxCount, slide?.price ?? 0, made.drawerBox.slide);
    }
    for (const option of edition.storage) {
      const count = q.boxes.storage.filter(
        (one) => one.option === option.id && one.measure.face.cabinet.zone === zone,
      ).length;
      material(`storage-${option.id}`, 'each', count, option.price, option.id);
      if (option.kind !== 'pullOut' && count > 0) fitted += count;
    }

    const added = survey.cabinets.filter(
      (cabinet) => cabinet.zone === zone && (cabinet.action === 'replace' || cabinet.action === 'add'),
    );
    const newHours = { each: 0 };
    for (const price of edition.newCabinets) {
      const here = added.filter((cabinet) => cabinet.tier === price.tier);
      const width = here.reduce(
        (all, cabinet) => all + (cabinet.corner ? cabinet.corner.legA + cabinet.corner.legB : cabinet.width),
        0,
      );
      material(`new-${price.tier}`, 'each', here.length, price.each, `new-${price.tier}`);
      material(`new-${price.tier}-width`, 'foot', width, price.foot, `new-${price.tier}`);
      newHours.each += here.length * price.hours;
    }
    const removed = survey.cabinets.filter(
      (cabinet) => cabinet.zone === zone && (cabinet.action === 'remove' || cabinet.action === 'replace'),
    ).length;

    const floor = edition.hiddenDamage.find((one) => one.unit === 'each');
    const frame = edition.hiddenDamage.find((one) => one.unit === 'foot');
    const refaced = survey.cabinets.filter((cabinet) => cabinet.zone === zone && cabinet.action === 'reface');
    if (floor) {
      const count = refaced.filter((cabinet) => cabinet.condition === 'damagedFloor').length;
      add('damaged-floor', zone, 'other', 'each', count, floor.price, floor.code);
    }
    if (frame) {
      const length = refaced
        .filter((cabinet) => cabinet.condition === 'damagedFrame')
        .reduce((all, cabinet) => all + 2 * (cabinet.width + cabinet.height), 0);
      add('damaged-frame', zone, 'other', 'foot', length, frame.price, frame.code);
    }

    const { counter } = made;
    if (counter.kind === 'priced') {
      const here = q.counters.filter((piece) => piece.zone === zone);
      const of = (pick: (piece: (typeof here)[number]) => number) =>
        here.reduce((all, piece) => all + pick(piece), 0);
      const area = squareFeet(of((piece) => piece.length * piece.depth));
      material('counter', 'squareFoot', area, counter.pricePerSquareFoot, counter.id);
      material(
        'counter-edge',
        'foot',
        of((piece) => piece.edge),
        counter.pricePerEdgeFoot,
        counter.id,
      );
      material(
        'counter-splash',
        'foot',
        of((piece) => piece.splash),
        counter.pricePerSplashFoot ?? 0,
        counter.id,
      );
      material(
        'counter-cut-outs',
        'each',
        of((piece) => piece.cutOuts),
        counter.pricePerCutOut,
        counter.id,
      );
    }

    const panels = q.panels.filter((panel) => panel.zone === zone && panel.kind !== 'toe');
    const toeLength = q.panels.reduce(
      (all, panel) => (panel.zone === zone && panel.kind === 'toe' ? all + panel.width : all),
      0,
    );
    const counts: Readonly<Record<LabourRate['per'], number>> = {
      front: sum.fronts,
      hinge: sum.hinges + sum.joints,
      veneerArea: veneer,
      mouldingFoot: moulding,
      nailerFoot: nailer,
      fillerStrip: sum.fillerStrips,
      panel: panels.length,
      toeFoot: toeLength,
      box: fitted,
      removal: removed,
      newCabinet: added.length,
      job: 0,
    };
    for (const rate of edition.labour) {
      const quantity = counts[rate.per];
      const hours = Math.round((quantity * rate.hours) / STEPS[rate.unit]);
      const more = rate.per === 'newCabinet' ? newHours.each : 0;
      add(`labour-${rate.code}`, zone, rate.class, rate.unit, quantity, rate.price, rate.code, hours + more);
    }
  }

  // An allowance is one sum for the kitchen, whichever zones have that counter.
  const allowances = new Set(
    ZONES.filter((zone) => q.counters.some((piece) => piece.zone === zone)).map(
      (zone) => q.made[zone].counter,
    ),
  );
  for (const counter of allowances) {
    if (counter.kind === 'allowance')
      add(`counter-${counter.id}`, 'kitchen', 'other', 'lump', 1, counter.allowance, counter.id);
  }
  if (q.faces.some((face) => face.renewed)) {
    for (const rate of edition.labour) {
      if (rate.per === 'job')
        add(`labour-${rate.code}`, 'kitchen', rate.class, rate.unit, 1, rate.price, rate.code, rate.hours);
    }
  }
  return drafts;
}

export interface Sum {
  readonly subtotal: Cents;
  readonly discount: Cents;
  readonly tax: Cents;
  readonly total: Cents;
}

/** Total = Σ lines − discount + tax (M2, M3). */
export function sumOf(lines: readonly LineDraft[], terms: Terms): Sum {
  const subtotal = cents(lines.reduce((sum, line) => sum + line.amount, 0));
  const discount = discountOn(subtotal, terms.discount);
  const taxed = terms.tax.mode === 'onLines' && terms.tax.exemption === undefined;
  let tax = cents(0);
  if (taxed) {
    const net = netAmounts(
      lines.map((line) => line.amount),
      discount,
    );
    tax = taxOn(
      lines.map((line, index) => ({
        class: line.class,
        net: net[index] ?? line.amount,
        units: line.unit === 'each' ? line.quantity : 1,
      })),
      terms,
    );
  }
  return { subtotal, discount, tax, total: cents(subtotal - discount + tax) };
}

/** One zone's part of the lines, for reading. */
export const amountIn = (lines: readonly LineDraft[], zone: Zone | 'kitchen'): Cents =>
  cents(lines.reduce((sum, line) => (line.zone === zone ? sum + line.amount : sum), 0));
