const PRIMES = [
  2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37, 41, 43, 47, 53, 59, 61, 67, 71, 73, 79, 83, 89, 97, 101, 103,
];

/**
 * Element `index` (from 1) of the Halton sequence in (0, 1)^n: the radical inverse in the first n primes.
 * Source: J. H. Halton, Numer. Math. 2 (1960) 84–90.
 */
export function haltonPoint(index: number, point: Float64Array): void {
  for (let i = 0; i < point.length; i++) {
    const base = PRIMES[i % PRIMES.length];
    let fraction = 1;
    let value = 0;
    for (let rest = index; rest > 0; rest = Math.floor(rest / base)) {
      fraction /= base;
      value += fraction * (rest % base);
    }
    point[i] = value;
  }
}
