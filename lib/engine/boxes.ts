import { find } from './choices';
import type { Edition, Slide } from './edition-types';
import { roundDown, sixtyfourths } from './length';
import type { MadeByZone } from './made';
import type { FaceMeasure, OpeningMeasure } from './openings';
import type { BoxPart, Choices, DrawerBox } from './types';

/** Width of a drawer box: the opening at its narrowest less the slides on both sides, down to 1/16 (B1). */
export const boxWidth = (opening: number, slideSpace: number): number =>
  roundDown(opening - 2 * slideSpace, 16);

/**
 * Length of slide in 64ths: the longest even number of inches from 12 to 28 that fits from the back of the face frame
 * to the back panel, less the rear allowance (B2). `null` when not even 12 fits.
 */
export function slideLength(
  depth: number,
  frameThickness: number,
  back: number,
  rearAllowance: number,
): number | null {
  const even = Math.floor((depth - frameThickness - back - rearAllowance) / 128) * 2;
  return even < 12 ? null : Math.min(28, even) * 64;
}

/** Cut pieces of a butt-jointed box and the edge band of its four top edges (B4). All in 64ths. */
export function boxParts(
  width: number,
  height: number,
  length: number,
  thickness: number,
): { readonly parts: readonly BoxPart[]; readonly edgeBand: number } {
  const inside = Math.max(0, width - 2 * thickness);
  const part = (name: BoxPart['name'], count: number, w: number, l: number): BoxPart => ({
    name,
    count,
    width: sixtyfourths(w),
    length: sixtyfourths(l),
  });
  return {
    parts: [
      part('side', 2, height, length),
      part('front', 1, height, inside),
      part('back', 1, height, inside),
      part('bottom', 1, inside, Math.max(0, length - 2 * thickness)),
    ],
    edgeBand: 2 * length + 2 * inside,
  };
}

export interface BoxFault {
  readonly code: 'box.noDepth' | 'pullOut.none' | 'pullOut.wrongOpening' | 'slide.load';
  readonly mark: string;
  readonly opening: OpeningMeasure;
  readonly measure: FaceMeasure;
  /** Pounds that it may come to hold and that the slide carries. */
  readonly load?: number;
  readonly rated?: number;
}

export interface BoxesMeasure {
  readonly boxes: readonly DrawerBox[];
  readonly faults: readonly BoxFault[];
  /** Openings whose storage is put in, with the option's id. */
  readonly storage: readonly {
    readonly opening: OpeningMeasure;
    readonly measure: FaceMeasure;
    readonly option: string;
  }[];
}

/** Drawer boxes and pull-outs (B1 to B4); what cannot be built is a fault and is not listed. */
export function measureBoxes(
  measures: readonly FaceMeasure[],
  made: MadeByZone,
  edition: Edition,
  choices: Choices,
): BoxesMeasure {
  const boxes: DrawerBox[] = [];
  const faults: BoxFault[] = [];
  const storage: BoxesMeasure['storage'][number][] = [];
  const { shop } = edition;
  for (const measure of measures) {
    const { face } = measure;
    if (!face.renewed) continue;
    const { cabinet } = face;
    const { drawerBox, hingeSet } = made[cabinet.zone];
    const length = slideLength(cabinet.depth, face.frame.thickness, shop.boxBack, shop.slideRearAllowance);

    const build = (
      opening: OpeningMeasure,
      kind: DrawerBox['kind'],
      n: number,
      slide: Slide,
      material: string,
      width: number,
      height: number,
      more: Pick<DrawerBox, 'spacers'>,
    ): void => {
      const mark = `${opening.mark}-${kind === 'pullOut' ? 'P' : 'D'}${n}`;
      if (length === null || width <= 2 * shop.boxThickness || height <= 0) {
        faults.push({ code: 'box.noDepth', mark, opening, measure });
        return;
      }
      const load = Math.round((width * height * length * shop.loadPerCubicFoot) / (64 * 12) ** 3);
      if (load > slide.ratedPounds)
        faults.push({ code: 'slide.load', mark, opening, measure, load, rated: slide.ratedPounds });
      const { parts, edgeBand } = boxParts(width, height, length, shop.boxThickness);
      boxes.push({
        mark,
        opening: opening.mark,
        zone: cabinet.zone,
        kind,
        material,
        width: sixtyfourths(width),
        height: sixtyfourths(height),
        length: sixtyfourths(length),
        slide: slide.id,
        parts,
        edgeBand: sixtyfourths(edgeBand),
        ...more,
      });
    };

    for (const opening of measure.openings) {
      const { placed, crownFiller, baseFiller } = opening;
      const clear = placed.height - crownFiller - baseFiller;
      const slide = find(edition.slides, drawerBox.slide);
      if (placed.opening.kind === 'drawer' && drawerBox.material !== 'none' && slide)
        build(
          opening,
          'drawerBox',
          1,
          slide,
          drawerBox.material,
          boxWidth(placed.width, slide.space),
          roundDown(clear - shop.boxHeightClearance, 16),
          {},
        );
      // A folding corner's second leg is the same opening.
      const chosen =
        face.leg === 'B' && placed.opening.kind === 'cornerFold' ? undefined : choices.inside[opening.mark];
      const option = chosen === undefined ? undefined : find(edition.storage, chosen);
      if (!option || option.kind === 'none') continue;
      const { kind } = placed.opening;
      const goes =
        (kind === 'door' || kind === 'pair' || kind === 'drawer') && option.openings.includes(kind);
      if (!goes) {
        faults.push({ code: 'pullOut.wrongOpening', mark: opening.mark, opening, measure });
        continue;
      }
      const hinge = placed.opening.hinge ?? 'left';
      const loses = (side: 'left' | 'right') =>
        kind === 'pair' || (kind === 'door' && hinge === side) ? hingeSet.intrusion : 0;
      const its = option.slide === undefined ? undefined : find(edition.slides, option.slide);
      const width = roundDown(placed.width - loses('left') - loses('right') - 2 * (its?.space ?? 0), 16);
      const deep = cabinet.depth - face.frame.thickness - shop.boxBack - shop.slideRearAllowance;
      if (width < option.smallestWidth || deep < option.smallestDepth || (its && length === null)) {
        faults.push({ code: 'pullOut.none', mark: opening.mark, opening, measure });
        continue;
      }
      storage.push({ opening, measure, option: option.id });
      if (option.kind !== 'pullOut' || !its) continue;
      const overhang = cabinet.overhang ?? 0;
      const spacers = {
        left: sixtyfourths(overhang + loses('left')),
        right: sixtyfourths(overhang + loses('right')),
      };
      for (let n = 1; n <= option.perOpening; n++)
        build(opening, 'pullOut', n, its, 'melamine', width, shop.pullOutHeight, { spacers });
    }
  }
  return { boxes, faults, storage };
}
