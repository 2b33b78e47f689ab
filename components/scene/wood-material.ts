import {
  Color,
  DataTexture,
  LinearFilter,
  LinearMipmapLinearFilter,
  MeshDepthMaterial,
  MeshStandardMaterial,
  RepeatWrapping,
  RGBADepthPacking,
  RGBAFormat,
  UnsignedByteType,
  Vector3,
  Vector4,
  type WebGLProgramParametersWithUniforms,
} from 'three';
import type { Edition, Finish, Species } from '@/lib/engine/edition-types';
import type { Material } from '@/lib/engine/types';
import { figureOf, makeGrain, TILE } from './grain';

const VERTEX_PARS = /* glsl */ `
#ifdef USE_INSTANCING
attribute vec3 metricOffset;
#else
attribute vec3 local; attribute float seed;
#endif
attribute vec3 grain; // direction, part, light
varying vec3 vLocal; varying float vLight; varying float vHeight; flat varying vec3 vPart;
`;
const SCALE = /* glsl */ `
#ifdef USE_INSTANCING
 vec3 sizes = vec3(length(instanceMatrix[0].xyz), length(instanceMatrix[1].xyz), length(instanceMatrix[2].xyz));
#endif
`;
const BEGIN = /* glsl */ `
#ifdef USE_INSTANCING
 vec3 transformed = position + metricOffset / sizes;
#else
 vec3 transformed = vec3(position);
#endif
`;
const NORMAL = `${SCALE}
#ifdef USE_INSTANCING
 vec3 objectNormal = vec3(normal) * sizes; // leaves the rotation alone
#else
 vec3 objectNormal = vec3(normal);
#endif
`;
const VARYINGS = /* glsl */ `
#ifdef USE_INSTANCING
 vLocal = transformed * sizes;
 float partSeed = fract(dot(instanceMatrix[3].xyz, vec3(1.37, 2.11, 3.73))) * 10.;
 vHeight = (instanceMatrix * vec4(transformed, 1.)).y;
#else
 vLocal = local; float partSeed = seed; vHeight = transformed.y;
#endif
 vLight = grain.z;
 vPart = vec3(grain.x, grain.y, partSeed);
`;
const FRAGMENT_PARS = /* glsl */ `
varying vec3 vLocal; varying float vLight; varying float vHeight; flat varying vec3 vPart;
uniform sampler2D grainTile; uniform vec3 chip; uniform vec3 latewood; uniform vec4 depths; uniform vec3 mean; uniform float paint; uniform float specularShare;
float hash1(float n) { return fract(sin(n * 12.9898) * 43758.5453); }
`;
const COLOUR = /* glsl */ `
 float light = vLight * mix(.8, 1., smoothstep(-.05, .45, vHeight));
 float poreHere = 0.;
 if (paint < .999) {
  vec2 q = vPart.x > .5 ? vec2(vLocal.y + vLocal.z, vLocal.x) : vec2(vLocal.x + vLocal.z, vLocal.y);
  vec2 gx = dFdx(q), gy = dFdy(q);
  float part = vPart.y, own = vPart.z, stave = 0.;
  if (part > 3.5 && part < 9.5 || part > 19.5 && part < 29.5) {
   float wide = .085 + .05 * hash1(own * 3.1);
   stave = floor((q.x + hash1(own) * .2) / wide) + 30.;
  }
  float a = hash1(own * 1.7 + part * 7.13 + stave * 3.77);
  float b = hash1(own * 2.3 + part * 3.31 + stave * 5.19);
  float c = hash1(own * 4.1 + part * 1.7 + stave * 2.9);
  float flip = c > .5 ? -1. : 1.;
  vec2 tile = vec2(${TILE.width.toFixed(3)}, ${TILE.height.toFixed(3)});
  vec2 t = vec2(q.x + a * .4, flip * q.y + b * 1.6);
  vec3 figure = textureGrad(grainTile, t / tile, gx / tile, vec2(1., flip) * gy / tile).rgb;
  // Each term is divided by its mean, so that the average is the chip.
  vec3 ring = mix(vec3(1.), latewood, depths.x * figure.r) / mix(vec3(1.), latewood, depths.x * mean.r);
  float pore = (1. - depths.y * figure.g) / (1. - depths.y * mean.g);
  float tone = 1. + depths.z * 2. * (figure.b - mean.b) + depths.w * 2. * (c - .5);
  poreHere = figure.g * .25;
  diffuseColor.rgb = mix(chip * ring * pore * tone, chip, paint);
 } else diffuseColor.rgb = chip;
`;
const LIGHT = /* glsl */ `
 reflectedLight.indirectDiffuse *= light;
 reflectedLight.indirectSpecular *= light * specularShare;
 reflectedLight.directDiffuse *= mix(1., light, .4);
`;

