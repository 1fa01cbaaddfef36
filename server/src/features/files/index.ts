export { createFilesRepository, type ListedFile } from './files.repository';
export { fileRoutes } from './files.routes';
export { checkName, createFilesService, type FilesService, type ReceivedPart } from './files.service';
export { readParsed } from './part-store';
