export { CheckQueue } from './check-queue';
export { CheckPool, Uncheckable } from './check-pool';
export type { CheckOutcome, CheckSummary, CheckTask, TaskPart } from './check-task';
export { createChecksRepository, type ChecksRepository } from './checks.repository';
