export { CheckQueue } from './check-queue';
export { CheckPool, Uncheckable } from './check-pool';
export type { CheckOutcome, CheckSummary, CheckTask, TaskPart } from './check-task';
export { SectionStore } from './section-store';
export { createSectionsRepository } from './sections.repository';
export { createChecksRepository, type ChecksRepository } from './checks.repository';
