/**
 * Change of a solid panel's width with the season (O7; USDA FPL-GTR-190, table 13-5): width × coefficient × change of
 * moisture content in percent. `coefficient` in millionths per percent; the answer is in the unit of the width.
 */
export const panelMovement = (width: number, coefficient: number, from: number, to: number): number =>
  (width * coefficient * Math.abs(to - from)) / 1_000_000;

/** Width of the panel in a frame, its edges in both grooves; 64ths. */
export const panelWidth = (front: number, stile: number, groove: number): number =>
  Math.max(0, front - 2 * stile + 2 * groove);
