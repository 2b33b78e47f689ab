'use client';

import { Canvas, useThree, type ThreeEvent } from '@react-three/fiber';
import { Component, useEffect, useLayoutEffect, useMemo, useRef, useState, type ReactNode } from 'react';
import {
  NeutralToneMapping,
  PCFShadowMap,
  Vector3,
  type DirectionalLight,
  type PerspectiveCamera,
} from 'three';
import type { Edition } from '@/lib/engine/edition-types';
import type { Massing } from '@/lib/engine/types';
import { KitchenModel, lightPlace, roomEnvironment } from './kitchen-model';
import type { Ink } from './plaster';
import { inchesToMetres } from './space';
import { EYE_INCHES, FIELD_DEGREES, roomStation, wallStation, type Station } from './stations';

export interface RoomViewProps {
  readonly massing: Massing;
  readonly edition: Edition;
  /** A wall's id, or `room` for all of it. */
  readonly station: string;
  /** The picture in words. */
  readonly label: string;
  /** A front was tapped: its mark. */
  readonly onPick?: (mark: string) => void;
  /** What is shown where the machine cannot draw in three dimensions. */
  readonly fallback: ReactNode;
}

/** How far one may turn from a station, in radians, and how near or far one may go, as shares of its distance. */
const TURN_MAX = 0.5;
const NEAREST = 0.55;
const FARTHEST = 1.12;

interface Machine {
  readonly ok: boolean;
  /** Drawn by the processor: fewer pixels, no shadows. */
  readonly slow: boolean;
}

function probe(): Machine {
  const canvas = document.createElement('canvas');
  const context = canvas.getContext('webgl2');
  if (!context) return { ok: false, slow: true };
  const info = context.getExtension('WEBGL_debug_renderer_info');
  const renderer: unknown = info ? context.getParameter(info.UNMASKED_RENDERER_WEBGL) : '';
  context.getExtension('WEBGL_lose_context')?.loseContext();
  return { ok: true, slow: /swiftshader|llvmpipe|software/i.test(String(renderer)) };
}

function inkOf(element: Element): Ink {
  const style = getComputedStyle(element);
  const read = (name: string, otherwise: string) => style.getPropertyValue(name).trim() || otherwise;
  return {
    ground: read('--plaster', '#e6e9e3'),
    field: read('--panel', '#f4f6f1'),
    line: read('--ink', '#17211d'),
    quiet: read('--ink-quiet', '#4f5c55'),
  };
}

/** Ink colours of the page, again whenever the system's theme changes. */
function useInk(): Ink | null {
  const [ink, setInk] = useState<Ink | null>(null);
  useEffect(() => {
    const media = matchMedia('(prefers-color-scheme: dark)');
    const read = () => setInk(inkOf(document.documentElement));
    read();
    media.addEventListener('change', read);
    return () => media.removeEventListener('change', read);
  }, []);
  return ink;
}

/** The surveyed kitchen as it would be: what is renewed in its material, all else as ink on plaster. */
export default function RoomView(props: RoomViewProps) {
  // Only ever drawn in a browser, so the machine can be asked at once.
  const [machine] = useState(probe);
  const [life, setLife] = useState(0);
  const ink = useInk();

  if (!ink) return <div className="size-full animate-none bg-panel" aria-hidden="true" />;
  if (!machine.ok) return <>{props.fallback}</>;
  return (
    <FallBack to={props.fallback}>
      <Canvas
        key={life}
        role="img"
        aria-label={props.label}
        frameloop="demand"
        dpr={machine.slow ? 1 : [1, 2]}
        shadows={false}
        camera={{ fov: FIELD_DEGREES, near: 0.1, far: 40 }}
        gl={{ antialias: !machine.slow, toneMapping: NeutralToneMapping, toneMappingExposure: 1.2 }}
        onCreated={({ gl }) => {
          gl.shadowMap.enabled = !machine.slow;
          gl.shadowMap.type = PCFShadowMap;
          gl.shadowMap.autoUpdate = false;
          // A restored context comes back without its textures; a new canvas does not.
          gl.domElement.addEventListener('webglcontextlost', (event) => {
            event.preventDefault();
            setLife((known) => known + 1);
          });
        }}
      >
        <Room {...props} ink={ink} />
      </Canvas>
    </FallBack>
  );
}

class FallBack extends Component<{ to: ReactNode; children: ReactNode }, { failed: boolean }> {
  override state = { failed: false };
  static getDerivedStateFromError() {
    return { failed: true };
  }
  override render() {
    return this.state.failed ? this.props.to : this.props.children;
  }
}

function Room({ massing, edition, station: stationId, onPick, ink }: RoomViewProps & { ink: Ink }) {
  const { gl, scene, invalidate } = useThree();
  const lamp = useRef<DirectionalLight>(null);
  const model = useMemo(() => new KitchenModel(massing, edition, ink), [massing, edition, ink]);
  const place = useMemo(() => lightPlace(massing), [massing]);

  useLayoutEffect(() => {
    const environment = roomEnvironment(gl);
    scene.environment = environment;
    scene.environmentIntensity = 0.95;
    return () => environment.dispose();
  }, [gl, scene]);
  useLayoutEffect(() => {
    gl.shadowMap.needsUpdate = true;
    invalidate();
    return () => model.dispose();
  }, [model, gl, invalidate]);
  useLayoutEffect(() => {
    lamp.current?.target.position.copy(place.target);
    lamp.current?.target.updateMatrixWorld();
  }, [place]);

  function pick(event: ThreeEvent<MouseEvent>) {
    if (event.delta > 6) return;
    const front = model.frontAt(event.intersections);
    if (front && onPick) {
      event.stopPropagation();
      onPick(front.mark);
    }
  }

  return (
    <>
      <directionalLight
        ref={lamp}
        position={place.position}
        intensity={0.7}
        castShadow
        shadow-mapSize={[2048, 2048]}
        shadow-bias={-0.0004}
        shadow-normalBias={0.012}
        shadow-radius={5}
      >
        <orthographicCamera
          attach="shadow-camera"
          args={[-place.reach, place.reach, place.reach, -place.reach, 0.5, 9]}
        />
      </directionalLight>
      <primitive object={model.group} onClick={pick} />
      <Eye massing={massing} stationId={stationId} />
    </>
  );
}

