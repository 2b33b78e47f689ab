import { grainLines, type GrainKind } from './grain';

const WIDTH = 150;
const HEIGHT = 96;

/** A sawn block: paint or grain fills it, a lit top edge, a darker end. The colour is the finish's own in both themes. */
export function MaterialBlock({ colour, grain, seed }: { colour: string; grain: GrainKind; seed: string }) {
  return (
    <span
      className="absolute inset-0 block overflow-hidden border-t-[3px] border-r-[7px] outline -outline-offset-1 outline-ink/55"
      style={{
        background: colour,
        borderTopColor: `color-mix(in oklab, ${colour}, white 55%)`,
        borderRightColor: `color-mix(in oklab, ${colour}, black 38%)`,
      }}
    >
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        preserveAspectRatio="xMidYMid slice"
        className="absolute inset-0 size-full"
        aria-hidden="true"
        fill="none"
      >
        <g stroke={`color-mix(in oklab, ${colour}, black 42%)`}>
          {grainLines(grain, seed, WIDTH, HEIGHT).map((line) => (
            <path
              key={line.path}
              d={line.path}
              strokeWidth={line.width}
              strokeOpacity={line.depth}
              strokeDasharray={line.dashes}
              strokeDashoffset={line.offset}
            />
          ))}
        </g>
      </svg>
    </span>
  );
}
