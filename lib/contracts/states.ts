/** State machines of the program, one table each; screens, services and tests share them. */

export const JOB_STAGES = [
  'measured',
  'choosing',
  'signed',
  'released',
  'materialsIn',
  'installing',
  'walkThrough',
  'closed',
] as const;
export type JobStage = (typeof JOB_STAGES)[number];

export const JOB_STAGE_NAMES: Readonly<Record<JobStage, string>> = {
  measured: 'Measured',
  choosing: 'Choosing',
  signed: 'Signed',
  released: 'Released to shop',
  materialsIn: 'Materials in',
  installing: 'Installing',
  walkThrough: 'Walk-through',
  closed: 'Closed',
};

/** Each stage's allowed next stages. */
export const JOB_STAGE_NEXT: Readonly<Record<JobStage, readonly JobStage[]>> = {
  measured: ['choosing'],
  choosing: ['signed'],
  signed: ['released', 'closed'],
  released: ['materialsIn'],
  materialsIn: ['installing'],
  installing: ['walkThrough'],
  walkThrough: ['closed'],
  closed: [],
};

export const CHANGE_ORDER_STATES = [
  'draft',
  'offered',
  'signed',
  'approved',
  'declined',
  'withdrawn',
] as const;
export type ChangeOrderState = (typeof CHANGE_ORDER_STATES)[number];

export const CHANGE_ORDER_NEXT: Readonly<Record<ChangeOrderState, readonly ChangeOrderState[]>> = {
  draft: ['offered', 'withdrawn'],
  offered: ['signed', 'declined', 'withdrawn', 'draft'],
  signed: ['approved', 'declined', 'withdrawn', 'draft'],
  approved: [],
  declined: [],
  withdrawn: [],
};

export const DRAW_STATES = ['planned', 'due', 'processing', 'paid'] as const;
export type DrawState = (typeof DRAW_STATES)[number];

export const DRAW_NEXT: Readonly<Record<DrawState, readonly DrawState[]>> = {
  planned: ['due'],
  due: ['processing', 'paid', 'planned'],
  processing: ['paid', 'due'],
  paid: ['due'],
};

export function canMove<S extends string>(table: Readonly<Record<S, readonly S[]>>, from: S, to: S): boolean {
  return table[from].includes(to);
}
