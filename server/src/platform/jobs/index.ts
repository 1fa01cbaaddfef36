export * from './runner';
