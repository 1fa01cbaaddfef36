export { eventsRoutes } from './events.routes';
