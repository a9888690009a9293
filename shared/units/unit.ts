/** A physical quantity that a unit measures; two units convert into each other only within one of these. */
export type Dimension =
  | 'dimensionless'
  | 'length'
  | 'area'
  | 'mass'
  | 'time'
  | 'rate'
  | 'angle'
  | 'angular velocity'
  | 'velocity'
  | 'acceleration'
  | 'force'
  | 'stiffness'
  | 'damping'
  | 'torque'
  | 'rotational stiffness'
  | 'rotational damping'
  | 'moment of inertia'
  | 'cornering stiffness';

/**
 * A unit of the table. One of it is `numerator / denominator` SI units.
 *
 * The factor is kept as a fraction because its two parts are exact doubles far more often than their quotient is:
 * 8 ms is 8 / 1000 s to the last bit, where 8 × 0.001 need not be.
 */
export interface Unit {
  readonly label: string;
  readonly dimension: Dimension;
  readonly numerator: number;
  readonly denominator: number;
  /** numerator / denominator, rounded to a double. */
  readonly factor: number;
}
