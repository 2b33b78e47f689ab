'use client';

import type { KeyboardEvent, ReactNode } from 'react';
import { find } from '@/lib/engine/choices';
import type { Edition } from '@/lib/engine/edition-types';
import type { ApplianceKind, ZoneOrKitchen } from '@/lib/engine/types';
import type { Part } from './decisions';
import type { Elevation, ElevationFront, ElevationSolid, Face } from './elevation';
import { finishColour } from './option-picture';

export type PickPart = (part: Part, zone: ZoneOrKitchen, mark: string | null) => void;

/** Margin of the drawing round the wall, 1/64 inch. */
const MARGIN = 3 * 64;

interface Inked {
  readonly part: Part;
  readonly scope: ZoneOrKitchen;
  /** The opening at hand, when the inside is chosen. */
  readonly opening: string | null;
}

/**
 * One wall as it is seen from the room, drawn to scale: kept things in ink, renewed ones in their material or, as
 * navigation, with the part at hand inked in the contractor's colour.
 */
export function WallDrawing({
  elevation,
  edition,
  material,
  inked,
  onPart,
  className,
}: {
  elevation: Elevation;
  edition: Edition;
  /** Fill what is renewed with its finish. */
  material: boolean;
  inked: Inked | null;
  onPart?: PickPart;
  className?: string;
}) {
  const { width, height, wall } = elevation;
  const flip = (face: Face) => ({
    x: face.x,
    y: height - face.y - face.height,
    width: face.width,
    height: face.height,
  });
  const line = material ? 48 : 90;
  const colourOf = (stuff: { species: string; finish: string } | null) =>
    material && stuff ? finishColour(edition, stuff.species, stuff.finish) : 'var(--panel)';

  return (
    <svg
      viewBox={`${-MARGIN} ${-MARGIN} ${width + 2 * MARGIN} ${height + 2 * MARGIN}`}
      preserveAspectRatio="xMidYMid meet"
      className={className}
      fill="none"
      stroke="currentColor"
      strokeWidth={line}
      strokeLinejoin="round"
      {...(onPart ? {} : { 'aria-hidden': true })}
    >
      <path d={`M0 0 H${width} M${-MARGIN} ${height} H${width + MARGIN}`} />
      {elevation.solids.map((one) => (
        <SolidDrawing
          key={one.solid.mark}
          one={one}
          box={flip(one)}
          fill={one.solid.role === 'counter' ? 'var(--panel)' : colourOf(one.solid.material)}
        />
      ))}
      {elevation.fronts.map((one) => (
        <FrontDrawing
          key={one.front.mark}
          one={one}
          box={flip(one)}
          edition={edition}
          fill={colourOf(one.front.material)}
        />
      ))}
      {elevation.sweeps.map(({ sweep, x, width: length, y }) => {
        const profile = find([...edition.crowns, ...edition.bases, ...edition.lightRails], sweep.profile);
        const tall = profile?.height ?? 0;
        return (
          <rect
            key={`${sweep.mark} ${x}`}
            x={x}
            y={height - y - tall}
            width={length}
            height={tall}
            fill={colourOf(sweep.material)}
          />
        );
      })}
      {inked && <Ink elevation={elevation} inked={inked} edition={edition} />}
      {onPart && <Targets elevation={elevation} edition={edition} onPart={onPart} wallName={wall.name} />}
    </svg>
  );
}

interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

function SolidDrawing({ one, box, fill }: { one: ElevationSolid; box: Box; fill: string }) {
  const { role, appliance } = one.solid;
  const { x, y, width, height } = box;
  if (role === 'window') {
    return (
      <g>
        <rect {...box} fill="var(--panel)" />
        <path d={`M${x + width / 2} ${y} V${y + height} M${x} ${y + height / 2} H${x + width}`} />
      </g>
    );
  }
  if (role === 'appliance' && appliance) return <ApplianceDrawing kind={appliance} box={box} />;
  if (role === 'splash') return null;
  return <rect {...box} fill={fill} />;
}

