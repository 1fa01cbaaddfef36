export { createMasksRepository, type MaskDocument, type MasksRepository } from './masks.repository';
export { maskRoutes } from './masks.routes';
