export { beginHistory, did, redone, undone, type Act, type History } from './history';
