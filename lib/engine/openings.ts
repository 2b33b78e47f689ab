import { baseFiller, crownFit, valanceHeight, type CrownFit } from './crown';
import type { DoorStyle, Edition } from './edition-types';
import type { Face } from './faces';
import type { PlacedOpening } from './frame';
import { foldHinges, hingeCount } from './hinges';
import { roundDown, sixtyfourths } from './length';
import type { Made } from './made';
import { top } from './plan';
import type { Front, FrontKind, OpeningKind, Sixtyfourths } from './types';

/** Area units to 0.01 ft²: a front's area is kept in 1/25 of a square 64th, so that a minimum is exact (O5). */
export const AREA_STEP = 147_456;

const FRONT_KINDS: Readonly<Record<Exclude<OpeningKind, 'open'>, FrontKind>> = {
  door: 'door',
  pair: 'door',
  cornerFold: 'door',
  drawer: 'drawerFront',
  falseFront: 'falseFront',
  tiltOut: 'falseFront',
  appliancePanel: 'appliancePanel',
};

/** Area billed for a front in 1/25 of a square 64th: its ordered size, at least the style's minimum (O5). */
export const frontArea = (width: number, height: number, minimumHundredths: number): number =>
  Math.max(width * height * 25, minimumHundredths * AREA_STEP);

/** A sum of area units in hundredths of a square foot, half up (O5). */
export const hundredths = (area: number): number => Math.floor((2 * area + AREA_STEP) / (2 * AREA_STEP));

/**
 * Weight of a front in thousandths of a pound: [W·H·t − (W−2s)(H−2s)(t−p)] × density, W·H·t for a slab; a front
 * without its panel has p = 0 (O5). Hardware is not counted.
 */
export function frontWeight(
  width: number,
  height: number,
  style: DoorStyle,
  build: Front['build'],
  density: number,
  glass = false,
): number {
  const solid = width * height * style.thickness;
  const inner =
    build === 'slab'
      ? 0
      : Math.max(0, width - 2 * style.stile) *
        Math.max(0, height - 2 * style.stile) *
        Math.max(0, style.thickness - (glass ? 0 : style.panelThickness));
  return Math.round(((solid - inner) * density) / 262_144);
}

/** Width of each leaf of a pair: down to 1/16, both equal, the slack in the gap (O2). */
export const leafWidth = (
  opening: number,
  overlayLeft: number,
  overlayRight: number,
  gap: number,
): Sixtyfourths => roundDown((opening + overlayLeft + overlayRight - gap) / 2, 16);

/** Width or height of a single front: the opening and its overlays, down to 1/16 (O1, D3). */
export const frontSize = (opening: number, overlayA: number, overlayB: number): Sixtyfourths =>
  roundDown(opening + overlayA + overlayB, 16);

/** Width of one leaf of a folding corner: its leg's opening, the overlay at the stile, less the setback (S3). */
export const foldLeaf = (opening: number, overlay: number, setback: number): Sixtyfourths =>
  roundDown(opening + overlay - setback, 16);

/** Opening of a leg, its frame's span, and the clear diagonal between two legs, in 64ths (S3). */
export const legOpening = (leg: number, depth: number, outerStile: number): number =>
  leg - depth - outerStile;
export const cornerDiagonal = (legA: number, legB: number, depth: number): number =>
  Math.hypot(legA - depth, legB - depth);

/** Whether five pieces can be made at a size (O4). */
export function fivePieceFits(style: DoorStyle, kind: FrontKind, width: number, height: number): boolean {
  if (width < 2 * style.stile + style.smallestPanel) return false;
  return kind === 'door' || kind === 'appliancePanel'
    ? height >= 2 * style.rail + style.smallestPanel
    : height >= style.smallestDrawerHeight;
}

/** A front before finish and wood are named: its size, and where its lower left corner lies on the frame's face. */
export interface FrontMeasure {
  readonly mark: string;
  readonly opening: string;
  readonly kind: FrontKind;
  readonly build: Front['build'];
  /** A five-piece style that is too small here (O4). */
  readonly madeFlat: boolean;
  readonly x: number;
  readonly y: number;
  readonly width: Sixtyfourths;
  readonly height: Sixtyfourths;
  readonly hinge: Front['hinge'];
  readonly hinges: number;
  /** Hinges of a fold's joint, counted apart from frame hinges. */
  readonly joint: number;
  readonly hingeFault: 'chart' | 'noJoint' | null;
  readonly glass: boolean;
  readonly area: number;
  readonly weight: number;
  readonly shortenedBy: Sixtyfourths;
}

/** One opening with the fillers and fronts that go into it. */
export interface OpeningMeasure {
  readonly mark: string;
  readonly placed: PlacedOpening;
  readonly crownFiller: Sixtyfourths;
  readonly baseFiller: Sixtyfourths;
  readonly fronts: readonly FrontMeasure[];
}

