export * from './polyline';
export * from './pair';
export * from './offset';
export * from './place';
export * from './snap';
export * from './outline';
