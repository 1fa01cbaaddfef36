export { healthRoutes } from './health.routes';
