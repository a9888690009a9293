export { auditRoutes } from './audit.routes';