function patchVertex(shader: WebGLProgramParametersWithUniforms, depthOnly: boolean): void {
  shader.vertexShader = shader.vertexShader.replace('#include <common>', `#include <common>\n${VERTEX_PARS}`);
  shader.vertexShader = depthOnly
    ? shader.vertexShader.replace('#include <begin_vertex>', SCALE + BEGIN)
    : shader.vertexShader
        .replace('#include <beginnormal_vertex>', NORMAL)
        .replace('#include <begin_vertex>', BEGIN + VARYINGS);
}

/** Shadows of instanced fronts follow their metric members too. */
export function depthMaterial(): MeshDepthMaterial {
  const material = new MeshDepthMaterial({ depthPacking: RGBADepthPacking });
  material.onBeforeCompile = (shader) => patchVertex(shader, true);
  material.customProgramCacheKey = () => 'stilewright depth';
  return material;
}

interface Tile {
  readonly texture: DataTexture;
  readonly mean: readonly [number, number, number];
}

const tiles = new Map<string, Tile>();

/** The grain of a species, made once in a page's life. */
function tileOf(species: Species & { grain: 'fine' | 'medium' | 'coarse' }): Tile {
  const known = tiles.get(species.id);
  if (known) return known;
  const { data, mean } = makeGrain(figureOf(species));
  const texture = new DataTexture(data, TILE.columns, TILE.rows, RGBAFormat, UnsignedByteType);
  texture.wrapS = texture.wrapT = RepeatWrapping;
  texture.minFilter = LinearMipmapLinearFilter;
  texture.magFilter = LinearFilter;
  texture.generateMipmaps = true;
  texture.anisotropy = 4;
  texture.needsUpdate = true;
  const made = { texture, mean };
  tiles.set(species.id, made);
  return made;
}

/** The colour that a finish's chip shows on a species, as stored. */
export function chipColour(species: Species, finish: Finish): string {
  return finish.colours?.[species.id] ?? finish.colour ?? species.colour;
}

const hasGrain = (species: Species): species is Species & { grain: 'fine' | 'medium' | 'coarse' } =>
  species.grain !== 'none';

/** A renewed surface: wood or paint whose average colour is its chip's. */
export function woodMaterial(
  edition: Edition,
  { species: speciesId, finish: finishId }: Material,
): MeshStandardMaterial {
  const species = edition.species.find((one) => one.id === speciesId);
  const finish = edition.finishes.find((one) => one.id === finishId);
  const colour = species && finish ? chipColour(species, finish) : '#cccccc';
  const isPaint = finish?.family === 'paint' || finish?.family === 'thermofoil';
  const tile = species && !isPaint && hasGrain(species) ? tileOf(species) : null;
  const figure = species && hasGrain(species) ? figureOf(species) : null;
  const material = new MeshStandardMaterial({ roughness: isPaint ? 0.5 : 0.42, metalness: 0 });
  const uniforms = {
    grainTile: { value: tile?.texture ?? null },
    chip: { value: new Color(colour) },
    latewood: { value: new Vector3(...(figure?.dark ?? [1, 1, 1])) },
    depths: {
      value: figure
        ? new Vector4(figure.ringDepth, figure.poreDepth, figure.toneDepth, figure.staveDepth)
        : new Vector4(),
    },
    mean: { value: new Vector3(...(tile?.mean ?? [0.5, 0.1, 0.5])) },
    paint: { value: tile ? 0 : 1 },
    specularShare: { value: 0.45 },
  };
  material.onBeforeCompile = (shader) => {
    Object.assign(shader.uniforms, uniforms);
    patchVertex(shader, false);
    shader.fragmentShader = shader.fragmentShader
      .replace('#include <common>', `#include <common>\n${FRAGMENT_PARS}`)
      .replace('#include <color_fragment>', COLOUR)
      .replace(
        '#include <roughnessmap_fragment>',
        'float roughnessFactor = clamp(roughness + poreHere, .05, 1.);',
      )
      .replace('#include <aomap_fragment>', LIGHT);
  };
  material.customProgramCacheKey = () => 'stilewright wood';
  return material;
}
