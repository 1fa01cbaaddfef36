export { viaFacts, type ViaFacts, type ViaSection } from './facts';
export { viaProblems } from './problems';
export { buildVia, viaDelayS, viaNotchHz, viaStanding } from './via';
