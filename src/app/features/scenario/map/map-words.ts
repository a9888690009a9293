import type { MapMeasure, MapOthers } from '../../../../../shared/contracts';

export const MAP_MEASURE_WORDS: Record<MapMeasure, string> = {
  closest: 'closest requirement',
  decayRate: 'decay rate',
  dampingRatio: 'damping ratio',
  gainMargin: 'gain margin',
  phaseMargin: 'phase margin',
  modulusMargin: 'modulus margin',
  delayMargin: 'delay margin',
};

export const MAP_OTHERS_WORDS: Record<MapOthers, string> = {
  nominal: 'at nominal',
  anywhere: 'anywhere in their bands',
};
