export { createCheckCache, type CheckCache } from './cache';
export { canonicalBytes } from './canonical';
export { checkChannel } from './check';
export type { Check, CheckResult, ElementStanding, JudgedLimit, Part } from './check.types';
export { partsNeeded, readChannel, type PartReference, type PartsMode, type ReadResult } from './read';
export { CheckAbandoned } from './problem';
export { toResponse } from './response';
export { engineVersion } from './version';
export { toView, verdictOf } from './view';
