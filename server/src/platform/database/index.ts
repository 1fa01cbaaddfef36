export * from './columns';
export * from './connect';
export * from './migrator';
