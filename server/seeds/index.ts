export { maskSeeds, type MaskSeed } from './masks';
export { seedDemonstration } from './demonstration/seed-demonstration';
