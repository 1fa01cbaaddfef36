export * from './formula/formula';
export * from './formula/formula-error';
export * from './mask';
export * from './subject';
