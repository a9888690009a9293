export { LadderBar } from './ladder-bar';
export { LadderScale } from './ladder-scale';
export { LoadGauge, type GaugeTest } from './load-gauge';
export { Logo } from './logo';
export type { PayloadRanges } from './payload-ranges';
export { VerdictMark } from './verdict-mark';
