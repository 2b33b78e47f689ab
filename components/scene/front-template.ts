import { BufferGeometry, Float32BufferAttribute } from 'three';
import type { DoorStyle, ProfilePoint } from '@/lib/engine/edition-types';
import { metres } from './space';

type Vec2 = readonly [number, number];
type Vec3 = readonly [number, number, number];

/** Part numbers; each gets grain of its own. Panels are glued from staves. */
const STILE_LEFT = 0;
const STILE_RIGHT = 1;
const RAIL_BELOW = 2;
const RAIL_ABOVE = 3;
const PANEL = 4;
const PLANK = 10;

const UPRIGHT = 0;
const ACROSS = 1;

/** A corner of a quad: where it is anchored on the unit square, its metric offset from there, its darkness. */
interface Corner {
  readonly anchor: Vec2;
  readonly offset: Vec3;
  readonly light: number;
}

/** One point of a section: how far in from the anchored edge, how high above the back face, how much light it gets. */
interface Step {
  readonly inset: number;
  readonly z: number;
  readonly light: number;
}

/**
 * Builds a front whose members keep their width at every size: each vertex has an anchor on the unit square and a
 * metric offset, which the shader adds after the instance's scale.
 */
class TemplateBuilder {
  private readonly position: number[] = [];
  private readonly offset: number[] = [];
  private readonly normal: number[] = [];
  private readonly grain: number[] = [];
  private readonly index: number[] = [];

  quad(
    corners: readonly [Corner, Corner, Corner, Corner],
    normals: readonly [Vec3, Vec3, Vec3, Vec3],
    along: number,
    part: number,
  ): void {
    const first = this.position.length / 3;
    corners.forEach((corner, i) => {
      this.position.push(corner.anchor[0], corner.anchor[1], 0);
      this.offset.push(...corner.offset);
      this.normal.push(...(normals[i] ?? normals[0]));
      this.grain.push(along, part, corner.light);
    });
    this.index.push(first, first + 1, first + 2, first, first + 2, first + 3);
  }

  /** A flat field at height `z`, inset by `x` and `y` from the unit square's edges. */
  field(
    left: number,
    bottom: number,
    right: number,
    top: number,
    z: number,
    along: number,
    part: number,
    light = 1,
  ): void {
    const up: Vec3 = [0, 0, 1];
    this.quad(
      [
        { anchor: [-0.5, -0.5], offset: [left, bottom, z], light },
        { anchor: [0.5, -0.5], offset: [-right, bottom, z], light },
        { anchor: [0.5, 0.5], offset: [-right, -top, z], light },
        { anchor: [-0.5, 0.5], offset: [left, -top, z], light },
      ],
      [up, up, up, up],
      along,
      part,
    );
  }

  /** A mitred ring that follows a section inwards. */
  ring(
    section: readonly Step[],
    along: { readonly upright: number; readonly across: number },
    parts: readonly [number, number, number, number],
  ): void {
    for (let i = 0; i + 1 < section.length; i++) {
      const a = section[i];
      const b = section[i + 1];
      if (!a || !b) continue;
      const length = Math.hypot(b.inset - a.inset, b.z - a.z);
      if (length < 1e-6) continue;
      const inward = -(b.z - a.z) / length;
      const outward = (b.inset - a.inset) / length;
      const corner = (sx: number, sy: number, step: Step): Corner => ({
        anchor: [sx * 0.5, sy * 0.5],
        offset: [-sx * step.inset, -sy * step.inset, step.z],
        light: step.light,
      });
      const side = (c: readonly [Corner, Corner, Corner, Corner], n: Vec3, direction: number, part: number) =>
        this.quad(c, [n, n, n, n], direction, part);
      side(
        [corner(-1, -1, a), corner(-1, -1, b), corner(-1, 1, b), corner(-1, 1, a)],
        [inward, 0, outward],
        along.upright,
        parts[0],
      );
      side(
        [corner(1, 1, a), corner(1, 1, b), corner(1, -1, b), corner(1, -1, a)],
        [-inward, 0, outward],
        along.upright,
        parts[1],
      );
      side(
        [corner(1, -1, a), corner(1, -1, b), corner(-1, -1, b), corner(-1, -1, a)],
        [0, inward, outward],
        along.across,
        parts[2],
      );
      side(
        [corner(-1, 1, a), corner(-1, 1, b), corner(1, 1, b), corner(1, 1, a)],
        [0, -inward, outward],
        along.across,
        parts[3],
      );
    }
  }

