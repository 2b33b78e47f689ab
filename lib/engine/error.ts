/** Everything that the computation can throw on input that has the right shape. */
export const ENGINE_ERRORS = {
  unknownOption: 'A choice names an option that the edition does not have.',
  unknownWall: 'A cabinet, appliance or gap stands on a wall that the survey does not have.',
  unknownRuleSet: 'There is no rule set of that name.',
  notALength: 'A length is a whole number of 64ths.',
  badCorner: 'A corner cabinet does not stand where its two walls meet.',
} as const;

export type EngineErrorCode = keyof typeof ENGINE_ERRORS;

/** The one error of the computation; `detail` names what is at fault. */
export class EngineError extends Error {
  constructor(
    readonly code: EngineErrorCode,
    readonly detail: string,
  ) {
    super(`${ENGINE_ERRORS[code]} (${detail})`);
    this.name = 'EngineError';
  }
}
