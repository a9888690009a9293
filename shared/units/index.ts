export { fromSi, fromSiDown, fromSiUp, toSi } from './convert';
export { findUnit } from './find-unit';
export { formatProved, type ProvedFormat } from './format-proved';
export { ceilText, floorText, roundDown, roundUp } from './round-decimal';
export { units } from './table';
export type { Dimension, Unit } from './unit';
