import { chosenIn, find } from './choices';
import { crownFit, overhead } from './crown';
import type { DoorStyle, Edition, HingeSet, Overlay } from './edition-types';
import { placeFrame, type PlacedOpening } from './frame';
import { formatLength, roundDown, sixtyfourths } from './length';
import { isRenewed, top } from './plan';
import type { Cabinet, Choices, FillerStrip, FitNote, Front, FrontKind, Sixtyfourths, Survey } from './types';

export const markOf = (cabinet: Cabinet, opening: { readonly n: number }): string =>
  `${cabinet.id}-${opening.n}`;

const FRONT_KINDS = {
  door: 'door',
  pair: 'door',
  cornerFold: 'door',
  drawer: 'drawerFront',
  falseFront: 'falseFront',
  tiltOut: 'falseFront',
  appliancePanel: 'appliancePanel',
} as const satisfies Record<string, FrontKind>;

/** One opening with everything that its fronts are computed from. */
export interface FrontPlan {
  readonly cabinet: Cabinet;
  readonly placed: PlacedOpening;
  readonly mark: string;
  readonly style: DoorStyle;
  readonly overlay: Overlay;
  readonly hingeSet: HingeSet | undefined;
  /** Height of the crown filler in it (C3). */
  readonly filler: Sixtyfourths;
  readonly fronts: readonly Front[];
}

/** Hundredths of a square foot of a front, at least the style's minimum, half up (O5). */
export function billedArea(width: number, height: number, minimum: number): number {
  // 64ths² to hundredths of ft²: 64² × 144 = 589,824 to the square foot.
  return Math.max(minimum, Math.floor((width * height * 100) / 589_824 + 0.5));
}

/** Thousandths of a pound: [W·H·t − (W−2s)(H−2s)(t−p)] × density (O5). */
export function frontWeight(
  width: number,
  height: number,
  style: DoorStyle,
  build: 'fivePiece' | 'slab',
  density: number,
): number {
  const solid = width * height * style.thickness;
  const inner =
    build === 'slab'
      ? 0
      : Math.max(0, width - 2 * style.stile) *
        Math.max(0, height - 2 * style.stile) *
        (style.thickness - style.panelThickness);
  return Math.round(((solid - inner) * density) / 262_144);
}

/** Hinges by the supplier's chart, or `null` past its last row (H1). */
export function hingeCount(set: HingeSet, width: number, height: number, weight: number): number | null {
  const byHeight = set.byHeight.find((row) => height <= row.upTo);
  const byWeight = set.byWeight.find((row) => weight <= row.upTo);
  if (!byHeight || !byWeight) return null;
  const extra = set.extraAboveWidth && width > set.extraAboveWidth.width ? set.extraAboveWidth.hinges : 0;
  return Math.max(byHeight.hinges, byWeight.hinges) + extra;
}

/** Width of each leaf of a pair: down to 1/16, both equal, the slack in the gap (O2). */
export const leafWidth = (
  opening: number,
  overlayLeft: number,
  overlayRight: number,
  gap: number,
): Sixtyfourths => roundDown((opening + overlayLeft + overlayRight - gap) / 2, 16);

export interface FrontsResult {
  readonly plans: readonly FrontPlan[];
  readonly fillers: readonly FillerStrip[];
  readonly notes: readonly FitNote[];
}

/** Every front to order, after the crown's fillers have been put in (O1 to O5, H1, C3). */
export function planFronts(survey: Survey, edition: Edition, choices: Choices): FrontsResult {
  const plans: FrontPlan[] = [];
  const fillers: FillerStrip[] = [];
  const notes: FitNote[] = [];
  for (const cabinet of survey.cabinets) {
    if (!isRenewed(cabinet)) continue;
    const here = chosenIn(choices, cabinet.zone);
    const style = find(edition.styles, here.style);
    const overlay = find(edition.overlays, here.overlay);
    const species = find(edition.species, here.species);
    if (!style || !overlay || !species) continue;
    const hingeSet = find(edition.hingeSets, overlay.hingeSet);
    const crown = cabinet.tier === 'base' ? undefined : find(edition.crowns, here.crown);
    for (const placed of placeFrame(cabinet.frame, cabinet.width, cabinet.height).openings) {
      const { opening } = placed;
      const mark = markOf(cabinet, opening);
      const hasFront = opening.kind !== 'open';
      let filler = sixtyfourths(0);
      if (crown && placed.underTopRail) {
        const room = sixtyfourths(overhead(survey, cabinet) - top(cabinet));
        const fit = crownFit(edition, crown, room, cabinet.frame.railTop, overlay.amount, hasFront);
        filler = fit.filler;
        if (filler > 0)
          fillers.push({
            mark: `${mark}-F`,
            opening: mark,
            zone: cabinet.zone,
            width: placed.width,
            height: filler,
            reason: 'crown',
          });
      }
      const fronts = hasFront
        ? frontsOf(
            cabinet,
            placed,
            mark,
            filler,
            { style, overlay, hingeSet, density: species.density },
            here,
            notes,
          )
        : [];
      plans.push({ cabinet, placed, mark, style, overlay, hingeSet, filler, fronts });
    }
  }
  return { plans, fillers, notes };
}

