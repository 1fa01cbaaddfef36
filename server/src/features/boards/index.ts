export { createBoardsRepository, type BoardsRepository } from './boards.repository';
export { boardRoutes, revisionRoutes } from './boards.routes';
export {
  createBoardsService,
  type BoardsService,
  type CopyChannels,
  type StartStackup,
} from './boards.service';
export type { RevisionRow } from './boards.model';
