import { endOf, type Face } from './faces';
import { sixtyfourths } from './length';
import type { Made } from './made';
import type { MouldingLine } from './mouldings';
import { foldSide, isPulled, type FrontMeasure, type OpeningMeasure } from './openings';
import { outward, pointOn, top } from './plan';
import { quantities, type Quantities } from './quantities';
import type { Edition } from './edition-types';
import type {
  Choices,
  Massing,
  MassingFront,
  MassingSolid,
  MassingSweep,
  Material,
  Solid,
  Survey,
  Wall,
  Zone,
} from './types';

/** How far a pull's centre stays from the edge of a door, and its end from the door's end: the drawing's choice. */
const PULL_INSET = 80;
const PULL_END = 160;
/** Thickness of what has none of its own in a survey. */
const SHEET = 16;
const SPLASH = { height: 256, thickness: 48 };
/** A doorway or window is drawn this far into its wall. */
const WALL_DEPTH = 256;
const HAND_HEIGHT = 42 * 64;

/**
 * Plan polygons, boxes, fronts and swept mouldings of a kitchen (G1): what the room view and the wall views draw.
 * Fronts stand at their computed size on the frame's face, a bumper in front of it. Only what is renewed carries a
 * material. Lengths in 64ths. Throws `EngineError`.
 */
export function massing(survey: Survey, edition: Edition, choices: Choices): Massing {
  const q = quantities(survey, edition, choices);
  const solids: MassingSolid[] = [];
  const fronts: MassingFront[] = [];
  for (const face of q.faces) {
    boxOf(face, solids);
    membersOf(face, materialOf(q, face), solids);
    endPanels(face, edition.shop.panelThickness, materialOf(q, face), solids);
    frontsOn(face, q, edition, solids, fronts);
  }
  panelsOf(q, edition.shop.panelThickness, solids);
  fillersOf(survey, q, solids);
  countersOf(q, solids);
  standingThings(survey, solids);
  return {
    outline: survey.room.outline,
    ceiling: survey.room.ceiling,
    walls: survey.walls,
    solids,
    fronts,
    sweeps: sweepsOf(q, edition),
  };
}

const woodOf = (made: Made): Material => ({ species: made.species.id, finish: made.finish.id });

const materialOf = (q: Quantities, face: Face): Material | null =>
  face.renewed ? woodOf(q.made[face.cabinet.zone]) : null;

/** A solid on a wall: `x` along it, `z` above the floor, `out` its front face's distance from the wall's line. */
function standing(
  wall: Wall,
  x: number,
  z: number,
  out: number,
  width: number,
  height: number,
  depth: number,
): Solid {
  const point = pointOn(wall, x, out);
  return {
    at: { ...point, z: sixtyfourths(Math.round(z)) },
    facing: outward(wall),
    width: sixtyfourths(Math.round(width)),
    height: sixtyfourths(Math.round(height)),
    depth: sixtyfourths(Math.round(depth)),
  };
}

/** The box behind a frame; the first leg of a corner cabinet takes the corner itself. */
function boxOf(face: Face, solids: MassingSolid[]): void {
  const { cabinet, wall, frame } = face;
  const reach = face.leg === 'A' ? cabinet.depth : 0;
  const from = face.at - (face.left.kind === 'innerCorner' ? reach : 0);
  const to = endOf(face) + (face.right.kind === 'innerCorner' ? reach : 0);
  const depth = cabinet.depth - frame.thickness;
  solids.push({
    ...standing(wall, from, cabinet.bottom, depth, to - from, cabinet.height, depth),
    mark: `${cabinet.id}${face.leg === 'B' ? 'B' : ''}`,
    cabinet: cabinet.id,
    zone: cabinet.zone,
    role: 'box',
    material: null,
  });
}

function membersOf(face: Face, material: Material | null, solids: MassingSolid[]): void {
  const { cabinet, wall, frame } = face;
  const out = cabinet.depth + (cabinet.outOfPlane ?? 0);
  face.placed.members.forEach((member, index) => {
    solids.push({
      ...standing(
        wall,
        face.at + member.x,
        cabinet.bottom + member.y,
        out,
        member.width,
        member.height,
        frame.thickness,
      ),
      mark: `${cabinet.id}-${face.leg === 'B' ? 'B' : ''}M${index + 1}`,
      cabinet: cabinet.id,
      zone: cabinet.zone,
      role: member.kind,
      material,
    });
  });
}

