import {
  BoxGeometry,
  BufferGeometry,
  Color,
  DoubleSide,
  EdgesGeometry,
  Float32BufferAttribute,
  FrontSide,
  InstancedMesh,
  type Matrix4,
  Mesh,
  MeshBasicMaterial,
  Shape,
  ShapeGeometry,
  Vector2,
  Vector3,
} from 'three';
import { LineMaterial } from 'three/examples/jsm/lines/LineMaterial.js';
import { LineSegments2 } from 'three/examples/jsm/lines/LineSegments2.js';
import { LineSegmentsGeometry } from 'three/examples/jsm/lines/LineSegmentsGeometry.js';
import type { Massing, MassingSolid, PlanPoint } from '@/lib/engine/types';
import { axesOf, boxMatrix, inchesToMetres, metres, planToScene, toScene } from './space';

/** The colours of what is only drawn, as the page has them now. */
export interface Ink {
  readonly ground: string;
  readonly field: string;
  readonly line: string;
  readonly quiet: string;
}

/** Pushed back a little, so that lines on an edge are never half hidden by the face they bound. */
const flat = (
  colour: Color | string,
  side: typeof FrontSide | typeof DoubleSide = FrontSide,
): MeshBasicMaterial =>
  new MeshBasicMaterial({
    color: colour,
    side,
    toneMapped: false,
    polygonOffset: true,
    polygonOffsetFactor: 1.5,
    polygonOffsetUnits: 2,
  });

const mix = (a: string, b: string, share: number): Color => new Color(a).lerp(new Color(b), share);

/** Faces get one of three even tones by where they look, as a drawing is washed. */
function washedBox(ink: Ink): BoxGeometry {
  const box = new BoxGeometry();
  const tones = [
    mix(ink.field, ink.line, 0.07),
    mix(ink.field, ink.line, 0.07),
    mix(ink.field, ink.ground, 0.2),
    mix(ink.field, ink.line, 0.16),
    new Color(ink.field),
    new Color(ink.field),
  ];
  const colours: number[] = [];
  for (const tone of tones) for (let corner = 0; corner < 4; corner++) colours.push(tone.r, tone.g, tone.b);
  box.setAttribute('color', new Float32BufferAttribute(colours, 3));
  return box;
}

const isOpening = (solid: MassingSolid) => solid.role === 'window' || solid.role === 'doorway';

/** Collects line segments; drawn as one object of even width at every size. */
class Lines {
  readonly points: number[] = [];

  add(a: Vector3, b: Vector3): void {
    this.points.push(a.x, a.y, a.z, b.x, b.y, b.z);
  }

  edges(geometry: BufferGeometry, matrix: Matrix4): void {
    const edges = new EdgesGeometry(geometry, 20);
    const place = edges.getAttribute('position');
    for (let i = 0; i + 1 < place.count; i += 2)
      this.add(
        new Vector3().fromBufferAttribute(place, i).applyMatrix4(matrix),
        new Vector3().fromBufferAttribute(place, i + 1).applyMatrix4(matrix),
      );
    edges.dispose();
  }

  /** A polyline on a solid's face; x and y in inches from its lower left corner. */
  onFace(solid: MassingSolid, points: readonly (readonly [number, number])[], proud = 0.05): void {
    const { right, up, out } = axesOf(solid.facing);
    const place = (x: number, y: number) =>
      toScene(solid.at)
        .addScaledVector(right, inchesToMetres(x))
        .addScaledVector(up, inchesToMetres(y))
        .addScaledVector(out, inchesToMetres(proud));
    for (let i = 0; i + 1 < points.length; i++) {
      const a = points[i];
      const b = points[i + 1];
      if (a && b) this.add(place(a[0], a[1]), place(b[0], b[1]));
    }
  }

  object(width: number, colour: string): LineSegments2 {
    const geometry = new LineSegmentsGeometry();
    geometry.setPositions(this.points);
    const material = new LineMaterial({ color: new Color(colour).getHex(), linewidth: width });
    material.toneMapped = false;
    return new LineSegments2(geometry, material);
  }
}

const circle = (x: number, y: number, r: number): [number, number][] =>
  Array.from({ length: 13 }, (_, i) => [
    x + r * Math.cos((i * Math.PI) / 6),
    y + r * Math.sin((i * Math.PI) / 6),
  ]);
const frame = (x: number, y: number, w: number, h: number): [number, number][] => [
  [x, y],
  [x + w, y],
  [x + w, y + h],
  [x, y + h],
  [x, y],
];

/** What an appliance's front shows, in a few lines. */
function drawAppliance(solid: MassingSolid, lines: Lines): void {
  const w = solid.width / 64;
  const h = solid.height / 64;
  switch (solid.appliance) {
    case 'refrigerator':
      lines.onFace(solid, [
        [0, h * 0.68],
        [w, h * 0.68],
      ]);
      lines.onFace(solid, [
        [w - 3, h * 0.72],
        [w - 3, h * 0.82],
      ]);
      lines.onFace(solid, [
        [w - 3, h * 0.4],
        [w - 3, h * 0.62],
      ]);
      return;
    case 'range':
      lines.onFace(solid, frame(3, h * 0.28, w - 6, h * 0.42));
      lines.onFace(solid, [
        [3, h * 0.76],
        [w - 3, h * 0.76],
      ]);
      lines.onFace(solid, [
        [0, h * 0.16],
        [w, h * 0.16],
      ]);
      for (const share of [0.14, 0.3, 0.7, 0.86]) lines.onFace(solid, circle(w * share, h * 0.89, 1));
      return;
    case 'dishwasher':
      lines.onFace(solid, [
        [0, h - 5],
        [w, h - 5],
      ]);
      lines.onFace(solid, [
        [w * 0.25, h - 7.5],
        [w * 0.75, h - 7.5],
      ]);
      return;
    case 'wallOven':
    case 'microwave':
      lines.onFace(solid, frame(2, 2, w - 4, h - 4));
      return;
    default:
      return;
  }
}

