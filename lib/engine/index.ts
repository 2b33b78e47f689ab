/** The computation, whole: `(survey, edition, choices, terms)` in, parts, notes, price, dates and massing out. */
export { takeoff, totalOf, totalAfresh, type EngineInput } from './takeoff';
export { options, optionsAll, optionStates, insideOptions, deltaAfresh, zonesIn } from './options';
export { applyChange, chosen, chosenIn, clash, find, optionsOf, reach, swapsFor } from './choices';
export { massing } from './massing';
export { explainDifference, unfoldLine, unfoldTotal, type Reason, type Step } from './explain';
export { doorOrder, type DoorOrderRow } from './door-order';
export {
  cancellationDeadline,
  cancellationRule,
  depositCap,
  draws,
  drawsAfterOrder,
  refundDeadline,
  ruleSetOf,
  type Draw,
  type DrawPlanLine,
  type Sale,
} from './law';
export { RULE_SETS, FORMALDEHYDE_PPM, type Notice, type RuleSet } from './rule-sets';
export {
  changePrice,
  contractArithmetic,
  partDifferences,
  type ChangePrice,
  type ContractArithmetic,
  type PartDifferences,
} from './contract';
export { discountWithin, marginOf, type Margin } from './margin';
export { addDays, businessDaysAfter, readyDate } from './dates';
export { EngineError, ENGINE_ERRORS, type EngineErrorCode } from './error';
