import type { DoorStyle } from '@/lib/engine/edition-types';
import { Paper } from './paper';

/** Units of the drawing per 1/64 inch: a door of 16 by 26 inches stands 84 high. */
const SCALE = 84 / (26 * 64);
const DOOR = { width: 16 * 64, height: 26 * 64 };
/** The section's own scale: three quarters of an inch is 15 units. */
const SECTION = 15 / 48;

const n = (value: number): string => value.toFixed(2);

/** A door style as an elevation, in the finish at hand, and a section through stile and panel. */
export function DoorPicture({ style, colour }: { style: DoorStyle; colour: string }) {
  const w = DOOR.width * SCALE;
  const h = DOOR.height * SCALE;
  const stile = style.stile * SCALE;
  const rail = style.rail * SCALE;
  const inner = { x: stile, y: rail, width: w - 2 * stile, height: h - 2 * rail };
  const five = style.construction === 'fivePiece';
  return (
    <Paper>
      <g transform={`translate(16 ${n((96 - h) / 2)})`} stroke="var(--on-blade)">
        <rect width={n(w)} height={n(h)} fill={colour} strokeWidth="1.4" />
        {five && (
          <>
            <rect x={n(inner.x)} y={n(inner.y)} width={n(inner.width)} height={n(inner.height)} />
            <path
              d={`M${n(stile)} 0 V${n(h)} M${n(w - stile)} 0 V${n(h)}`}
              strokeOpacity="0.45"
              strokeWidth="0.6"
            />
            {style.panel === 'raised' && (
              <rect
                x={n(inner.x + 4.5)}
                y={n(inner.y + 4.5)}
                width={n(inner.width - 9)}
                height={n(inner.height - 9)}
                strokeWidth="0.7"
              />
            )}
            {style.panel === 'beaded' && <Boards {...inner} every={5.5} />}
            <rect
              x={n(inner.x + 1.6)}
              y={n(inner.y + 1.6)}
              width={n(inner.width - 3.2)}
              height={n(inner.height - 3.2)}
              strokeWidth="0.5"
              strokeOpacity="0.6"
            />
          </>
        )}
        {style.construction === 'plank' && (
          <Boards x={0} y={0} width={w} height={h} every={(style.plankWidth ?? 3 * 64) * SCALE} />
        )}
      </g>
      <Section style={style} />
    </Paper>
  );
}

function Boards({
  x,
  y,
  width,
  height,
  every,
}: {
  x: number;
  y: number;
  width: number;
  height: number;
  every: number;
}) {
  const count = Math.max(1, Math.round(width / every));
  const lines = Array.from({ length: count - 1 }, (_, index) => x + ((index + 1) * width) / count);
  return <path d={lines.map((at) => `M${n(at)} ${n(y)} v${n(height)}`).join(' ')} strokeWidth="0.6" />;
}

/** Looking down on the cut: the stile hatched, the panel in its groove. */
function Section({ style }: { style: DoorStyle }) {
  const left = 78;
  const middle = 48;
  const t = style.thickness * SECTION;
  if (style.construction !== 'fivePiece') {
    return <rect x={left} y={n(middle - t / 2)} width="58" height={n(t)} fill="url(#hatch)" />;
  }
  const s = Math.min(style.stile * SECTION, 40);
  const p = Math.max(style.panelThickness * SECTION, 2);
  const g = Math.max(style.groove * SECTION, 2.5);
  const face = middle + t / 2;
  const back = middle - t / 2;
  const panelEnd = left + 60;
  // The panel's face comes forward where it is raised.
  const raised = style.panel === 'raised';
  const front = raised ? face - 1 : middle + p / 2;
  return (
    <g>
      <path
        d={`M${left} ${n(back)} H${n(left + s)} V${n(middle - p / 2)} H${n(left + s - g)} V${n(middle + p / 2)} H${n(left + s)} V${n(face - 3)} L${n(left + s - 3)} ${n(face)} H${left} Z`}
        fill="url(#hatch)"
      />
      <path
        d={
          raised
            ? `M${n(left + s - g)} ${n(middle - p / 2)} H${panelEnd} V${n(front)} H${n(left + s + 14)} L${n(left + s + 3)} ${n(middle + p / 2)} H${n(left + s - g)} Z`
            : `M${n(left + s - g)} ${n(middle - p / 2)} H${panelEnd} V${n(front)} H${n(left + s - g)} Z`
        }
      />
      <path d={`M${panelEnd} ${n(back - 3)} l2 3 l-4 4 l4 4 l-2 3`} strokeWidth="0.7" strokeOpacity="0.7" />
    </g>
  );
}