/** Quarter-inch panels flush with the frame's front, from the floor or the box's lower edge up (P1). */
function endPanels(face: Face, thickness: number, material: Material | null, solids: MassingSolid[]): void {
  if (!face.renewed) return;
  const { cabinet, wall } = face;
  const toe = cabinet.toe?.height ?? 0;
  for (const side of ['left', 'right'] as const) {
    if (face[side].kind !== 'exposed') continue;
    const x = side === 'left' ? face.at - thickness : endOf(face);
    solids.push({
      ...standing(
        wall,
        x,
        cabinet.bottom - toe,
        cabinet.depth,
        thickness,
        cabinet.height + toe,
        cabinet.depth,
      ),
      mark: `${cabinet.id}-E${side === 'left' ? 'L' : 'R'}`,
      cabinet: cabinet.id,
      zone: cabinet.zone,
      role: 'endPanel',
      material,
    });
  }
}

function frontsOn(
  face: Face,
  q: Quantities,
  edition: Edition,
  solids: MassingSolid[],
  fronts: MassingFront[],
): void {
  const { cabinet, wall } = face;
  const made = q.made[cabinet.zone];
  const plane = cabinet.depth + (cabinet.outOfPlane ?? 0);
  if (!face.renewed) {
    keptFronts(face, made, plane + edition.shop.bumper, fronts);
    return;
  }
  const material = woodOf(made);
  const out = plane + edition.shop.bumper + made.style.thickness;
  for (const opening of q.measures[face.index]?.openings ?? []) {
    fillerStrips(face, opening, plane, material, solids);
    for (const front of opening.fronts)
      fronts.push({
        ...standing(
          wall,
          face.at + front.x,
          cabinet.bottom + front.y,
          out,
          front.width,
          front.height,
          made.style.thickness,
        ),
        mark: front.mark,
        cabinet: cabinet.id,
        zone: cabinet.zone,
        kind: front.kind,
        style: made.style.id,
        build: front.build,
        glass: front.glass,
        hinge: front.hinge,
        material,
        pull: pullOn(face, opening, front, made),
      });
  }
}

function fillerStrips(
  face: Face,
  { mark, placed, crownFiller, baseFiller }: OpeningMeasure,
  plane: number,
  material: Material,
  solids: MassingSolid[],
): void {
  const { cabinet, wall, frame } = face;
  const leg = face.leg === 'B' ? 'B' : '';
  const add = (suffix: string, y: number, height: number) =>
    solids.push({
      ...standing(wall, face.at + placed.x, cabinet.bottom + y, plane, placed.width, height, frame.thickness),
      mark: `${mark}${leg}-${suffix}`,
      cabinet: cabinet.id,
      zone: cabinet.zone,
      role: 'fillerStrip',
      material,
    });
  if (crownFiller > 0) add('F', placed.y + placed.height - crownFiller, crownFiller);
  if (baseFiller > 0) add('FB', placed.y, baseFiller);
}

/** Fronts that stay as they are: drawn, without material. */
function keptFronts(face: Face, made: Made, out: number, fronts: MassingFront[]): void {
  const { cabinet, wall } = face;
  for (const placed of face.placed.openings) {
    const { opening } = placed;
    if (opening.kind === 'open') continue;
    const total = opening.existing.reduce<number>((sum, one) => sum + one.width, 0);
    const gap = 8 * Math.max(0, opening.existing.length - 1);
    let x = placed.x + (placed.width - total - gap) / 2;
    opening.existing.forEach((one, index) => {
      const y = placed.y + (placed.height - one.height) / 2;
      fronts.push({
        ...standing(wall, face.at + x, cabinet.bottom + y, out + 48, one.width, one.height, 48),
        mark: `${cabinet.id}-${opening.n}${opening.existing.length > 1 ? (index === 0 ? 'L' : 'R') : ''}`,
        cabinet: cabinet.id,
        zone: cabinet.zone,
        kind: opening.kind === 'drawer' ? 'drawerFront' : 'door',
        style: made.style.id,
        build: 'slab',
        glass: false,
        hinge: 'none',
        material: null,
        pull: null,
      });
      x += one.width + 8;
    });
  }
}