  build(): BufferGeometry {
    const geometry = new BufferGeometry();
    geometry.setAttribute('position', new Float32BufferAttribute(this.position, 3));
    geometry.setAttribute('metricOffset', new Float32BufferAttribute(this.offset, 3));
    geometry.setAttribute('normal', new Float32BufferAttribute(this.normal, 3));
    geometry.setAttribute('grain', new Float32BufferAttribute(this.grain, 3));
    geometry.setIndex(this.index);
    return geometry;
  }
}

const FRAME_PARTS = [STILE_LEFT, STILE_RIGHT, RAIL_BELOW, RAIL_ABOVE] as const;
const PANEL_PARTS = [PANEL, PANEL, PANEL, PANEL] as const;
const FRAME_GRAIN = { upright: UPRIGHT, across: ACROSS };

/** How a front is built; a template serves all fronts of one key. */
export interface FrontBuild {
  readonly style: DoorStyle;
  readonly build: 'fivePiece' | 'slab';
  readonly kind: 'door' | 'drawer';
  readonly glass: boolean;
  /** Boards across, for plank doors. */
  readonly boards: number;
}

export const buildKey = ({ style, build, kind, glass, boards }: FrontBuild): string =>
  [style.id, build, kind, glass ? 'glass' : 'panel', boards].join(' ');

/** Boards that a plank front of so many 64ths is made of. */
export const boardsAcross = (style: DoorStyle, width: number): number =>
  style.construction === 'plank'
    ? Math.max(2, Math.min(9, Math.round(width / (style.plankWidth ?? 256))))
    : 1;

const shade = (point: ProfilePoint, top: number): number =>
  1 - 0.45 * Math.max(0, Math.min(1, (top - point.y) / 24));

/** The template of a front, from the style's own sections (64ths). */
export function frontTemplate(build: FrontBuild): BufferGeometry {
  const { style } = build;
  const builder = new TemplateBuilder();
  const top = style.thickness;
  const along = build.kind === 'drawer' ? ACROSS : UPRIGHT;
  const whole = { upright: along, across: along };

  // A dark gap round the front, on the frame behind it, so that the reveal reads at a distance.
  builder.ring(
    [
      { inset: metres(-26), z: 0.0006, light: 1 },
      { inset: metres(-9), z: 0.0006, light: 0.42 },
      { inset: 0, z: 0.0006, light: 0.12 },
    ],
    FRAME_GRAIN,
    [30, 31, 32, 33],
  );

  const outer: Step[] = style.outerEdge.map((point) => ({
    inset: metres(point.x),
    z: metres(point.y),
    light: point.y < top / 2 ? 0.5 : 0.92,
  }));
  const edge = metres(Math.max(0, ...style.outerEdge.map((point) => point.x)));
  const isPlank = style.construction === 'plank' && build.boards > 1;
  builder.ring(
    outer,
    build.build === 'fivePiece' ? FRAME_GRAIN : whole,
    build.build === 'fivePiece' ? FRAME_PARTS : PANEL_PARTS,
  );

  if (build.build === 'slab' && !isPlank) {
    builder.field(edge, edge, edge, edge, metres(top), along, PANEL);
    return builder.build();
  }
  if (isPlank) {
    planks(builder, build.boards, edge, metres(top));
    return builder.build();
  }

  const rail = build.kind === 'drawer' ? style.drawerRail : style.rail;
  const stile = build.kind === 'drawer' ? Math.min(style.stile, style.drawerRail * 1.25) : style.stile;
  const s = metres(stile);
  const r = metres(rail);
  const z = metres(top);
  // The sticking is cut out of the frame's face.
  const lip = metres(Math.max(0, ...style.innerEdge.map((point) => point.x)));
  const fs = s - lip;
  const fr = r - lip;
  const f: Vec3 = [0, 0, 1];
  const corner = (ax: number, ay: number, x: number, y: number): Corner => ({
    anchor: [ax, ay],
    offset: [x, y, z],
    light: 1,
  });
  const flat: readonly [Vec3, Vec3, Vec3, Vec3] = [f, f, f, f];
  builder.quad(
    [
      corner(-0.5, -0.5, edge, edge),
      corner(-0.5, -0.5, fs, edge),
      corner(-0.5, 0.5, fs, -edge),
      corner(-0.5, 0.5, edge, -edge),
    ],
    flat,
    UPRIGHT,
    STILE_LEFT,
  );
  builder.quad(
    [
      corner(0.5, -0.5, -fs, edge),
      corner(0.5, -0.5, -edge, edge),
      corner(0.5, 0.5, -edge, -edge),
      corner(0.5, 0.5, -fs, -edge),
    ],
    flat,
    UPRIGHT,
    STILE_RIGHT,
  );
  builder.quad(
    [
      corner(-0.5, -0.5, fs, edge),
      corner(0.5, -0.5, -fs, edge),
      corner(0.5, -0.5, -fs, fr),
      corner(-0.5, -0.5, fs, fr),
    ],
    flat,
    ACROSS,
    RAIL_BELOW,
  );
  builder.quad(
    [
      corner(-0.5, 0.5, fs, -fr),
      corner(0.5, 0.5, -fs, -fr),
      corner(0.5, 0.5, -fs, -edge),
      corner(-0.5, 0.5, fs, -edge),
    ],
    flat,
    ACROSS,
    RAIL_ABOVE,
  );

  innerRings(builder, build, s, r, along);
  return builder.build();
}

