import { chosen, chosenIn, find } from './choices';
import { crownFit, crownReach, mouldingEnd, overhead } from './crown';
import type { Edition, MouldingProfile } from './edition-types';
import { placeFrame } from './frame';
import type { FrontPlan } from './fronts';
import { roundUp, sixtyfourths } from './length';
import { isRenewed, runEnd, runs, top, type Run } from './plan';
import type {
  Cabinet,
  Choices,
  DrawerBox,
  MouldingEnd,
  MouldingPiece,
  PanelPiece,
  Survey,
  VeneerStrip,
} from './types';

/** Strips that cover every visible member of the refaced frames (V1); seams between neighbours share one. */
export function veneerStrips(survey: Survey, edition: Edition, choices: Choices): VeneerStrip[] {
  const strips: VeneerStrip[] = [];
  const refaced = survey.cabinets.filter((cabinet) => cabinet.action === 'reface');
  const seamed = new Set<string>();
  for (const cabinet of refaced) {
    const { species, finish } = chosenIn(choices, cabinet.zone);
    const right = rightNeighbour(refaced, cabinet);
    const bridges =
      right !== undefined &&
      chosen(choices, 'species', right.zone) === species &&
      chosen(choices, 'finish', right.zone) === finish &&
      Math.abs((cabinet.outOfPlane ?? 0) - (right.outOfPlane ?? 0)) <= 2 &&
      cabinet.depth === right.depth;
    const trim = edition.shop.veneerTrim;
    const add = (
      part: string,
      member: VeneerStrip['member'],
      width: number,
      length: number,
      cabinets: string[],
      freeEdges: number,
      freeEnds: number,
    ) =>
      strips.push({
        mark: `${cabinet.id}-${part}`,
        zone: cabinet.zone,
        species,
        finish,
        member,
        cabinets,
        width: roundUp(width + trim * freeEdges, 8),
        length: roundUp(length + trim * freeEnds, 8),
      });
    const { frame } = cabinet;
    if (!seamed.has(cabinet.id)) {
      const panel = cabinet.left.exposed ? edition.shop.panelThickness : 0;
      add('SL', 'stile', frame.stileLeft + panel, cabinet.height, [cabinet.id], 2, 2);
    }
    if (right && bridges) {
      const gap = right.at - (cabinet.at + cabinet.width);
      const height = Math.max(cabinet.height, right.height);
      add(
        'SR',
        'stile',
        frame.stileRight + gap + right.frame.stileLeft,
        height,
        [cabinet.id, right.id],
        2,
        2,
      );
      seamed.add(right.id);
    } else {
      const panel = cabinet.right.exposed ? edition.shop.panelThickness : 0;
      add('SR', 'stile', frame.stileRight + panel, cabinet.height, [cabinet.id], 2, 2);
    }
    placeFrame(frame, cabinet.width, cabinet.height).members.forEach((member, index) => {
      if (member.kind === 'stile') return;
      const upright = member.kind === 'mullion';
      add(
        `M${index}`,
        member.kind,
        upright ? member.width : member.height,
        upright ? member.height : member.width,
        [cabinet.id],
        2,
        0,
      );
    });
  }
  return strips;
}

function rightNeighbour(cabinets: readonly Cabinet[], cabinet: Cabinet): Cabinet | undefined {
  const edge = cabinet.at + cabinet.width;
  return cabinets.find(
    (other) =>
      other.wall === cabinet.wall &&
      other.tier === cabinet.tier &&
      other.at >= edge &&
      other.at - edge <= 16 &&
      Math.abs(other.bottom - cabinet.bottom) <= 4,
  );
}

/** 64ths² of frame face that is covered, trim not counted, filler strips counted (V3). */
export function coveredFace(cabinet: Cabinet, plans: readonly FrontPlan[]): number {
  if (cabinet.action !== 'reface') return 0;
  const open = plans
    .filter((plan) => plan.cabinet.id === cabinet.id)
    .reduce((sum, plan) => sum + plan.placed.width * (plan.placed.height - plan.filler), 0);
  return Math.max(0, cabinet.width * cabinet.height - open);
}

