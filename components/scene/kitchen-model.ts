import {
  BackSide,
  BoxGeometry,
  Color,
  Group,
  InstancedMesh,
  Matrix4,
  Mesh,
  MeshBasicMaterial,
  MeshStandardMaterial,
  PMREMGenerator,
  Scene,
  Vector3,
  type BufferGeometry,
  type Intersection,
  type Material as SurfaceMaterial,
  type Object3D,
  type Texture,
  type WebGLRenderer,
} from 'three';
import { mergeGeometries } from 'three/examples/jsm/utils/BufferGeometryUtils.js';
import type { Edition, MouldingProfile } from '@/lib/engine/edition-types';
import type { Massing, MassingFront, Material } from '@/lib/engine/types';
import { boardsAcross, buildKey, frontTemplate, memberTemplate, type FrontBuild } from './front-template';
import { plasterScene, type Ink } from './plaster';
import { pullGeometry } from './pulls';
import { axesOf, boxMatrix, frontMatrix, inchesToMetres, metres, toScene } from './space';
import { sweep } from './sweep';
import { depthMaterial, woodMaterial } from './wood-material';

/** A soft room of even walls, for what the finishes reflect; linear radiance. */
export function roomEnvironment(renderer: WebGLRenderer): Texture {
  const scene = new Scene();
  const grey = (value: number) =>
    new MeshBasicMaterial({ color: new Color(value, value, value), side: BackSide });
  const walls = [0.95, 0.95, 1.25, 0.62, 0.95, 0.95].map(grey);
  const room = new Mesh(new BoxGeometry(8, 5, 8), walls);
  const windowLight = new Mesh(
    new BoxGeometry(0.05, 1.6, 1.4),
    new MeshBasicMaterial({ color: new Color(2.2, 2.2, 2.2) }),
  );
  windowLight.position.set(-3.9, 0.8, 1);
  scene.add(room, windowLight);
  const generator = new PMREMGenerator(renderer);
  const { texture } = generator.fromScene(scene, 0.03);
  generator.dispose();
  for (const mesh of [room, windowLight]) mesh.geometry.dispose();
  for (const material of [...walls, windowLight.material]) material.dispose();
  return texture;
}

const materialKey = (material: Material): string => `${material.species} ${material.finish}`;

const templates = new Map<string, BufferGeometry>();
const members = new Map<0 | 1, BufferGeometry>();

function templateOf(build: FrontBuild): BufferGeometry {
  const key = buildKey(build);
  const known = templates.get(key) ?? frontTemplate(build);
  templates.set(key, known);
  return known;
}

function memberOf(along: 0 | 1): BufferGeometry {
  const known = members.get(along) ?? memberTemplate(along);
  members.set(along, known);
  return known;
}

/** The surveyed kitchen in three dimensions, built from its massing; nothing here decides a size. */
export class KitchenModel {
  readonly group = new Group();
  private readonly fronts = new Map<Object3D, readonly MassingFront[]>();
  private readonly owned: { dispose(): void }[] = [];
  private readonly depth = depthMaterial();
  private readonly surfaces = new Map<string, MeshStandardMaterial>();

  constructor(
    private readonly massing: Massing,
    private readonly edition: Edition,
    private readonly ink: Ink,
  ) {
    this.addPlaster();
    this.addFronts();
    this.addMembers();
    this.addMouldings();
    this.addPulls();
  }

  /** The front that a ray hit first, if it hit one. */
  frontAt(hits: readonly Intersection[]): MassingFront | null {
    const hit = hits[0];
    if (!hit || hit.instanceId === undefined) return null;
    return this.fronts.get(hit.object)?.[hit.instanceId] ?? null;
  }

  /** Objects of the group that are drawn; each is one call, plus one for its shadow where it throws one. */
  drawCount(): number {
    let count = 0;
    this.group.traverse((object) => {
      if (object instanceof Mesh) count++;
    });
    return count;
  }

  dispose(): void {
    for (const one of this.owned) one.dispose();
    for (const surface of this.surfaces.values()) surface.dispose();
    this.depth.dispose();
    this.group.clear();
  }

  private surface(material: Material): MeshStandardMaterial {
    const key = materialKey(material);
    const known = this.surfaces.get(key) ?? woodMaterial(this.edition, material);
    this.surfaces.set(key, known);
    return known;
  }

  private instances(
    template: BufferGeometry,
    surface: SurfaceMaterial,
    places: readonly Matrix4[],
  ): InstancedMesh {
    const mesh = new InstancedMesh(template, surface, places.length);
    places.forEach((place, i) => mesh.setMatrixAt(i, place));
    mesh.customDepthMaterial = this.depth;
    mesh.castShadow = mesh.receiveShadow = true;
    mesh.computeBoundingSphere();
    this.owned.push(mesh);
    this.group.add(mesh);
    return mesh;
  }