/** Sticking and panel. Stile and rail may differ in width, so rings run between two insets. */
function innerRings(builder: TemplateBuilder, build: FrontBuild, s: number, r: number, along: number): void {
  const { style } = build;
  const top = style.thickness;
  // Inner edge: x from the frame's inner edge outwards, y above the back. From the face down to the panel.
  const fromFace = [...style.innerEdge]
    .reverse()
    .map((point) => ({ inset: -metres(point.x), z: metres(point.y), light: shade(point, top) }));
  const ring = (
    section: readonly Step[],
    grain: typeof FRAME_GRAIN,
    parts: readonly [number, number, number, number],
  ) => builderRing(builder, section, s, r, grain, parts);
  ring(fromFace, FRAME_GRAIN, FRAME_PARTS);
  if (build.glass) {
    innerField(builder, s, r, 0, metres(top) * 0.3, along, 0.32);
    return;
  }
  const panel: Step[] = style.panelProfile.map((point, index) => ({
    inset: metres(point.x),
    z: metres(point.y),
    light: index === 0 ? 0.5 : 0.97,
  }));
  const first = panel[0];
  if (first)
    ring([{ ...first, inset: 0, light: 0.42 }, ...panel], { upright: along, across: along }, PANEL_PARTS);
  const last = panel[panel.length - 1];
  innerField(builder, s, r, last?.inset ?? 0, last?.z ?? metres(style.panelThickness), along, 1);
}

function innerField(
  builder: TemplateBuilder,
  s: number,
  r: number,
  inset: number,
  z: number,
  along: number,
  light: number,
): void {
  builder.field(s + inset, r + inset, s + inset, r + inset, z, along, PANEL, light);
}

/** A ring whose insets count from the frame's inner edge: `s` in from the sides, `r` from below and above. */
function builderRing(
  builder: TemplateBuilder,
  section: readonly Step[],
  s: number,
  r: number,
  grain: typeof FRAME_GRAIN,
  parts: readonly [number, number, number, number],
): void {
  for (let i = 0; i + 1 < section.length; i++) {
    const a = section[i];
    const b = section[i + 1];
    if (!a || !b) continue;
    const length = Math.hypot(b.inset - a.inset, b.z - a.z);
    if (length < 1e-6) continue;
    const inward = -(b.z - a.z) / length;
    const outward = (b.inset - a.inset) / length;
    const corner = (sx: number, sy: number, step: Step): Corner => ({
      anchor: [sx * 0.5, sy * 0.5],
      offset: [-sx * (s + step.inset), -sy * (r + step.inset), step.z],
      light: step.light,
    });
    const quad = (c: readonly [Corner, Corner, Corner, Corner], n: Vec3, direction: number, part: number) =>
      builder.quad(c, [n, n, n, n], direction, part);
    quad(
      [corner(-1, -1, a), corner(-1, -1, b), corner(-1, 1, b), corner(-1, 1, a)],
      [inward, 0, outward],
      grain.upright,
      parts[0],
    );
    quad(
      [corner(1, 1, a), corner(1, 1, b), corner(1, -1, b), corner(1, -1, a)],
      [-inward, 0, outward],
      grain.upright,
      parts[1],
    );
    quad(
      [corner(1, -1, a), corner(1, -1, b), corner(-1, -1, b), corner(-1, -1, a)],
      [0, inward, outward],
      grain.across,
      parts[2],
    );
    quad(
      [corner(-1, 1, a), corner(-1, 1, b), corner(1, 1, b), corner(1, 1, a)],
      [0, -inward, outward],
      grain.across,
      parts[3],
    );
  }
}