/**
 * The camera. It stands at eye height and looks level; what should be shown higher or lower is shifted into the
 * picture. A drag, two fingers, a wheel or the arrow keys move it within the station's bounds.
 */
function Eye({ massing, stationId }: { massing: Massing; stationId: string }) {
  const { gl, size, invalidate } = useThree();
  const camera = useThree((state) => state.camera as PerspectiveCamera);
  const aspect = size.width / Math.max(1, size.height);
  const station = useMemo(
    () => wallStation(massing, stationId, aspect) ?? roomStation(massing, aspect),
    [massing, stationId, aspect],
  );
  const moved = useRef({ turn: 0, zoom: 1 });
  const now = useRef<Station | null>(null);

  useLayoutEffect(() => {
    const look = (from: Station) => {
      const { turn, zoom } = moved.current;
      const back = from.back.clone().applyAxisAngle(new Vector3(0, 1, 0), turn);
      const eye = inchesToMetres(EYE_INCHES);
      const distance = from.distance * zoom;
      camera.position.copy(from.target).addScaledVector(back, distance).setY(eye);
      camera.lookAt(from.target.x, eye, from.target.z);
      const tall = 2 * distance * Math.tan((FIELD_DEGREES * Math.PI) / 360);
      const shift = ((eye - from.middle) / tall) * size.height;
      camera.setViewOffset(size.width, size.height, 0, shift, size.width, size.height);
      camera.updateProjectionMatrix();
      invalidate();
    };

    const still = matchMedia('(prefers-reduced-motion: reduce)').matches;
    const before = now.current;
    moved.current = { turn: 0, zoom: 1 };
    const running = { frame: 0 };
    if (!before || still || before === station) {
      now.current = station;
      look(station);
    } else {
      const begun = performance.now();
      const step = (at: number) => {
        const share = Math.min(1, (at - begun) / 200);
        const eased = share * share * (3 - 2 * share);
        const between: Station = {
          target: before.target.clone().lerp(station.target, eased),
          back: before.back.clone().lerp(station.back, eased).normalize(),
          distance: before.distance + (station.distance - before.distance) * eased,
          middle: before.middle + (station.middle - before.middle) * eased,
        };
        now.current = share < 1 ? between : station;
        look(now.current);
        if (share < 1) running.frame = requestAnimationFrame(step);
      };
      running.frame = requestAnimationFrame(step);
    }

    const canvas = gl.domElement;
    const fingers = new Map<number, { x: number; y: number }>();
    const apply = (turn: number, zoom: number) => {
      moved.current = {
        turn: Math.max(-TURN_MAX, Math.min(TURN_MAX, moved.current.turn + turn)),
        zoom: Math.max(NEAREST, Math.min(FARTHEST, moved.current.zoom * zoom)),
      };
      look(now.current ?? station);
    };
    const spread = () => {
      const [a, b] = [...fingers.values()];
      return a && b ? Math.hypot(a.x - b.x, a.y - b.y) : 0;
    };
    const down = (event: PointerEvent) => {
      fingers.set(event.pointerId, { x: event.clientX, y: event.clientY });
    };
    const move = (event: PointerEvent) => {
      const known = fingers.get(event.pointerId);
      if (!known) return;
      const apart = spread();
      fingers.set(event.pointerId, { x: event.clientX, y: event.clientY });
      if (fingers.size === 2 && apart > 0) apply(0, apart / Math.max(1, spread()));
      else if (fingers.size === 1) apply(((known.x - event.clientX) / size.width) * 1.6, 1);
    };
    const up = (event: PointerEvent) => void fingers.delete(event.pointerId);
    const wheel = (event: WheelEvent) => {
      // A page is scrolled with the wheel; the picture is neared with a pinch or with the control key.
      if (!event.ctrlKey) return;
      event.preventDefault();
      apply(0, Math.exp(event.deltaY * 0.004));
    };
    const key = (event: KeyboardEvent) => {
      const does: Readonly<Record<string, readonly [number, number]>> = {
        ArrowLeft: [-0.08, 1],
        ArrowRight: [0.08, 1],
        '+': [0, 0.92],
        '=': [0, 0.92],
        '-': [0, 1.08],
      };
      const wanted = does[event.key];
      if (!wanted) return;
      event.preventDefault();
      apply(...wanted);
    };
    canvas.tabIndex = 0;
    canvas.style.touchAction = 'pan-y';
    canvas.addEventListener('pointerdown', down);
    window.addEventListener('pointermove', move);
    window.addEventListener('pointerup', up);
    window.addEventListener('pointercancel', up);
    canvas.addEventListener('wheel', wheel, { passive: false });
    canvas.addEventListener('keydown', key);
    return () => {
      cancelAnimationFrame(running.frame);
      canvas.removeEventListener('pointerdown', down);
      window.removeEventListener('pointermove', move);
      window.removeEventListener('pointerup', up);
      window.removeEventListener('pointercancel', up);
      canvas.removeEventListener('wheel', wheel);
      canvas.removeEventListener('keydown', key);
    };
  }, [station, camera, gl, size.width, size.height, invalidate]);

  return null;
}