function ApplianceDrawing({ kind, box }: { kind: ApplianceKind; box: Box }) {
  const { x, y, width: w, height: h } = box;
  const inside: Readonly<Partial<Record<ApplianceKind, ReactNode>>> = {
    range: (
      <path
        d={`M${x} ${y + h * 0.16} H${x + w} M${x + w * 0.12} ${y + h * 0.3} H${x + w * 0.88} V${y + h * 0.72} H${x + w * 0.12} Z`}
      />
    ),
    refrigerator: (
      <path
        d={`M${x} ${y + h * 0.3} H${x + w} M${x + w * 0.88} ${y + h * 0.1} V${y + h * 0.24} M${x + w * 0.88} ${y + h * 0.36} V${y + h * 0.62}`}
      />
    ),
    dishwasher: (
      <path d={`M${x} ${y + h * 0.16} H${x + w} M${x + w * 0.25} ${y + h * 0.24} H${x + w * 0.75}`} />
    ),
    hood: <path d={`M${x + w * 0.06} ${y + h} L${x} ${y + h * 0.7} H${x + w}`} />,
    microwave: (
      <path
        d={`M${x + w * 0.08} ${y + h * 0.18} H${x + w * 0.7} V${y + h * 0.82} H${x + w * 0.08} Z M${x + w * 0.78} ${y} V${y + h}`}
      />
    ),
    wallOven: (
      <path d={`M${x + w * 0.1} ${y + h * 0.3} H${x + w * 0.9} V${y + h * 0.85} H${x + w * 0.1} Z`} />
    ),
  };
  if (kind === 'sink') {
    // The basin is hidden behind its front; what is seen is the tap.
    const cx = x + w / 2;
    return (
      <path d={`M${cx} ${y} V${y - 480} C${cx} ${y - 860} ${cx + 520} ${y - 860} ${cx + 520} ${y - 520}`} />
    );
  }
  if (kind === 'cooktop') return <path d={`M${x} ${y} H${x + w}`} />;
  return (
    <g>
      <rect {...box} fill="var(--panel)" />
      {inside[kind]}
    </g>
  );
}

function FrontDrawing({
  one,
  box,
  edition,
  fill,
}: {
  one: ElevationFront;
  box: Box;
  edition: Edition;
  fill: string;
}) {
  const { front } = one;
  const style = find(edition.styles, front.style);
  const { x, y, width, height } = box;
  const stile = style?.stile ?? 0;
  const rail = front.kind === 'drawerFront' ? (style?.drawerRail ?? 0) : (style?.rail ?? 0);
  const framed =
    style?.construction === 'fivePiece' &&
    front.build === 'fivePiece' &&
    width > 2 * stile &&
    height > 2 * rail;
  const boards =
    style?.construction === 'plank' && front.kind === 'door' && style.plankWidth
      ? Math.round(width / style.plankWidth)
      : 1;
  const { pull } = front;
  return (
    <g>
      <rect {...box} fill={fill} />
      {framed && (
        <rect
          x={x + stile}
          y={y + rail}
          width={width - 2 * stile}
          height={height - 2 * rail}
          strokeOpacity="0.75"
          strokeWidth="32"
        />
      )}
      {boards > 1 && (
        <path
          d={Array.from(
            { length: boards - 1 },
            (_, n) => `M${x + ((n + 1) * width) / boards} ${y} v${height}`,
          ).join(' ')}
          strokeWidth="28"
        />
      )}
      {pull && <circle cx={x + pull.x} cy={y + height - pull.y} r="48" fill="currentColor" stroke="none" />}
    </g>
  );
}

const inScope = (zone: ZoneOrKitchen | null, scope: ZoneOrKitchen): boolean =>
  scope === 'kitchen' || zone === scope;

/** What the part at hand covers, over everything else. */
function Ink({ elevation, inked, edition }: { elevation: Elevation; inked: Inked; edition: Edition }) {
  const { height } = elevation;
  const faces: Box[] = facesOf(elevation, inked.part, edition)
    .filter((face) => inScope(face.zone, inked.scope))
    .filter((face) => inked.part !== 'inside' || !inked.opening || face.mark?.startsWith(inked.opening))
    .map((face) => ({ x: face.x, y: height - face.y - face.height, width: face.width, height: face.height }));
  return (
    <g className="text-brand" stroke="currentColor" fill="currentColor" fillOpacity="0.22" strokeWidth="150">
      {faces.map((face) => (
        <rect key={`${face.x} ${face.y}`} {...face} />
      ))}
    </g>
  );
}

interface PartFace extends Box {
  readonly zone: ZoneOrKitchen | null;
  readonly mark: string | null;
}

