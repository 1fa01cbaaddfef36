export { dispersionLimitHz, lineOfField, type FieldLine, type SectionMaterials } from './line-of-field';
export { sectionKey, shapeOf, type FieldSection, type FieldTrace } from './section';
export { solveSection, type FieldMode, type FieldSolution } from './solve';