/** Where a front is pulled: drawers in their middle, doors by their free edge where a hand comes first. */
function pullOn(
  face: Face,
  { placed }: OpeningMeasure,
  front: FrontMeasure,
  made: Made,
): MassingFront['pull'] {
  const { pull } = made;
  if (pull.form === 'none') return null;
  if (front.kind === 'falseFront' && placed.opening.kind !== 'tiltOut') return null;
  if (placed.opening.kind === 'cornerFold' && !isPulled(face, placed)) return null;
  const { id } = pull;
  const middle = { id, x: sixtyfourths(Math.round(front.width / 2)), upright: false };
  if (front.kind === 'appliancePanel')
    return { ...middle, y: sixtyfourths(Math.max(0, front.height - PULL_END)) };
  if (front.kind !== 'door') return { ...middle, y: sixtyfourths(Math.round(front.height / 2)) };

  const hinge = placed.opening.kind === 'cornerFold' ? hungSide(face) : front.hinge;
  const x = hinge === 'left' ? front.width - PULL_INSET : PULL_INSET;
  const reach = PULL_END + Math.round(pull.centres / 2);
  const lower = face.cabinet.bottom + front.y;
  const atFoot = Math.min(reach, Math.round(front.height / 2));
  const atHead = Math.max(front.height - reach, Math.round(front.height / 2));
  const y = lower >= HAND_HEIGHT ? atFoot : Math.min(atHead, Math.max(HAND_HEIGHT - lower, atFoot));
  return { id, x: sixtyfourths(x), y: sixtyfourths(y), upright: pull.form !== 'cup' };
}

/** A folding corner's free leaf is pulled at the edge that meets the stile. */
const hungSide = (face: Face): 'left' | 'right' => (foldSide(face) === 'left' ? 'right' : 'left');

/** Backs of islands, seen from behind, and toe skins. */
function panelsOf(q: Quantities, thickness: number, solids: MassingSolid[]): void {
  for (const panel of q.panels) {
    const face = q.faces.find(
      (one) => one.cabinet.id === panel.cabinet && panel.mark.startsWith(one.wall.id),
    );
    if (!face) continue;
    const { wall, cabinet } = face;
    const shared = {
      mark: panel.mark,
      cabinet: cabinet.id,
      zone: panel.zone,
      material: materialOf(q, face),
    };
    if (panel.kind === 'islandWrap') {
      const from =
        face.left.kind === 'innerCorner' ? 0 : face.at - (face.left.kind === 'exposed' ? thickness : 0);
      const point = pointOn(wall, from + panel.width, -thickness);
      const facing = outward(wall);
      solids.push({
        at: { ...point, z: sixtyfourths(cabinet.bottom - (cabinet.toe?.height ?? 0)) },
        facing: { x: facing.x === 0 ? 0 : -facing.x, y: facing.y === 0 ? 0 : -facing.y },
        width: panel.width,
        height: panel.height,
        depth: sixtyfourths(thickness),
        ...shared,
        role: 'endPanel',
      });
    }
  }
  for (const face of q.faces) {
    const { cabinet, wall } = face;
    const { toe } = cabinet;
    if (!toe) continue;
    const skinned = face.renewed && q.made[cabinet.zone].base === null;
    solids.push({
      ...standing(
        wall,
        face.at,
        cabinet.bottom - toe.height,
        cabinet.depth - toe.depth,
        face.width,
        toe.height,
        SHEET,
      ),
      mark: `${cabinet.id}-T${face.leg === 'B' ? 'B' : ''}`,
      cabinet: cabinet.id,
      zone: cabinet.zone,
      role: 'toe',
      material: skinned ? materialOf(q, face) : null,
    });
  }
}

