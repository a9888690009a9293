/**
 * Elementary functions made of + − × ÷, square root, floor and bit access alone, so that every
 * machine returns the same digits.
 */
export { acos } from './acos';
export { asin } from './asin';
export { atan } from './atan';
export { atan2 } from './atan2';
export { cos } from './cos';
export { ELEMENTARY_ERROR_ULPS } from './error-bounds';
export { exp } from './exp';
export { log } from './log';
export { pow } from './pow';
export { sin } from './sin';
export { tan } from './tan';