const KEYS = { crown: 'crowns', base: 'bases', lightRail: 'lightRails' } as const;

/** Runs along which a moulding of a kind goes, with the profile of their zone. */
export function mouldingRuns(
  survey: Survey,
  edition: Edition,
  choices: Choices,
  kind: 'crown' | 'base' | 'lightRail',
): { run: Run; profile: MouldingProfile; all: Run[] }[] {
  const belongs = (cabinet: Cabinet) =>
    kind === 'crown'
      ? cabinet.tier !== 'base'
      : kind === 'base'
        ? cabinet.tier !== 'wall'
        : cabinet.tier === 'wall';
  const level = (cabinet: Cabinet) => (kind === 'crown' ? top(cabinet) : cabinet.bottom);
  const all = runs(survey, belongs, level);
  return all.flatMap((run) => {
    const zone = run.cabinets[0]?.zone;
    if (!zone) return [];
    const list: readonly MouldingProfile[] = edition[KEYS[kind]];
    const profile = find(list, chosen(choices, kind, zone));
    return profile ? [{ run, profile, all }] : [];
  });
}

/** Pieces of crown, base and light rail with their returns and the nailers a free-standing crown needs (C2, C3, C5). */
export function mouldingPieces(survey: Survey, edition: Edition, choices: Choices): MouldingPiece[] {
  const pieces: MouldingPiece[] = [];
  for (const kind of ['crown', 'base', 'lightRail'] as const) {
    mouldingRuns(survey, edition, choices, kind).forEach(({ run, profile, all }, index) => {
      const first = run.cabinets[0];
      if (!first) return;
      const { species, finish } = chosenIn(choices, first.zone);
      const panel = edition.shop.panelThickness;
      const ends = { left: runEnd(all, run, 'left'), right: runEnd(all, run, 'right') };
      const exposed = (ends.left === 'exposed' ? panel : 0) + (ends.right === 'exposed' ? panel : 0);
      const back = run.end - run.at + exposed;
      const projection = kind === 'crown' ? crownReach(profile).projection : profile.projection;
      const spring = kind === 'crown' ? profile.spring : 90_000;
      const at = (kindOfEnd: 'exposed' | 'inside' | 'stopped'): MouldingEnd =>
        mouldingEnd(kindOfEnd === 'exposed' ? 'outside' : kindOfEnd, spring);
      const stretch = (kindOfEnd: 'exposed' | 'inside' | 'stopped') =>
        kindOfEnd === 'exposed' ? projection : kindOfEnd === 'inside' ? -projection : 0;
      const mark = `${run.wall.id}-${kind === 'crown' ? 'CR' : kind === 'base' ? 'BM' : 'LR'}${index + 1}`;
      const shared = { kind, profile: profile.id, zone: first.zone, species, finish } as const;
      pieces.push({
        mark,
        ...shared,
        backLength: sixtyfourths(back),
        frontLength: sixtyfourths(Math.round(back + stretch(ends.left) + stretch(ends.right))),
        left: at(ends.left),
        right: at(ends.right),
        isReturn: false,
      });
      for (const side of ['left', 'right'] as const) {
        if (ends[side] !== 'exposed') continue;
        const outside = mouldingEnd('outside', spring);
        const stopped = mouldingEnd('stopped', spring);
        pieces.push({
          mark: `${mark}-${side === 'left' ? 'L' : 'R'}`,
          ...shared,
          backLength: run.cabinets[0]?.depth ?? sixtyfourths(0),
          frontLength: sixtyfourths(Math.round(run.depth + projection)),
          left: side === 'left' ? stopped : outside,
          right: side === 'left' ? outside : stopped,
          isReturn: true,
        });
      }
      if (kind === 'crown') {
        const over = sixtyfourths(overhead(survey, first) - top(first));
        const overlay = find(edition.overlays, chosen(choices, 'overlay', first.zone));
        const fit = crownFit(
          edition,
          profile,
          over,
          first.frame.railTop,
          overlay?.amount ?? sixtyfourths(0),
          true,
        );
        if (fit.nailer)
          pieces.push({
            mark: `${mark}-N`,
            ...shared,
            kind: 'nailer',
            backLength: sixtyfourths(back),
            frontLength: sixtyfourths(back),
            left: mouldingEnd('stopped', spring),
            right: mouldingEnd('stopped', spring),
            isReturn: false,
          });
      }
    });
  }
  return pieces;
}