/** Upright boards with a V-groove between them. */
function planks(builder: TemplateBuilder, boards: number, edge: number, z: number): void {
  const groove = 0.0032;
  const depth = 0.0034;
  const up: Vec3 = [0, 0, 1];
  const slope = Math.SQRT1_2;
  for (let k = 0; k < boards; k++) {
    const from = -0.5 + k / boards;
    const to = -0.5 + (k + 1) / boards;
    const left = k === 0 ? edge : groove;
    const right = k === boards - 1 ? edge : groove;
    const at = (ax: number, ay: number, x: number, height: number, light: number): Corner => ({
      anchor: [ax, ay],
      offset: [x, ay < 0 ? edge : -edge, height],
      light,
    });
    builder.quad(
      [
        at(from, -0.5, left, z, 1),
        at(to, -0.5, -right, z, 1),
        at(to, 0.5, -right, z, 1),
        at(from, 0.5, left, z, 1),
      ],
      [up, up, up, up],
      UPRIGHT,
      PLANK + k,
    );
    if (k === boards - 1) continue;
    const falling: Vec3 = [slope, 0, slope];
    const rising: Vec3 = [-slope, 0, slope];
    builder.quad(
      [
        at(to, -0.5, -groove, z, 1),
        at(to, -0.5, 0, z - depth, 0.3),
        at(to, 0.5, 0, z - depth, 0.3),
        at(to, 0.5, -groove, z, 1),
      ],
      [falling, falling, falling, falling],
      UPRIGHT,
      PLANK + k,
    );
    builder.quad(
      [
        at(to, -0.5, 0, z - depth, 0.3),
        at(to, -0.5, groove, z, 1),
        at(to, 0.5, groove, z, 1),
        at(to, 0.5, 0, z - depth, 0.3),
      ],
      [rising, rising, rising, rising],
      UPRIGHT,
      PLANK + k + 1,
    );
  }
}

/** A unit box for frame members and panels; grain runs up it (0) or across it (1). */
export function memberTemplate(along: 0 | 1): BufferGeometry {
  const position: number[] = [];
  const normal: number[] = [];
  const grain: number[] = [];
  const index: number[] = [];
  const faces: readonly (readonly [Vec3, Vec3, Vec3])[] = [
    [
      [1, 0, 0],
      [0, 0, -1],
      [0, 1, 0],
    ],
    [
      [-1, 0, 0],
      [0, 0, 1],
      [0, 1, 0],
    ],
    [
      [0, 1, 0],
      [1, 0, 0],
      [0, 0, -1],
    ],
    [
      [0, -1, 0],
      [1, 0, 0],
      [0, 0, 1],
    ],
    [
      [0, 0, 1],
      [1, 0, 0],
      [0, 1, 0],
    ],
    [
      [0, 0, -1],
      [-1, 0, 0],
      [0, 1, 0],
    ],
  ];
  faces.forEach(([n, u, v], face) => {
    const first = position.length / 3;
    for (const [a, b] of [
      [-1, -1],
      [1, -1],
      [1, 1],
      [-1, 1],
    ] as const) {
      for (let axis = 0; axis < 3; axis++)
        position.push(((n[axis] ?? 0) + a * (u[axis] ?? 0) + b * (v[axis] ?? 0)) / 2);
      normal.push(...n);
      grain.push(along, 20 + face, 1);
    }
    index.push(first, first + 1, first + 2, first, first + 2, first + 3);
  });
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new Float32BufferAttribute(position, 3));
  geometry.setAttribute('metricOffset', new Float32BufferAttribute(new Float32Array(position.length), 3));
  geometry.setAttribute('normal', new Float32BufferAttribute(normal, 3));
  geometry.setAttribute('grain', new Float32BufferAttribute(grain, 3));
  geometry.setIndex(index);
  return geometry;
}
