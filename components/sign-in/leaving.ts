let leaving = false;

/** Says that this page is being left on purpose; `false` when it is not left after all. */
export function setLeaving(value: boolean): void {
  leaving = value;
}

/** Whether this page is being left on purpose, so that the end of its session is no news. */
export const isLeaving = (): boolean => leaving;
