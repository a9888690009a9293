/**
 * Largest error of each elementary function, in units in the last place of the exact value
 * (2^−1074 below the normal range). The specs measure every function against 320-bit arithmetic
 * and stay below 0.9 of these bounds; interval arithmetic widens by them.
 */
export const ELEMENTARY_ERROR_ULPS = {
  sin: 1,
  cos: 1,
  tan: 2,
  asin: 1,
  acos: 1,
  atan: 1,
  atan2: 1,
  exp: 1,
  log: 1,
  pow: 1,
} as const;
