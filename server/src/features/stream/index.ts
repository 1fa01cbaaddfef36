export { ChangeFeed, streamRoutes } from './stream.routes';
