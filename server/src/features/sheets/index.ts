export { sheetRoutes } from './sheets.routes';
