export { momentText } from './moment';
export { MomentView } from './moment-view';
