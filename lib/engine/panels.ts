import type { Edition, EndTreatment } from './edition-types';
import { endOf, type Face } from './faces';
import { sixtyfourths } from './length';
import type { MadeByZone } from './made';
import type { PanelPiece, Wall, Zone } from './types';

/** A panel before wood and finish are named. */
export type PanelMeasure = Omit<PanelPiece, 'species' | 'finish'>;

/**
 * Equal panels between stiles (P3): as few as keep each within the widest, widths in 64ths, down to 1/16. `null` when
 * the width leaves no room between the outer stiles.
 */
export function panelLayout(
  width: number,
  stile: number,
  rail: number,
  widestPanel: number,
): NonNullable<PanelPiece['layout']> | null {
  if (width - 2 * stile < 64) return null;
  let panels = 1;
  while ((width - (panels + 1) * stile) / panels > widestPanel) panels += 1;
  const panelWidth = Math.floor((width - (panels + 1) * stile) / panels / 4) * 4;
  return {
    panels,
    panelWidth: sixtyfourths(panelWidth),
    stile: sixtyfourths(stile),
    rail: sixtyfourths(rail),
  };
}

function withLayout(ends: EndTreatment, width: number): Pick<PanelPiece, 'layout'> {
  if (ends.kind !== 'panelled') return {};
  const stile = ends.stile ?? sixtyfourths(144);
  const layout = panelLayout(width, stile, ends.rail ?? stile, ends.widestPanel ?? sixtyfourths(24 * 64));
  return layout ? { layout } : {};
}

/** Faces of the renewed base and tall cabinets of one wall that stand side by side, with nothing between. */
function stretches(faces: readonly Face[], wall: Wall, belongs: (face: Face) => boolean): Face[][] {
  const here = faces.filter((face) => face.wall === wall && belongs(face)).sort((a, b) => a.at - b.at);
  const groups: Face[][] = [];
  for (const face of here) {
    const group = groups[groups.length - 1];
    const last = group?.[group.length - 1];
    const joins = last && face.at - endOf(last) <= 16 && last.cabinet.zone === face.cabinet.zone;
    if (group && joins) group.push(face);
    else groups.push([face]);
  }
  return groups;
}

/** Exposed ends, toe skins and the backs of islands (P1 to P3). Depends on ends and base alone. */
export function panelMeasures(
  faces: readonly Face[],
  walls: readonly Wall[],
  made: MadeByZone,
  edition: Edition,
): PanelMeasure[] {
  const panels: PanelMeasure[] = [];
  const thickness = edition.shop.panelThickness;
  for (const face of faces) {
    if (!face.renewed) continue;
    const { cabinet } = face;
    const { ends } = made[cabinet.zone];
    const { toe } = cabinet;
    for (const side of ['left', 'right'] as const) {
      if (face[side].kind !== 'exposed') continue;
      const overhang = cabinet.overhang ?? 0;
      panels.push({
        mark: `${cabinet.id}-E${side === 'left' ? 'L' : 'R'}`,
        kind: 'end',
        zone: cabinet.zone,
        cabinet: cabinet.id,
        width: cabinet.depth,
        height: sixtyfourths(cabinet.height + (toe?.height ?? 0)),
        ...(toe ? { notch: { width: toe.depth, height: toe.height } } : {}),
        ...(overhang > 0 ? { sticks: { count: 2, thickness: sixtyfourths(overhang) } } : {}),
        ...withLayout(ends, cabinet.depth),
      });
    }
  }
  for (const wall of walls) {
    const toes = stretches(
      faces,
      wall,
      (face) => face.renewed && face.cabinet.toe !== undefined && made[face.cabinet.zone].base === null,
    );
    toes.forEach((group, index) => {
      const first = group[0];
      const last = group[group.length - 1];
      const toe = first?.cabinet.toe;
      if (!first || !last || !toe) return;
      panels.push({
        mark: `${wall.id}-T${index + 1}`,
        kind: 'toe',
        zone: first.cabinet.zone,
        cabinet: first.cabinet.id,
        width: sixtyfourths(endOf(last) - first.at),
        height: toe.height,
      });
    });
    const backs = stretches(
      faces,
      wall,
      (face) => face.renewed && face.cabinet.backExposed === true && wall.kind === 'freestanding',
    );
    backs.forEach((group, index) => {
      const first = group[0];
      const last = group[group.length - 1];
      if (!first || !last) return;
      const from =
        first.left.kind === 'innerCorner' ? 0 : first.at - (first.left.kind === 'exposed' ? thickness : 0);
      const to = endOf(last) + (last.right.kind === 'exposed' ? thickness : 0);
      panels.push({
        mark: `${wall.id}-BK${index + 1}`,
        kind: 'islandWrap',
        zone: first.cabinet.zone,
        cabinet: first.cabinet.id,
        width: sixtyfourths(to - from),
        height: sixtyfourths(first.cabinet.height + (first.cabinet.toe?.height ?? 0)),
        ...withLayout(made[first.cabinet.zone].ends, to - from),
      });
    });
  }
  return panels;
}

/** Square 64ths of panels of one sort in a zone. */
export const panelArea = (panels: readonly PanelMeasure[], zone: Zone, toe: boolean): number =>
  panels.reduce(
    (sum, panel) =>
      panel.zone === zone && (panel.kind === 'toe') === toe ? sum + panel.width * panel.height : sum,
    0,
  );