/** One face, measured with what its zone is made of. */
export interface FaceMeasure {
  readonly face: Face;
  readonly openings: readonly OpeningMeasure[];
  /** How the crown sits over it; `null` without one. */
  readonly crown: CrownFit | null;
  /** Height of the strip that hides the light under it (C4); 0 when none is needed. */
  readonly valance: number;
  readonly fiveArea: number;
  readonly slabArea: number;
  readonly fronts: number;
  readonly hinges: number;
  readonly joints: number;
  readonly pulls: number;
  readonly glass: number;
  readonly fillerStrips: number;
  /** Face of the frame that is covered, in square 64ths: members, fillers, panel edges (V3); 0 unless refaced. */
  readonly covered: number;
  /** Fronts that the supplier cannot make or hang. */
  readonly blocked: number;
}

export const markOf = (face: Face, opening: { readonly n: number }): string =>
  `${face.cabinet.id}-${opening.n}`;

/** What a side adds to the covered face: a panel's edge, a seam, or a flush filler that belongs to it (V1). */
export function sideCover(face: Face, side: 'left' | 'right', panelThickness: number): number {
  const beside = face[side];
  if (beside.kind === 'exposed') return panelThickness;
  if (beside.kind === 'other') return beside.filler?.width ?? 0;
  // A seam between two faces belongs to the left one, so that it counts once.
  return beside.kind === 'face' && side === 'right' ? beside.gap : 0;
}

/** Everything on one face (O1 to O5, H1, H2, S3, C3, C5). Depends on style, wood, overlay, crown and base alone. */
export function measureFace(face: Face, made: Made, edition: Edition): FaceMeasure {
  const { cabinet, frame } = face;
  const { overlay } = made;
  const o = overlay.amount;
  const crownProfile = cabinet.tier === 'base' ? null : made.crown;
  const baseProfile = cabinet.tier === 'wall' ? null : made.base;
  const room = face.overhead - top(cabinet);
  const crown = crownProfile ? crownFit(edition.shop, crownProfile, room, frame.railTop, o, true) : null;

  const openings: OpeningMeasure[] = [];
  let open = 0;
  const sum = {
    fiveArea: 0,
    slabArea: 0,
    fronts: 0,
    hinges: 0,
    joints: 0,
    pulls: 0,
    glass: 0,
    fillerStrips: 0,
    blocked: 0,
  };
  for (const placed of face.placed.openings) {
    const hasFront = placed.opening.kind !== 'open';
    const crownFiller =
      crownProfile && placed.underTopRail
        ? hasFront && crown
          ? crown.filler
          : crownFit(edition.shop, crownProfile, room, frame.railTop, o, hasFront).filler
        : sixtyfourths(0);
    const below =
      baseProfile && placed.onBottomRail
        ? baseFiller(edition.shop, baseProfile, cabinet.bottom + frame.railBottom, o, hasFront)
        : sixtyfourths(0);
    const mark = markOf(face, placed.opening);
    const fronts = hasFront ? frontsOf(face, placed, mark, crownFiller, below, made) : [];
    openings.push({ mark, placed, crownFiller, baseFiller: below, fronts });
    open += placed.width * Math.max(0, placed.height - crownFiller - below);
    if (crownFiller > 0) sum.fillerStrips += 1;
    if (below > 0) sum.fillerStrips += 1;
    for (const front of fronts) {
      sum.fronts += 1;
      sum.hinges += front.joint > 0 ? 0 : front.hinges;
      sum.joints += front.joint;
      if (front.build === 'fivePiece') sum.fiveArea += front.area;
      else sum.slabArea += front.area;
      if (front.kind !== 'falseFront' || placed.opening.kind === 'tiltOut') sum.pulls += 1;
      if (front.glass) sum.glass += 1;
      if (front.hingeFault || front.height < made.style.smallestHeight) sum.blocked += 1;
    }
    // The hung leaf of a folding corner carries the one pull of the two.
    if (placed.opening.kind === 'cornerFold' && !isPulled(face, placed)) sum.pulls -= 1;
  }
  const valance = valanceOf(face, made, edition);
  if (valance > 0) sum.fillerStrips += 1;
  const sides =
    (sideCover(face, 'left', edition.shop.panelThickness) +
      sideCover(face, 'right', edition.shop.panelThickness)) *
    cabinet.height;
  const covered = cabinet.action === 'reface' ? Math.max(0, face.width * cabinet.height - open) + sides : 0;
  return { face, openings, crown, valance, covered, ...sum };
}

/** A light rail that is high enough hides the fixture; else a strip does (C4). */
function valanceOf(face: Face, made: Made, edition: Edition): number {
  const { underLight, tier } = face.cabinet;
  if (!underLight || tier !== 'wall' || face.leg === 'B') return 0;
  const height = valanceHeight(edition.shop, underLight.height, underLight.lip);
  return (made.lightRail?.height ?? 0) >= height ? 0 : height;
}

