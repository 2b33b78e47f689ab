import { describe, expect, it } from 'vitest';
import { elevations } from '@/components/choosing/elevation';
import type { Massing, MassingFront, PlanPoint, Sixtyfourths, Wall } from '@/lib/engine/types';

/** Inches of a made-up room: 12 feet along the north wall, a peninsula's back line 8 feet in front of it. */
const inch = (value: number): Sixtyfourths => (value * 64) as Sixtyfourths;
const point = (x: number, y: number): PlanPoint => ({ x: inch(x), y: inch(y) });

const wall = (id: string, from: PlanPoint, to: PlanPoint, kind: Wall['kind'] = 'wall'): Wall => ({
  id,
  name: id,
  kind,
  from,
  to,
});

const north = wall('N', point(0, 120), point(144, 120));
const west = wall('W', point(0, 0), point(0, 120));
/** Faces south as the north wall does, five feet before it. */
const peninsula = wall('P', point(36, 60), point(108, 60), 'freestanding');

const front = (mark: string, at: PlanPoint, facing: { x: number; y: number }): MassingFront => ({
  mark,
  cabinet: mark,
  zone: 'base',
  kind: 'door',
  style: 's',
  build: 'fivePiece',
  glass: false,
  hinge: 'left',
  material: null,
  pull: null,
  at: { ...at, z: inch(5) },
  facing,
  width: inch(16),
  height: inch(22),
  depth: inch(0.75),
});

const massing = (fronts: readonly MassingFront[], more: Partial<Massing> = {}): Massing => ({
  outline: [],
  ceiling: inch(96),
  walls: [west, north, peninsula],
  solids: [],
  fronts,
  sweeps: [],
  ...more,
});

const SOUTH = { x: 0, y: -1 };
const EAST = { x: 1, y: 0 };

describe('the drawing of a wall', () => {
  it('puts a front as far from the wall’s left end as it stands, seen from the room', () => {
    // Two feet deep, its lower left corner 30 in from the north wall's left (west) end.
    const [drawn] = elevations(massing([front('N-01-1', point(30, 120 - 24.75), SOUTH)]));
    expect(drawn?.wall.id).toBe('N');
    expect(drawn?.fronts[0]).toMatchObject({
      x: inch(30),
      y: inch(5),
      out: inch(24.75),
      width: inch(16),
    });
  });

  it('reads the west wall from its south end, which is on the left for who looks at it', () => {
    const [drawn] = elevations(massing([front('W-01-1', point(24.75, 20), EAST)]));
    expect(drawn?.wall.id).toBe('W');
    expect(drawn?.fronts[0]?.x).toBe(inch(20));
  });

  it('gives a peninsula’s fronts to the peninsula and not to the parallel wall behind it', () => {
    const fronts = [
      front('N-01-1', point(40, 120 - 24.75), SOUTH),
      front('P-01-1', point(40, 60 - 24.75), SOUTH),
    ];
    const drawn = elevations(massing(fronts));
    expect(drawn.map((one) => [one.wall.id, one.fronts.map((each) => each.front.mark)])).toEqual([
      ['N', ['N-01-1']],
      ['P', ['P-01-1']],
    ]);
  });

  it('leaves out walls on which nothing stands, and every front is on exactly one', () => {
    const fronts = [front('N-01-1', point(0, 95), SOUTH), front('W-01-1', point(24, 50), EAST)];
    const drawn = elevations(massing(fronts));
    expect(drawn.map((one) => one.wall.id)).toEqual(['W', 'N']);
    expect(drawn.flatMap((one) => one.fronts)).toHaveLength(fronts.length);
  });

  it('draws of a moulding what runs along the wall and not what returns to it', () => {
    const drawn = elevations(
      massing([front('N-01-1', point(0, 95), SOUTH)], {
        sweeps: [
          {
            mark: 'crown N',
            kind: 'crown',
            profile: 'c',
            zone: 'wall',
            path: [point(10, 108), point(70, 108), point(70, 120)],
            z: inch(84),
            material: null,
          },
        ],
      }),
    );
    const northern = drawn.find((one) => one.wall.id === 'N');
    expect(northern?.sweeps.map(({ x, width, y }) => ({ x, width, y }))).toEqual([
      { x: inch(10), width: inch(60), y: inch(84) },
    ]);
  });
});
