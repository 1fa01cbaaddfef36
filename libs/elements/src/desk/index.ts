export {
  crossSectionOf,
  type ClosedForm,
  type CrossSectionFacts,
  type ModeFacts,
  type ModesFacts,
} from './cross-section-desk';
export type { SectionDrawing } from './drawing';
export { sensitivitiesOf, type Sensitivity } from './sensitivities';
export { sectionKeyOf, solvedSectionOf, takeInSolved, type SolvedSection } from './solved-section';
export { impedanceOf, synthesize, type Wanted, type WantedMode } from './synthesis';
