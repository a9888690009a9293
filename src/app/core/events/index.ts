export { RunEvents } from './run-events';
