// Pairs of doubles whose sum has more than 105 correct bits.

export const PI_HIGH = 3.141592653589793;
export const PI_LOW = 1.2246467991473532e-16;
export const HALF_PI_HIGH = 1.5707963267948966;
export const HALF_PI_LOW = 6.123233995736766e-17;

/** ln 2 cut to a multiple of 2^−42: its product with a binary exponent is exact. */
export const LN2_HIGH = 0.6931471805598903;
export const LN2_LOW = 5.497923018708371e-14;
