export * from './deliver';
