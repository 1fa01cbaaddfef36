export * from './polyline';
export * from './pair';
