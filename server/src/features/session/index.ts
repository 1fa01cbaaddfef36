export { createPassport } from './passport';
export { sessionRoutes } from './session.routes';
export { createThrottle, type Throttle } from './throttle';
