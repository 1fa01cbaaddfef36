export { needsWaves, networkOfFile } from './part';
export { createTouchstoneReader, readTouchstone } from './reader';
export type { TouchstoneReader } from './reader';
export * from './touchstone-file';
export { writeTouchstone, writeTouchstoneChunks } from './writer';
export type { WriteOptions } from './writer';
