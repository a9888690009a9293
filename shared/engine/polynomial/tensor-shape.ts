/** Shape of one or two complex polynomials in m variables and t, in tensor Bernstein form. */
export interface TensorShape {
  /** Degree in each variable. */
  readonly degrees: readonly number[];
  /** Degree in t. */
  readonly degree: number;
  /** End values of a parameter of degree one that is never split (κ or τ): the slowest index. */
  readonly sheets: number;
  /**
   * Where the way from the first sheet (0) to the second (1) may be cut, rising. Each piece needs a direction of its
   * own only, so that a long way does not ask for small boxes. Left out: none.
   */
  readonly cuts?: readonly number[] | undefined;
  /** Undefined: one polynomial, 0 is to be excluded. β: two, abs(first) > β abs(second) is to be shown. */
  readonly discRadius: number | undefined;
}
