import { BufferGeometry, Float32BufferAttribute, ShapeUtils, Vector2 } from 'three';
import type { ProfilePoint } from '@/lib/engine/edition-types';
import type { PlanPoint } from '@/lib/engine/types';
import { metres } from './space';

interface Flat {
  readonly x: number;
  readonly y: number;
}

const unit = (x: number, y: number): Flat => {
  const length = Math.hypot(x, y) || 1;
  return { x: x / length, y: y / length };
};

/**
 * How far and where a point that lies 1 out of the path goes at each vertex, so that mitres meet: m = (n1 + n2) /
 * (1 + n1·n2), square at free ends. `normals` are those of the segments.
 */
export function mitres(normals: readonly Flat[], closed: boolean): Flat[] {
  const count = closed ? normals.length : normals.length + 1;
  return Array.from({ length: count }, (_, vertex): Flat => {
    const before = closed ? normals[(vertex - 1 + normals.length) % normals.length] : normals[vertex - 1];
    const after = normals[vertex % normals.length];
    if (!before || vertex === normals.length) return before ?? { x: 0, y: 0 };
    if (!after || (vertex === 0 && !closed)) return after ?? before;
    const along = Math.max(1 + before.x * after.x + before.y * after.y, 0.125);
    return { x: (before.x + after.x) / along, y: (before.y + after.y) / along };
  });
}

/**
 * A profile swept along a plan path with mitred corners and capped ends. The moulding lies to the right of the path's
 * direction. `section` goes from the lower back edge round the front to the upper back edge (x out, y up); `z` is the
 * height of its lower back edge. All in 64ths; the answer is in metres.
 */
export function sweep(
  path: readonly PlanPoint[],
  section: readonly ProfilePoint[],
  z: number,
): BufferGeometry {
  const first = path[0];
  const last = path[path.length - 1];
  const closed =
    path.length > 3 && first !== undefined && last !== undefined && first.x === last.x && first.y === last.y;
  const points = (closed ? path.slice(0, -1) : path).map((point) => ({
    x: metres(point.x),
    y: metres(point.y),
  }));
  const profile = section.map((point) => ({ x: metres(point.x), y: metres(point.y) }));
  const base = metres(z);
  const segments = closed ? points.length : points.length - 1;
  const directions = Array.from({ length: segments }, (_, i) => {
    const a = points[i];
    const b = points[(i + 1) % points.length];
    return a && b ? unit(b.x - a.x, b.y - a.y) : { x: 1, y: 0 };
  });
  // To the right of the direction.
  const normals = directions.map((d) => ({ x: d.y, y: -d.x }));
  const corners = mitres(normals, closed);

  const position: number[] = [];
  const normal: number[] = [];
  const grain: number[] = [];
  const local: number[] = [];
  const seed: number[] = [];
  const index: number[] = [];
  const at = (vertex: Flat, mitre: Flat, p: Flat) => ({
    x: vertex.x + mitre.x * p.x,
    y: base + p.y,
    z: -(vertex.y + mitre.y * p.x),
  });

  for (let s = 0; s < segments; s++) {
    const a = points[s];
    const b = points[(s + 1) % points.length];
    const mitreA = corners[s];
    const mitreB = corners[closed ? (s + 1) % points.length : s + 1];
    const out = normals[s];
    const along = directions[s];
    if (!a || !b || !mitreA || !mitreB || !out || !along) continue;
    let reach = 0;
    for (let e = 0; e + 1 < profile.length; e++) {
      const p = profile[e];
      const q = profile[e + 1];
      if (!p || !q) continue;
      const length = Math.hypot(q.x - p.x, q.y - p.y);
      if (length < 1e-6) continue;
      // Outwards of a section that runs from below round the front: to the right of its direction.
      const face = unit(q.y - p.y, -(q.x - p.x));
      const start = position.length / 3;
      for (const [vertex, mitre, point, far] of [
        [a, mitreA, p, reach],
        [b, mitreB, p, reach],
        [b, mitreB, q, reach + length],
        [a, mitreA, q, reach + length],
      ] as const) {
        const place = at(vertex, mitre, point);
        position.push(place.x, place.y, place.z);
        normal.push(out.x * face.x, face.y, -out.y * face.x);
        grain.push(0, 40 + s, 0.86 + 0.14 * Math.max(0, face.x));
        local.push(far, place.x * along.x - place.z * along.y, 0);
        seed.push((s * 1.37) % 10);
      }
      index.push(start, start + 1, start + 2, start, start + 2, start + 3);
      reach += length;
    }
  }
  if (!closed) {
    const faces = ShapeUtils.triangulateShape(
      profile.map((p) => new Vector2(p.x, p.y)),
      [],
    );
    for (const end of [0, 1] as const) {
      const vertex = points[end === 0 ? 0 : points.length - 1];
      const mitre = corners[end === 0 ? 0 : corners.length - 1];
      const along = directions[end === 0 ? 0 : segments - 1];
      if (!vertex || !mitre || !along) continue;
      const sign = end === 0 ? -1 : 1;
      const start = position.length / 3;
      for (const p of profile) {
        const place = at(vertex, mitre, p);
        position.push(place.x, place.y, place.z);
        normal.push(along.x * sign, 0, -along.y * sign);
        grain.push(0, 39, 0.9);
        local.push(p.x, p.y, 0);
        seed.push(3);
      }
      for (const [i = 0, j = 0, k = 0] of faces)
        index.push(...(end === 0 ? [start + i, start + j, start + k] : [start + i, start + k, start + j]));
    }
  }
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new Float32BufferAttribute(position, 3));
  geometry.setAttribute('normal', new Float32BufferAttribute(normal, 3));
  geometry.setAttribute('grain', new Float32BufferAttribute(grain, 3));
  geometry.setAttribute('local', new Float32BufferAttribute(local, 3));
  geometry.setAttribute('seed', new Float32BufferAttribute(seed, 1));
  geometry.setIndex(index);
  return geometry;
}