/** Surveyed fillers stand in the plane of the frames beside them. */
function fillersOf(survey: Survey, q: Quantities, solids: MassingSolid[]): void {
  for (const filler of survey.fillers) {
    const face = q.faces.find(
      (one) =>
        one.wall.id === filler.wall &&
        one.cabinet.tier === filler.tier &&
        ((one.left.kind !== 'exposed' && 'filler' in one.left && one.left.filler === filler) ||
          ('filler' in one.right && one.right.filler === filler)),
    );
    const wall = face?.wall ?? survey.walls.find((one) => one.id === filler.wall);
    if (!wall) continue;
    const out = face ? face.cabinet.depth : filler.tier === 'wall' ? 12 * 64 : 24 * 64;
    solids.push({
      ...standing(wall, filler.at, filler.bottom, out, filler.width, filler.height, 48),
      mark: filler.id,
      cabinet: face?.cabinet.id ?? null,
      zone: face?.cabinet.zone ?? null,
      role: 'filler',
      material: face ? materialOf(q, face) : null,
    });
  }
}

function countersOf(q: Quantities, solids: MassingSolid[]): void {
  for (const piece of q.counters) {
    const { counter } = q.made[piece.zone];
    const { wall, from, to } = piece;
    const shared = { cabinet: null, zone: piece.zone, material: null };
    solids.push({
      ...standing(wall, from, piece.z, piece.out, to - from, counter.thickness, piece.out - piece.back),
      mark: piece.mark,
      role: 'counter',
      ...shared,
    });
    if (wall.kind === 'wall')
      solids.push({
        ...standing(
          wall,
          from,
          piece.z + counter.thickness,
          SPLASH.thickness,
          to - from,
          SPLASH.height,
          SPLASH.thickness,
        ),
        mark: `${piece.mark}-S`,
        role: 'splash',
        ...shared,
      });
  }
}

/** Appliances, windows, doorways and soffits. */
function standingThings(survey: Survey, solids: MassingSolid[]): void {
  const wallOf = (id: string) => survey.walls.find((wall) => wall.id === id);
  for (const one of survey.appliances) {
    const wall = wallOf(one.wall);
    if (!wall) continue;
    // What is let into a cabinet stands an inch off the wall.
    const out = one.depth + (one.within === undefined ? 0 : 64);
    solids.push({
      ...standing(wall, one.at, one.bottom, out, one.width, one.height, one.depth),
      mark: one.id,
      cabinet: one.within ?? null,
      zone: null,
      role: 'appliance',
      appliance: one.kind,
      material: null,
    });
  }
  for (const gap of survey.gaps) {
    const wall = wallOf(gap.wall);
    if (!wall) continue;
    solids.push({
      ...standing(wall, gap.at, gap.bottom, 0, gap.width, gap.height, WALL_DEPTH),
      mark: gap.id,
      cabinet: null,
      zone: null,
      role: gap.kind,
      material: null,
    });
  }
  survey.room.soffits.forEach((soffit, index) => {
    const wall = wallOf(soffit.wall);
    if (!wall) return;
    solids.push({
      ...standing(
        wall,
        soffit.at,
        soffit.bottom,
        soffit.depth,
        soffit.width,
        survey.room.ceiling - soffit.bottom,
        soffit.depth,
      ),
      mark: `soffit-${index + 1}`,
      cabinet: null,
      zone: null,
      role: 'soffit',
      material: null,
    });
  });
}

/** Height of a moulding's lower back edge above the floor. */
function heightOf(line: MouldingLine, q: Quantities, edition: Edition): number {
  const first = line.faces[0];
  if (!first || line.kind === 'base') return 0;
  if (line.kind === 'lightRail') return first.cabinet.bottom - line.profile.height;
  const fit = q.measures[first.index]?.crown;
  return top(first.cabinet) - (fit?.nailer ? edition.shop.nailerLap : (fit?.seat ?? 0));
}

function sweepsOf(q: Quantities, edition: Edition): MassingSweep[] {
  const sweeps: MassingSweep[] = [];
  const counts = new Map<string, number>();
  for (const kind of ['crown', 'base', 'lightRail'] as const)
    for (const line of q.mouldings[kind].lines) {
      const zone: Zone = line.zone;
      const name = `${line.faces[0]?.wall.id ?? ''}-${kind}`;
      const n = (counts.get(name) ?? 0) + 1;
      counts.set(name, n);
      sweeps.push({
        mark: `${name}-${n}`,
        kind,
        profile: line.profile.id,
        zone,
        path: line.path,
        z: sixtyfourths(Math.round(heightOf(line, q, edition))),
        material: woodOf(q.made[zone]),
      });
    }
  return sweeps;
}
