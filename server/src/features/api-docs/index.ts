export { apiDocsRoutes } from './api-docs.routes';