function drawWindow(solid: MassingSolid, lines: Lines): void {
  const w = solid.width / 64;
  const h = solid.height / 64;
  lines.onFace(solid, frame(0, 0, w, h), 0.3);
  if (solid.role === 'doorway') return;
  lines.onFace(solid, frame(2, 2, w - 4, h - 4), 0.3);
  lines.onFace(
    solid,
    [
      [w / 2, 2],
      [w / 2, h - 2],
    ],
    0.3,
  );
  lines.onFace(
    solid,
    [
      [2, h / 2],
      [w - 2, h / 2],
    ],
    0.3,
  );
  lines.onFace(
    solid,
    [
      [-2, -1.2],
      [w + 2, -1.2],
    ],
    0.6,
  );
}

/** A tap and a basin's rim over a sink. */
function drawSink(solid: MassingSolid, lines: Lines): void {
  const { right, up, out } = axesOf(solid.facing);
  const w = solid.width / 64;
  const d = solid.depth / 64;
  const top = toScene(solid.at).addScaledVector(up, metres(solid.height) + inchesToMetres(1.7));
  const place = (x: number, deep: number, y: number) =>
    top
      .clone()
      .addScaledVector(right, inchesToMetres(x))
      .addScaledVector(out, -inchesToMetres(deep))
      .addScaledVector(up, inchesToMetres(y));
  const rim: (readonly [number, number])[] = [
    [1.5, 3],
    [w - 1.5, 3],
    [w - 1.5, d - 5],
    [1.5, d - 5],
    [1.5, 3],
  ];
  for (let i = 0; i + 1 < rim.length; i++) {
    const a = rim[i];
    const b = rim[i + 1];
    if (a && b) lines.add(place(a[0], a[1], 0), place(b[0], b[1], 0));
  }
  const tap: (readonly [number, number])[] = [
    [d - 3.5, 0],
    [d - 3.5, 8],
    [d - 4.2, 10],
    [d - 6, 11],
    [d - 8, 10.6],
    [d - 9, 9],
    [d - 9.2, 7.4],
  ];
  for (let i = 0; i + 1 < tap.length; i++) {
    const a = tap[i];
    const b = tap[i + 1];
    if (a && b) lines.add(place(w / 2, a[0], a[1]), place(w / 2, b[0], b[1]));
  }
}

/** Walls that look into the room, the floor, and everything that stays: plaster faces bounded by ink. */
export function plasterScene(massing: Massing, ink: Ink): { faces: Mesh[]; lines: LineSegments2 } {
  const lines = new Lines();
  const faces: Mesh[] = [];
  const box = washedBox(ink);

  const solids = massing.solids.filter(
    (solid) => solid.material === null && !isOpening(solid) && solid.appliance !== 'sink',
  );
  const boxes = new InstancedMesh(
    box,
    Object.assign(flat('#ffffff'), { vertexColors: true }),
    Math.max(1, solids.length),
  );
  boxes.count = solids.length;
  solids.forEach((solid, i) => {
    const matrix = boxMatrix(solid);
    boxes.setMatrixAt(i, matrix);
    // Boxes behind renewed frames show no edges of their own.
    if (solid.role !== 'box' || solid.zone === null) lines.edges(box, matrix);
    if (solid.role === 'appliance') drawAppliance(solid, lines);
  });
  boxes.computeBoundingSphere();
  faces.push(boxes);
  for (const solid of massing.solids) {
    if (isOpening(solid)) drawWindow(solid, lines);
    if (solid.appliance === 'sink') drawSink(solid, lines);
  }
  for (const front of massing.fronts) {
    if (front.material !== null) continue;
    const plain = new Mesh(box, boxes.material);
    plain.applyMatrix4(boxMatrix(front));
    faces.push(plain);
    lines.edges(box, boxMatrix(front));
  }

  const shape = new Shape(massing.outline.map((point) => new Vector2(metres(point.x), metres(point.y))));
  const floor = new Mesh(new ShapeGeometry(shape), flat(mix(ink.ground, ink.line, 0.05), DoubleSide));
  floor.rotation.x = -Math.PI / 2;
  faces.push(floor);

  const count = massing.outline.length;
  massing.outline.forEach((from, i) => {
    const to = massing.outline[(i + 1) % count];
    if (!to) return;
    faces.push(wall(from, to, massing.ceiling, ink));
    const corner = (point: PlanPoint, z: number) => planToScene(point, z);
    lines.add(corner(from, 0), corner(to, 0));
    lines.add(corner(from, massing.ceiling), corner(to, massing.ceiling));
    lines.add(corner(from, 0), corner(from, massing.ceiling));
  });
  return { faces, lines: lines.object(1.25, ink.line) };
}

/** One wall, seen only from inside: from outside the room lies open. The outline runs counter-clockwise. */
function wall(from: PlanPoint, to: PlanPoint, ceiling: number, ink: Ink): Mesh {
  const [a, b] = [planToScene(from, 0), planToScene(to, 0)];
  const [c, d] = [planToScene(to, ceiling), planToScene(from, ceiling)];
  const geometry = new BufferGeometry();
  geometry.setAttribute(
    'position',
    new Float32BufferAttribute(
      [a, d, b, b, d, c].flatMap((point) => [point.x, point.y, point.z]),
      3,
    ),
  );
  return new Mesh(geometry, flat(ink.field));
}
