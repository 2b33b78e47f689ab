import { Matrix4, Vector3 } from 'three';
import type { PlanPoint, Point3, Solid } from '@/lib/engine/types';

const INCH = 0.0254;

/** Metres of a length in 64ths. The scene is in metres, y up; plan north is −z. */
export const metres = (length: number): number => (length / 64) * INCH;
export const inchesToMetres = (length: number): number => length * INCH;

export const toScene = (point: Point3): Vector3 =>
  new Vector3(metres(point.x), metres(point.z), -metres(point.y));
export const planToScene = (point: PlanPoint, z: number): Vector3 =>
  new Vector3(metres(point.x), metres(z), -metres(point.y));

/** Directions of a solid's front face: to the right as seen from the front, up, and out of it. */
export function axesOf(facing: Solid['facing']): { right: Vector3; up: Vector3; out: Vector3 } {
  const out = new Vector3(facing.x, 0, -facing.y);
  return { right: new Vector3(-facing.y, 0, -facing.x), up: new Vector3(0, 1, 0), out };
}

/** Places a unit box (−½ to ½ on every axis) where a solid stands. */
export function boxMatrix(solid: Solid): Matrix4 {
  const { right, up, out } = axesOf(solid.facing);
  const [w, h, d] = [metres(solid.width), metres(solid.height), metres(solid.depth)];
  const centre = toScene(solid.at)
    .addScaledVector(right, w / 2)
    .addScaledVector(up, h / 2)
    .addScaledVector(out, -d / 2);
  return new Matrix4()
    .makeBasis(right.multiplyScalar(w), up.multiplyScalar(h), out.multiplyScalar(d))
    .setPosition(centre);
}

/**
 * Places a front's template: its x and y run over a unit square, z from the back face outwards in metres. The solid's
 * `at` lies in its front face.
 */
export function frontMatrix(front: Solid): Matrix4 {
  const { right, up, out } = axesOf(front.facing);
  const [w, h, d] = [metres(front.width), metres(front.height), metres(front.depth)];
  const centre = toScene(front.at)
    .addScaledVector(right, w / 2)
    .addScaledVector(up, h / 2)
    .addScaledVector(out, -d);
  return new Matrix4().makeBasis(right.multiplyScalar(w), up.multiplyScalar(h), out).setPosition(centre);
}