  private addPlaster(): void {
    const { faces, lines } = plasterScene(this.massing, this.ink);
    this.group.add(...faces, lines);
    const shared = new Set([...faces, lines].flatMap((mesh) => [mesh.geometry, mesh.material].flat()));
    this.owned.push(...shared);
  }

  private addFronts(): void {
    const groups = new Map<string, { build: FrontBuild; material: Material; fronts: MassingFront[] }>();
    for (const front of this.massing.fronts) {
      const style = this.edition.styles.find((one) => one.id === front.style);
      if (!front.material || !style) continue;
      const build: FrontBuild = {
        style,
        build: front.build,
        kind: front.kind === 'door' || front.kind === 'appliancePanel' ? 'door' : 'drawer',
        glass: front.glass,
        boards: front.kind === 'door' ? boardsAcross(style, front.width) : 1,
      };
      const key = `${buildKey(build)} ${materialKey(front.material)}`;
      const group = groups.get(key) ?? { build, material: front.material, fronts: [] };
      group.fronts.push(front);
      groups.set(key, group);
    }
    for (const { build, material, fronts } of groups.values()) {
      const mesh = this.instances(templateOf(build), this.surface(material), fronts.map(frontMatrix));
      this.fronts.set(mesh, fronts);
    }
  }

  private addMembers(): void {
    const groups = new Map<string, { along: 0 | 1; material: Material; places: Matrix4[] }>();
    for (const solid of this.massing.solids) {
      if (!solid.material) continue;
      const along = solid.role === 'rail' || solid.role === 'fillerStrip' || solid.role === 'toe' ? 1 : 0;
      const key = `${along} ${materialKey(solid.material)}`;
      const group = groups.get(key) ?? { along, material: solid.material, places: [] };
      group.places.push(boxMatrix(solid));
      groups.set(key, group);
    }
    for (const { along, material, places } of groups.values())
      this.instances(memberOf(along), this.surface(material), places);
  }

  private addMouldings(): void {
    const profiles: readonly MouldingProfile[] = [
      ...this.edition.crowns,
      ...this.edition.bases,
      ...this.edition.lightRails,
    ];
    const groups = new Map<string, { material: Material; geometries: BufferGeometry[] }>();
    for (const piece of this.massing.sweeps) {
      const profile = profiles.find((one) => one.id === piece.profile);
      if (!profile || !piece.material || piece.path.length < 2) continue;
      const key = materialKey(piece.material);
      const group = groups.get(key) ?? { material: piece.material, geometries: [] };
      group.geometries.push(sweep(piece.path, profile.section, piece.z));
      groups.set(key, group);
    }
    for (const { material, geometries } of groups.values()) {
      const merged = mergeGeometries(geometries);
      for (const geometry of geometries) geometry.dispose();
      const mesh = new Mesh(merged, this.surface(material));
      mesh.castShadow = mesh.receiveShadow = true;
      this.owned.push(merged);
      this.group.add(mesh);
    }
  }

  private addPulls(): void {
    const groups = new Map<string, Matrix4[]>();
    for (const front of this.massing.fronts) {
      if (!front.pull || !front.material) continue;
      const { right, up, out } = axesOf(front.facing);
      const place = toScene(front.at)
        .addScaledVector(right, metres(front.pull.x))
        .addScaledVector(up, metres(front.pull.y));
      const matrix = front.pull.upright
        ? new Matrix4().makeBasis(up, right.clone().negate(), out)
        : new Matrix4().makeBasis(right, up, out);
      const id = front.pull.id;
      groups.set(id, [...(groups.get(id) ?? []), matrix.setPosition(place)]);
    }
    for (const [id, places] of groups) {
      const pull = this.edition.pulls.find((one) => one.id === id);
      const geometry = pull && pullGeometry(pull);
      if (!pull || !geometry) continue;
      const metal = new MeshStandardMaterial({ color: pull.colour, metalness: 0.75, roughness: 0.38 });
      const mesh = new InstancedMesh(geometry, metal, places.length);
      places.forEach((place, i) => mesh.setMatrixAt(i, place));
      mesh.castShadow = true;
      mesh.computeBoundingSphere();
      this.owned.push(mesh, geometry, metal);
      this.group.add(mesh);
    }
  }
}

/** The window's light: from above and a little to one side, over the middle of the room. */
export function lightPlace(massing: Massing): { position: Vector3; target: Vector3; reach: number } {
  const xs = massing.outline.map((point) => point.x);
  const ys = massing.outline.map((point) => point.y);
  const centre = new Vector3(
    metres((Math.min(...xs) + Math.max(...xs)) / 2),
    0,
    -metres((Math.min(...ys) + Math.max(...ys)) / 2),
  );
  const reach =
    Math.max(metres(Math.max(...xs) - Math.min(...xs)), metres(Math.max(...ys) - Math.min(...ys))) / 2 +
    inchesToMetres(24);
  return { position: centre.clone().add(new Vector3(0.4, 5, 1.5)), target: centre, reach };
}
