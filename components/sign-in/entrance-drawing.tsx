/** Heights and widths of the drawn cabinet in inches; eight units of the picture are one inch. */
const WIDTH = 33;
const HEIGHT = 34.5;
const DRAWER = 6;
const FRAME = 1.5;
const STILE = 2.25;
const u = (inches: number) => inches * 8;

/** A front with stiles, rails and a flat panel: outer edge, inner edge, and the joints where rails meet stiles. */
function Front({ x, y, width, height, brand }: Rect & { brand?: boolean }) {
  const inner = { x: x + STILE, y: y + STILE, width: width - 2 * STILE, height: height - 2 * STILE };
  return (
    <g className={brand ? 'text-brand' : 'text-ink'} strokeWidth={brand ? 2.25 : 1.25}>
      <rect x={u(x)} y={u(y)} width={u(width)} height={u(height)} />
      <rect x={u(inner.x)} y={u(inner.y)} width={u(inner.width)} height={u(inner.height)} />
      {[x + STILE, x + width - STILE].map((at) => (
        <path key={at} d={`M${u(at)} ${u(y)} v${u(STILE)} M${u(at)} ${u(y + height)} v${-u(STILE)}`} />
      ))}
    </g>
  );
}

interface Rect {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** A dimension string: a line with a slash at each end and its measure. */
function Dimension({
  x1,
  y1,
  x2,
  y2,
  text,
}: {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
  text: string;
}) {
  const upright = x1 === x2;
  const [middleX, middleY] = [u((x1 + x2) / 2), u((y1 + y2) / 2)];
  return (
    <g className="text-quiet" strokeWidth="1">
      <path d={`M${u(x1)} ${u(y1)} L${u(x2)} ${u(y2)}`} />
      {[
        [x1, y1],
        [x2, y2],
      ].map(([x = 0, y = 0]) => (
        <path key={`${x}/${y}`} d={`M${u(x) - 5} ${u(y) + 5} l10 -10`} />
      ))}
      <text
        x={middleX}
        y={middleY - 7}
        textAnchor="middle"
        transform={upright ? `rotate(-90 ${middleX} ${middleY})` : undefined}
        fill="currentColor"
        stroke="none"
        fontSize="17"
        className="[font-feature-settings:'frac'] tabular-nums"
      >
        {text}
      </text>
    </g>
  );
}

/** A base cabinet as a measured drawing, one door inked in the contractor's colour: what signing in leads to. */
export function EntranceDrawing({ className }: { className?: string }) {
  const leaf = (WIDTH - 3 * FRAME) / 2;
  const top = FRAME;
  const doorTop = top + DRAWER + FRAME;
  const doorHeight = HEIGHT - doorTop - FRAME;
  return (
    <svg
      viewBox={`${u(-5)} ${u(-5)} ${u(WIDTH + 6.5)} ${u(HEIGHT + 10.5)}`}
      className={className}
      fill="none"
      stroke="currentColor"
      role="img"
      aria-label="A cabinet drawn to measure"
    >
      <rect width={u(WIDTH)} height={u(HEIGHT)} strokeWidth="2" className="text-ink" />
      <path
        d={`M${u(2)} ${u(HEIGHT)} V${u(HEIGHT + 1.75)} H${u(WIDTH - 2)} V${u(HEIGHT)}`}
        className="text-quiet"
        strokeDasharray="7 5"
      />
      {[0, 1].map((column) => {
        const x = FRAME + column * (leaf + FRAME);
        return (
          <g key={column}>
            <rect
              x={u(x)}
              y={u(top)}
              width={u(leaf)}
              height={u(DRAWER)}
              className="text-ink"
              strokeWidth="1.25"
            />
            <Front x={x} y={doorTop} width={leaf} height={doorHeight} brand={column === 1} />
          </g>
        );
      })}
      <Dimension x1={0} y1={-2} x2={WIDTH} y2={-2} text="33" />
      <Dimension x1={-2} y1={0} x2={-2} y2={HEIGHT} text="34 1/2" />
      <Dimension x1={FRAME * 2 + leaf} y1={HEIGHT + 4.5} x2={WIDTH - FRAME} y2={HEIGHT + 4.5} text="14 1/4" />
    </svg>
  );
}
