export type { AccessControl } from './access-control';
export type { Caller, ProductAccess } from './caller';
export { mountRoutes, type MountOptions } from './mount-routes';
export { openApiDocument, openApiRoute } from './openapi';
export type { RateLimit, LimitSubject } from './rate-limit';
export { JsonText, Reply, type ReplyOptions } from './reply';
export {
  route,
  streamRoute,
  type Call,
  type Method,
  type Route,
  type RouteDefinition,
  type StreamDefinition,
} from './route';
export type { StreamEvent } from './stream-event';