/** The rectangles of a part; y from the floor. */
function facesOf(elevation: Elevation, part: Part, edition: Edition): PartFace[] {
  const fronts = (kinds: readonly string[]) =>
    elevation.fronts
      .filter((one) => kinds.includes(one.front.kind))
      .map((one) => ({ ...one, zone: one.front.zone, mark: one.front.mark }));
  const solids = (...roles: readonly string[]) =>
    elevation.solids
      .filter((one) => roles.includes(one.solid.role))
      .map((one) => ({ ...one, zone: one.solid.zone, mark: one.solid.mark }));
  const sweeps = (kind: string, profiles: Edition['crowns']) =>
    elevation.sweeps
      .filter((one) => one.sweep.kind === kind)
      .map((one) => ({
        x: one.x,
        y: one.y,
        width: one.width,
        height: find(profiles, one.sweep.profile)?.height ?? 0,
        zone: one.sweep.zone,
        mark: one.sweep.mark,
      }));
  switch (part) {
    case 'doors':
      return fronts(['door', 'drawerFront', 'falseFront', 'appliancePanel']);
    case 'drawers':
      return fronts(['drawerFront']);
    case 'inside':
      return fronts(['door', 'drawerFront']);
    case 'pulls':
      return elevation.fronts.flatMap(({ front, x, y }) =>
        front.pull
          ? [
              {
                x: x + front.pull.x - 96,
                y: y + front.pull.y - 96,
                width: 192,
                height: 192,
                zone: front.zone,
                mark: front.mark,
              },
            ]
          : [],
      );
    case 'crown':
      return orAlong(sweeps('crown', edition.crowns), elevation, 'above');
    case 'lightRail':
      return orAlong(sweeps('lightRail', edition.lightRails), elevation, 'below');
    case 'base':
      return [...sweeps('base', edition.bases), ...solids('toe')];
    case 'ends':
      return solids('endPanel');
    case 'counter':
      return solids('counter');
  }
}

/** Where a moulding would run that is not there yet: along the wall cabinets. */
function orAlong(found: PartFace[], elevation: Elevation, side: 'above' | 'below'): PartFace[] {
  if (found.length > 0) return found;
  return elevation.solids
    .filter((one) => one.solid.role === 'box' && one.solid.zone === 'wall')
    .map((one) => ({
      x: one.x,
      y: side === 'above' ? one.y + one.height - 64 : one.y - 64,
      width: one.width,
      height: 128,
      zone: one.solid.zone,
      mark: one.solid.mark,
    }));
}

/** Parts from the back to the front, so that a small one is not under a large one. */
const TARGETS: readonly { part: Part; name: string; grow: number }[] = [
  { part: 'doors', name: 'Doors', grow: 0 },
  { part: 'counter', name: 'Counter', grow: 220 },
  { part: 'base', name: 'Base moulding', grow: 160 },
  { part: 'crown', name: 'Crown', grow: 260 },
];

/** The smallest rectangle of the drawing that holds all faces, grown upwards and downwards. */
function around(faces: readonly Box[], wallHeight: number, grow: number): Box {
  const x = Math.min(...faces.map((face) => face.x));
  const y = Math.min(...faces.map((face) => face.y));
  const right = Math.max(...faces.map((face) => face.x + face.width));
  const top = Math.max(...faces.map((face) => face.y + face.height));
  return { x, y: wallHeight - top - grow, width: right - x, height: top - y + 2 * grow };
}

/** The places to press, larger than what is drawn; one for each part of each zone, with the gaps between. */
function Targets({
  elevation,
  edition,
  onPart,
  wallName,
}: {
  elevation: Elevation;
  edition: Edition;
  onPart: PickPart;
  wallName: string;
}) {
  return (
    <>
      {TARGETS.flatMap(({ part, name, grow }) => {
        const faces = facesOf(elevation, part, edition);
        const zones = [...new Set(faces.map((face) => face.zone ?? 'kitchen'))];
        return zones.map((zone) => {
          const own = faces.filter((face) => (face.zone ?? 'kitchen') === zone);
          const label = `${name}${zone === 'kitchen' ? '' : `, ${ZONE_WORDS[zone]}`}, ${wallName}`;
          return (
            <g
              key={`${part} ${zone}`}
              role="button"
              tabIndex={0}
              aria-label={label}
              className="cursor-pointer outline-offset-2"
              onClick={(event) => {
                const mark = event.target instanceof Element ? event.target.getAttribute('data-mark') : null;
                onPart(part, zone, mark);
              }}
              onKeyDown={(event: KeyboardEvent) => {
                if (event.key !== 'Enter' && event.key !== ' ') return;
                event.preventDefault();
                onPart(part, zone, null);
              }}
            >
              <rect {...around(own, elevation.height, grow)} fill="transparent" stroke="none" />
              {own.map((face) => (
                <rect
                  key={`${face.mark} ${face.x}`}
                  data-mark={face.mark ?? undefined}
                  {...around([face], elevation.height, grow)}
                  fill="transparent"
                  stroke="none"
                />
              ))}
            </g>
          );
        });
      })}
    </>
  );
}

const ZONE_WORDS: Readonly<Record<ZoneOrKitchen, string>> = {
  kitchen: 'whole kitchen',
  wall: 'wall cabinets',
  base: 'base cabinets',
  island: 'island',
  tall: 'tall cabinets',
};
