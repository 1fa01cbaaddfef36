export * from './subject';
