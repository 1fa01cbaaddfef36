export { demoMailRoutes } from './demo-mail.routes';
