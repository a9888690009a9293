export { Lane, type LaneChange, type LaneRange } from './lane';
