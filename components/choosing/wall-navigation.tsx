'use client';

import { useEffect, useRef } from 'react';
import { classNames } from '@/components/ui/class-names';
import type { Edition } from '@/lib/engine/edition-types';
import type { ZoneOrKitchen } from '@/lib/engine/types';
import type { Part } from './decisions';
import type { Elevation } from './elevation';
import { WallDrawing, type PickPart } from './wall-drawing';

/**
 * The walls one after another as small elevations: the part being chosen is inked, another one is a press away, and
 * the wall that is in sight is the one the room shows.
 */
export function WallNavigation({
  walls,
  edition,
  wall,
  part,
  scope,
  opening,
  onWall,
  onPart,
}: {
  walls: readonly Elevation[];
  edition: Edition;
  wall: string;
  part: Part;
  scope: ZoneOrKitchen;
  opening: string | null;
  onWall: (wall: string) => void;
  onPart: PickPart;
}) {
  const strip = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const scroller = strip.current;
    const shown = scroller?.querySelector<HTMLElement>('[data-current]');
    if (!scroller || !shown) return;
    scroller.scrollLeft = shown.offsetLeft - (scroller.clientWidth - shown.clientWidth) / 2;
  }, [wall]);

  return (
    <div
      ref={strip}
      role="group"
      aria-label="The walls of this kitchen"
      className="relative flex h-22 max-w-[45%] shrink-0 gap-3 overflow-x-auto overscroll-x-contain lg:h-24 lg:max-w-[38%]"
    >
      {walls.map((elevation) => (
        <div
          key={elevation.wall.id}
          data-current={elevation.wall.id === wall || undefined}
          className={classNames('shrink-0', elevation.wall.id !== wall && 'text-quiet')}
          onFocus={() => onWall(elevation.wall.id)}
          onClick={() => onWall(elevation.wall.id)}
        >
          <WallDrawing
            elevation={elevation}
            edition={edition}
            material={false}
            inked={{ part, scope, opening }}
            onPart={onPart}
            className="h-full w-auto"
          />
        </div>
      ))}
    </div>
  );
}
