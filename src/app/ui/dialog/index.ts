export { confirm, type Question } from './confirm';
export { DialogFrame } from './dialog-frame';
