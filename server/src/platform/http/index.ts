/**
 * HTTP: a feature declares its routes with `route({...})`; app.ts mounts them. Everything a route needs besides acting
 * (rights, validation, membership, errors) is done here from what the declaration names.
 */
export * from './errors';
export * from './mount';
export * from './openapi';
export * from './problem';
export * from './route';
export * from './security';
export * from './session';
export * from './static';