/** Exposed ends, backs and toe skins (P1, P2). */
export function panelPieces(survey: Survey, choices: Choices): PanelPiece[] {
  const panels: PanelPiece[] = [];
  for (const cabinet of survey.cabinets) {
    if (!isRenewed(cabinet)) continue;
    const { species, finish } = chosenIn(choices, cabinet.zone);
    const toe = cabinet.toe;
    const shared = { zone: cabinet.zone, cabinet: cabinet.id, species, finish };
    for (const side of ['left', 'right'] as const) {
      if (!cabinet[side].exposed) continue;
      panels.push({
        mark: `${cabinet.id}-E${side === 'left' ? 'L' : 'R'}`,
        kind: 'end',
        width: cabinet.depth,
        height: sixtyfourths(cabinet.height + (toe?.height ?? 0)),
        ...(toe ? { notch: { width: toe.depth, height: toe.height } } : {}),
        ...shared,
      });
    }
    if (cabinet.backExposed)
      panels.push({
        mark: `${cabinet.id}-BK`,
        kind: 'islandWrap',
        width: cabinet.width,
        height: sixtyfourths(cabinet.height + (toe?.height ?? 0)),
        ...shared,
      });
    if (toe)
      panels.push({
        mark: `${cabinet.id}-T`,
        kind: 'toe',
        width: cabinet.width,
        height: toe.height,
        ...shared,
      });
  }
  return panels;
}

/** New drawer boxes and pull-outs (B1 to B4). */
export function drawerBoxes(plans: readonly FrontPlan[], edition: Edition, choices: Choices): DrawerBox[] {
  return plans.flatMap((plan): DrawerBox[] => {
    const { cabinet, placed, mark } = plan;
    const option = find(edition.drawerBoxes, chosen(choices, 'drawerBox', cabinet.zone));
    const storage = find(edition.storage, choices.inside[mark] ?? 'none');
    const build = (kind: DrawerBox['kind'], n: number, slideId: string, material: string, loss: number) => {
      const slide = find(edition.slides, slideId);
      if (!slide) return [];
      const free = cabinet.depth - cabinet.frame.thickness - edition.shop.slideRearAllowance;
      const even = Math.floor(free / 128) * 2;
      const length = Math.min(28, even);
      if (length < 12) return [];
      return [
        {
          mark: `${mark}-${kind === 'pullOut' ? 'P' : 'D'}${n}`,
          opening: mark,
          zone: cabinet.zone,
          kind,
          material,
          width: sixtyfourths(Math.floor((placed.width - loss - 2 * slide.space) / 4) * 4),
          height: sixtyfourths(
            Math.floor(
              (Math.min(placed.height - plan.filler, kind === 'pullOut' ? 320 : 1e9) -
                edition.shop.boxHeightClearance) /
                4,
            ) * 4,
          ),
          length: sixtyfourths(length * 64),
          slide: slide.id,
        } satisfies DrawerBox,
      ];
    };
    const boxes: DrawerBox[] = [];
    if (placed.opening.kind === 'drawer' && option && option.material !== 'none')
      boxes.push(...build('drawerBox', 1, option.slide, option.material, 0));
    if (storage?.kind === 'pullOut' && storage.slide) {
      const loss = 2 * (plan.hingeSet?.intrusion ?? 0);
      for (let n = 1; n <= storage.perOpening; n++)
        boxes.push(...build('pullOut', n, storage.slide, 'melamine', loss));
    }
    return boxes;
  });
}
