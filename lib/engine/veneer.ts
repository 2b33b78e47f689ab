import type { Edition } from './edition-types';
import type { Face } from './faces';
import { roundUp } from './length';
import type { MadeByZone } from './made';
import type { FaceMeasure } from './openings';
import type { VeneerStrip } from './types';

/** Faces in one plane within this share a strip: 1/32 in (V1). */
const ONE_PLANE = 2;

const refaced = (face: Face): boolean => face.cabinet.action === 'reface';
const plane = (face: Face): number => face.cabinet.depth + (face.cabinet.outOfPlane ?? 0);

/** Whether one strip covers the stiles of two faces that meet (V1). */
export function sharesStrip(left: Face, right: Face, made: MadeByZone): boolean {
  const a = made[left.cabinet.zone];
  const b = made[right.cabinet.zone];
  return (
    refaced(left) &&
    refaced(right) &&
    a.species.id === b.species.id &&
    a.finish.id === b.finish.id &&
    Math.abs(plane(left) - plane(right)) <= ONE_PLANE
  );
}

/**
 * Strips that cover every visible member of the refaced frames (V1). Widths and lengths up to 1/8 in, grain along
 * the length, with the trim allowance on each edge that butts no other strip.
 */
export function veneerStrips(
  faces: readonly Face[],
  measures: readonly FaceMeasure[],
  made: MadeByZone,
  edition: Edition,
): VeneerStrip[] {
  const strips: VeneerStrip[] = [];
  const trim = edition.shop.veneerTrim;
  const panel = edition.shop.panelThickness;
  for (const face of faces) {
    if (!refaced(face)) continue;
    const measure = measures[face.index];
    const { cabinet, frame } = face;
    const { species, finish } = made[cabinet.zone];
    const add = (
      part: string,
      member: VeneerStrip['member'],
      width: number,
      length: number,
      freeEdges: number,
      freeEnds: number,
      cabinets: readonly string[] = [cabinet.id],
    ) =>
      strips.push({
        mark: `${cabinet.id}-${face.leg === 'B' ? 'B' : ''}${part}`,
        zone: cabinet.zone,
        species: species.id,
        finish: finish.id,
        member,
        cabinets,
        width: roundUp(width + trim * freeEdges, 8),
        length: roundUp(length + trim * freeEnds, 8),
      });

    const { left, right } = face;
    const before = left.kind === 'face' ? faces[left.face] : undefined;
    const after = right.kind === 'face' ? faces[right.face] : undefined;
    // A strip shared with the left neighbour is listed there.
    if (frame.stileLeft > 0 && !(before && sharesStrip(before, face, made))) {
      const butts = before !== undefined && refaced(before);
      const extra = left.kind === 'exposed' ? panel : left.kind === 'other' ? (left.filler?.width ?? 0) : 0;
      add('SL', 'stile', frame.stileLeft + extra, cabinet.height, butts ? 1 : 2, 2);
    }
    if (frame.stileRight > 0 && right.kind === 'face' && after && sharesStrip(face, after, made)) {
      const height = Math.max(cabinet.height, after.cabinet.height);
      const width = frame.stileRight + right.gap + after.frame.stileLeft;
      const both = after.cabinet.id === cabinet.id ? [cabinet.id] : [cabinet.id, after.cabinet.id];
      add('SR', 'stile', width, height, 2, 2, both);
    } else if (frame.stileRight > 0) {
      const butts = after !== undefined && refaced(after);
      const extra =
        right.kind === 'exposed'
          ? panel
          : right.kind === 'other'
            ? (right.filler?.width ?? 0)
            : right.kind === 'face'
              ? right.gap
              : 0;
      add('SR', 'stile', frame.stileRight + extra, cabinet.height, butts ? 1 : 2, 2);
    }

    const openings = measure?.openings ?? [];
    const most = (pick: (opening: FaceMeasure['openings'][number]) => number) =>
      openings.reduce((largest, opening) => Math.max(largest, pick(opening)), 0);
    const crownFiller = most((opening) => opening.crownFiller);
    const baseFiller = most((opening) => opening.baseFiller);
    let between = 0;
    for (const one of face.placed.members) {
      if (one.kind === 'stile') continue;
      if (one.part === 'railTop') {
        add('RT', crownFiller > 0 ? 'filler' : 'rail', one.height + crownFiller, one.width, 2, 0);
      } else if (one.part === 'railBottom') {
        add('RB', baseFiller > 0 ? 'filler' : 'rail', one.height + baseFiller, one.width, 2, 0);
      } else if (one.kind === 'rail') {
        between += 1;
        add(`R${between}`, 'rail', one.height, one.width, 2, 0);
      } else {
        between += 1;
        const length =
          one.height - (one.underTopRail ? crownFiller : 0) - (one.onBottomRail ? baseFiller : 0);
        add(`M${between}`, 'mullion', one.width, Math.max(0, length), 2, 0);
      }
    }
  }
  return strips;
}

/**
 * Contact adhesive in hundredths of a gallon, half up: twice the bonded area over what a gallon covers of one face
 * (V3). Area in hundredths of a square foot.
 */
export const adhesiveGallons = (bondedHundredths: number, coverage: number): number =>
  Math.round((2 * bondedHundredths) / coverage);
