export { BandHandle, type HandleMove } from './band-handle';
export { figureText, withUnit } from './figure-text';
export { clamped, roundStep } from './round-step';
