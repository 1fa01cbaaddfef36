export * from './desk';
export { buildElement, elementCoverage, elementFiles } from './element';
export { elementDelayS, elementTollDb } from './loss';
export { elementModel } from './model-facts';
export { elementProblems } from './problems';
export { elementStanding } from './standing';
export { isTwoPort, twoPortInto, type TwoPortKind } from './two-port';
export { viaFacts, viaNotchHz, type ViaFacts, type ViaSection } from './via';
export {
  ElementError,
  type BuildContext,
  type BuiltElement,
  type ElementCoverage,
  type ElementPart,
  type ElementProblem,
  type LineFacts,
} from './types';
