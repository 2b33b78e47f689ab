import type { MouldingProfile } from '@/lib/engine/edition-types';
import { Paper } from './paper';

const n = (value: number): string => value.toFixed(2);

/**
 * A moulding's section as it is installed, against the cabinet's face, each kind at one scale, so that a taller
 * crown looks taller.
 */
export function SectionPicture({ profile }: { profile: MouldingProfile }) {
  const scale = Math.min(profile.kind === 'base' ? 13 : 19, 70 / (profile.height / 64)) / 64;
  const height = profile.height * scale;
  const left = 60;
  const foot = profile.kind === 'base' ? 84 : 48 + height / 2;
  const path = profile.section
    .map(
      (point, index) => `${index === 0 ? 'M' : 'L'}${n(left + point.x * scale)} ${n(foot - point.y * scale)}`,
    )
    .join(' ');
  return (
    <Paper>
      {profile.kind === 'base' ? (
        <path d="M12 84.5 H138" strokeWidth="1.4" />
      ) : (
        profile.kind === 'crown' && <path d={`M12 ${n(foot - height - 0.5)} H138`} strokeWidth="1.4" />
      )}
      <path
        d={
          profile.kind === 'lightRail'
            ? `M${left} 6 V${n(foot - height)} H40`
            : profile.kind === 'base'
              ? `M${left} 6 V84`
              : `M${left} ${n(foot - height)} V92`
        }
        strokeOpacity="0.6"
        strokeDasharray="5 3"
      />
      <path d={`${path} Z`} fill="url(#hatch)" strokeWidth="1.4" />
      <text
        x="138"
        y="90"
        textAnchor="end"
        fontSize="13"
        stroke="none"
        fill="currentColor"
        className="length-fraction font-title"
      >
        {inchesOf(profile.height)}″ high
      </text>
    </Paper>
  );
}

/** `3 1/4` to the nearest sixteenth. */
function inchesOf(length: number): string {
  const sixteenths = Math.round(length / 4);
  const whole = Math.floor(sixteenths / 16);
  let top = sixteenths % 16;
  let bottom = 16;
  while (top > 0 && top % 2 === 0) {
    top /= 2;
    bottom /= 2;
  }
  if (top === 0) return String(whole);
  return whole === 0 ? `${top}/${bottom}` : `${whole} ${top}/${bottom}`;
}