/** Of a folding corner's two leaves the free one is pulled. */
export const isPulled = (face: Face, placed: PlacedOpening): boolean =>
  foldSide(face) !== (placed.opening.hinge ?? 'left');

/** Which leaf of a fold a face carries, as seen from the room. */
export const foldSide = (face: Face): 'left' | 'right' =>
  face.right.kind === 'innerCorner' ? 'left' : 'right';

function frontsOf(
  face: Face,
  placed: PlacedOpening,
  mark: string,
  crownFiller: number,
  below: number,
  made: Made,
): FrontMeasure[] {
  const { opening } = placed;
  if (opening.kind === 'open') return [];
  const { style, overlay, species, hingeSet } = made;
  const kind = FRONT_KINDS[opening.kind];
  const o = overlay.amount;
  const sheet = kind === 'appliancePanel' ? opening.applianceSize : undefined;
  const height = sheet?.height ?? frontSize(placed.height - crownFiller - below, o, o);
  const y = sheet ? placed.y + Math.round((placed.height - sheet.height) / 2) : placed.y + below - o;
  const glass = opening.glass ?? false;
  const five = style.construction === 'fivePiece';
  const shortenedBy = sixtyfourths(crownFiller + below);

  const leaf = (
    name: string,
    x: number,
    width: Sixtyfourths,
    hinge: Front['hinge'],
    carried: number,
    jointOnly: boolean,
  ): FrontMeasure => {
    const fits = five && fivePieceFits(style, kind, width, height);
    const build = fits ? 'fivePiece' : 'slab';
    const weight = frontWeight(width, height, style, build, species.density, glass);
    const folds = opening.kind === 'cornerFold';
    let hinges = 0;
    let joint = 0;
    let hingeFault: FrontMeasure['hingeFault'] = null;
    if (kind === 'door' && folds) {
      const found = foldHinges(hingeSet, width, height, weight + carried);
      if ('fault' in found) hingeFault = found.fault;
      else if (jointOnly) joint = found.joint;
      else hinges = found.frame;
    } else if (kind === 'door') {
      const found = hingeCount(hingeSet, width, height, weight);
      if (found === null) hingeFault = 'chart';
      else hinges = found;
    }
    return {
      mark: name,
      opening: mark,
      kind,
      build,
      madeFlat: five && !fits,
      x,
      y,
      width,
      height: sixtyfourths(height),
      hinge,
      hinges: hinges + joint,
      joint,
      hingeFault,
      glass,
      area: frontArea(width, height, style.minimumArea),
      weight,
      shortenedBy,
    };
  };

  if (opening.kind === 'pair') {
    const width = leafWidth(placed.width, o, o, overlay.gap);
    return [
      leaf(`${mark}L`, placed.x - o, width, 'left', 0, false),
      leaf(`${mark}R`, placed.x + placed.width + o - width, width, 'right', 0, false),
    ];
  }
  if (opening.kind === 'cornerFold') {
    const side = foldSide(face);
    const hung = (opening.hinge ?? 'left') === side;
    const width = foldLeaf(placed.width, o, overlay.setback);
    const other = otherLeaf(face, opening.n, o, overlay.setback);
    const otherWeight = (() => {
      const fits = five && fivePieceFits(style, kind, other, height);
      return frontWeight(other, height, style, fits ? 'fivePiece' : 'slab', species.density, glass);
    })();
    const x = side === 'left' ? placed.x - o : placed.x + placed.width + o - width;
    return [leaf(`${mark}${side === 'left' ? 'L' : 'R'}`, x, width, side, hung ? otherWeight : 0, !hung)];
  }
  const width = sheet?.width ?? frontSize(placed.width, o, o);
  const x = sheet ? placed.x + Math.round((placed.width - sheet.width) / 2) : placed.x - o;
  return [leaf(mark, x, sixtyfourths(width), kind === 'door' ? (opening.hinge ?? 'left') : 'none', 0, false)];
}

/** Width of the other leg's leaf of a folding corner; 0 when the survey has none. */
function otherLeaf(face: Face, n: number, overlay: number, setback: number): number {
  const { corner, frame } = face.cabinet;
  const other = face.leg === 'A' ? corner?.frameB : frame;
  const found = other && findOpening(other.layout, n);
  return found ? foldLeaf(Math.min(found.width, found.widthSecond ?? found.width), overlay, setback) : 0;
}

function findOpening(
  layout: Face['frame']['layout'],
  n: number,
): { readonly width: Sixtyfourths; readonly widthSecond?: Sixtyfourths } | undefined {
  if ('opening' in layout) return layout.opening.n === n ? layout.opening : undefined;
  for (const part of layout.parts) {
    const found = findOpening(part, n);
    if (found) return found;
  }
  return undefined;
}
