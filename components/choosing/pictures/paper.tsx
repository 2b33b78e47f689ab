import type { ReactNode } from 'react';

/** A drawing on its own sheet, for what is shown as a drawing and not as material. 150 by 96 units. */
export function Paper({ children }: { children: ReactNode }) {
  return (
    <span className="absolute inset-0 block overflow-hidden border border-ink/55 bg-plaster text-ink">
      <svg
        viewBox="0 0 150 96"
        preserveAspectRatio="xMidYMid meet"
        className="absolute inset-0 size-full"
        aria-hidden="true"
        fill="none"
        stroke="currentColor"
        strokeWidth="1"
        strokeLinejoin="round"
      >
        {children}
      </svg>
    </span>
  );
}

/** For "none": a dashed place where the thing would be. */
export function NonePicture() {
  return (
    <Paper>
      <path d="M35 30 H115 V70 H35 Z" strokeDasharray="5 4" strokeOpacity="0.7" />
      <path d="M35 70 L115 30" strokeOpacity="0.7" />
    </Paper>
  );
}

/** The hatch that all drawings fill cut wood with; rendered once on the page, where it is not hidden. */
export function HatchDefinition() {
  return (
    <svg width="0" height="0" className="absolute" aria-hidden="true">
      <defs>
        <pattern id="hatch" width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <path d="M0 0 V4" stroke="currentColor" strokeWidth="1" strokeOpacity="0.55" />
        </pattern>
      </defs>
    </svg>
  );
}