interface Made {
  readonly style: DoorStyle;
  readonly overlay: Overlay;
  readonly hingeSet: HingeSet | undefined;
  readonly density: number;
}

function frontsOf(
  cabinet: Cabinet,
  placed: PlacedOpening,
  mark: string,
  filler: number,
  { style, overlay, hingeSet, density }: Made,
  here: { readonly species: string; readonly finish: string },
  notes: FitNote[],
): Front[] {
  const { opening } = placed;
  if (opening.kind === 'open') return [];
  const kind = FRONT_KINDS[opening.kind];
  const o = overlay.amount;
  const openingHeight = placed.height - filler;
  const isPanel = kind === 'appliancePanel' && opening.applianceSize !== undefined;
  const height =
    isPanel && opening.applianceSize ? opening.applianceSize.height : roundDown(openingHeight + 2 * o, 16);
  const whole =
    isPanel && opening.applianceSize ? opening.applianceSize.width : roundDown(placed.width + 2 * o, 16);
  const leaves =
    opening.kind === 'pair' || opening.kind === 'cornerFold'
      ? (['L', 'R'] as const).map((side) => ({
          mark: `${mark}${side}`,
          width: leafWidth(placed.width, o, o, overlay.gap),
          hinge: side === 'L' ? ('left' as const) : ('right' as const),
        }))
      : [{ mark, width: whole, hinge: kind === 'door' ? (opening.hinge ?? 'left') : ('none' as const) }];

  return leaves.map((leaf) => {
    const five = style.construction === 'fivePiece';
    const small =
      five &&
      (leaf.width < 2 * style.stile + style.smallestPanel ||
        (kind === 'door'
          ? height < 2 * style.rail + style.smallestPanel
          : height < style.smallestDrawerHeight));
    const build = five && !small ? 'fivePiece' : 'slab';
    if (small)
      notes.push({
        code: 'front.slab',
        rule: 'O4',
        severity: 'information',
        zone: cabinet.zone,
        parts: [leaf.mark],
        homeowner: `This front is too small for a frame and panel, so it is made flat.`,
        bench: `${leaf.mark} ${formatLength(leaf.width)} × ${formatLength(height)}: slab.`,
      });
    if (kind === 'door' && leaf.width > style.widestLeaf)
      notes.push({
        code: 'front.wide',
        rule: 'S4',
        severity: 'information',
        zone: cabinet.zone,
        parts: [leaf.mark],
        homeowner: `This door is wider than the style is usually made; ask about a pair.`,
        bench: `${leaf.mark} is ${formatLength(leaf.width)} wide, the style allows ${formatLength(style.widestLeaf)}.`,
      });
    const weight = frontWeight(leaf.width, height, style, build, density);
    const counted = kind === 'door' && hingeSet ? hingeCount(hingeSet, leaf.width, height, weight) : 0;
    if (counted === null)
      notes.push({
        code: 'hinge.chart',
        rule: 'H1',
        severity: 'cannotBeBuilt',
        zone: cabinet.zone,
        parts: [leaf.mark],
        homeowner: `This door is too heavy or too tall for its hinges.`,
        bench: `${leaf.mark} lies past the last row of the hinge chart.`,
      });
    if (height < style.smallestHeight)
      notes.push({
        code: 'front.low',
        rule: 'C3',
        severity: 'cannotBeBuilt',
        zone: cabinet.zone,
        parts: [leaf.mark],
        homeowner: `With this crown the front would be too low to make.`,
        bench: `${leaf.mark} would be ${formatLength(height)} high, the style needs ${formatLength(style.smallestHeight)}.`,
      });
    return {
      mark: leaf.mark,
      opening: mark,
      cabinet: cabinet.id,
      zone: cabinet.zone,
      kind,
      style: style.id,
      build,
      species: here.species,
      finish: here.finish,
      width: leaf.width,
      height,
      hinge: leaf.hinge,
      hinges: counted ?? 0,
      glass: opening.glass ?? false,
      billedArea: billedArea(leaf.width, height, style.minimumArea),
      weight,
      shortenedBy: sixtyfourths(filler),
    };
  });
}
