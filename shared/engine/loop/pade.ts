/**
 * Integer coefficients of the denominator of the Padé form [n/n] of exp(−x), ascending powers:
 * exp(−x) ≈ Q(−x)/Q(x), Q(x) = Σ_k (2n − k)! / (k! (n − k)!) x^k. For n = 2: 12 + 6x + x².
 * Source: G. A. Baker & P. Graves-Morris, Padé Approximants (1996), section 1.2.
 */
export function padeCoefficients(order: number): number[] {
  return Array.from({ length: order + 1 }, (_, k) => {
    let value = 1;
    for (let i = order - k + 1; i <= 2 * order - k; i++) value *= i;
    for (let i = 2; i <= k; i++) value /= i;
    return value;
  });
}
