export { takeoff, totalOf, totalAfresh, type EngineInput } from './takeoff';
export { options, optionsAll, optionStates, insideOptions, deltaAfresh, zonesIn } from './options';
export { applyChange, chosen, chosenIn, clash, optionsOf, reach, swapsFor } from './choices';
export { massing } from './massing';
export { EngineError, ENGINE_ERRORS, type EngineErrorCode } from './error';
