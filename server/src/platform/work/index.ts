/**
 * The only way to write. A repository takes a `Work`; a service opens one with
 * `unitOfWork(actor, async (work) => { ...; work.event({ what, subject }) })` and has, once that resolves, a committed
 * transaction with its events chained, its mail in the outbox and its jobs queued.
 */
export * from './audit-chain';
export * from './event';
export * from './models';
export * from './unit-of-work';
