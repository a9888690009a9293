import type { Dimension, Unit } from './unit';

/**
 * Sources: the international yard and pound agreement of 1959 (in = 0.0254 m, ft = 0.3048 m, lb = 0.45359237 kg, exact);
 * the SI brochure (9th edition) for prefixes, the tonne, the degree and the standard acceleration of
 * free fall g0 = 9.80665 m/s² (3rd CGPM 1901), which defines the pound-force.
 */
type Row = readonly [
  label: string,
  dimension: Dimension,
  numerator: number,
  denominator: number,
  otherSpellings?: readonly string[],
];

/** N per lbf: the exact product 0.45359237 × 9.80665. */
const POUND_FORCE = 4.4482216152605;
const INCH_PER_10000 = 254;

const rows: readonly Row[] = [
  ['1', 'dimensionless', 1, 1, ['-']],
  ['%', 'dimensionless', 1, 100],

  ['m', 'length', 1, 1],
  ['km', 'length', 1000, 1],
  ['cm', 'length', 1, 100],
  ['mm', 'length', 1, 1000],
  ['µm', 'length', 1, 1000000, ['um', 'μm']],
  ['in', 'length', INCH_PER_10000, 10000],
  ['ft', 'length', 3048, 10000],
  ['m^2', 'area', 1, 1],
  ['mm^2', 'area', 1, 1000000],

  ['kg', 'mass', 1, 1],
  ['g', 'mass', 1, 1000],
  ['t', 'mass', 1000, 1],
  ['lb', 'mass', 45359237, 100000000, ['lbm']],

  ['s', 'time', 1, 1],
  ['ms', 'time', 1, 1000],
  ['µs', 'time', 1, 1000000, ['us', 'μs']],
  ['min', 'time', 60, 1],
  ['h', 'time', 3600, 1],
  ['1/s', 'rate', 1, 1, ['s^-1']],

  ['rad', 'angle', 1, 1],
  ['mrad', 'angle', 1, 1000],
  ['deg', 'angle', Math.PI, 180, ['°']],
  ['rad/s', 'angular velocity', 1, 1],
  ['deg/s', 'angular velocity', Math.PI, 180, ['°/s']],
  ['Hz', 'angular velocity', 2 * Math.PI, 1],
  ['rpm', 'angular velocity', Math.PI, 30, ['1/min', 'r/min', 'rev/min']],

  ['m/s', 'velocity', 1, 1],
  ['mm/s', 'velocity', 1, 1000],
  ['m/min', 'velocity', 1, 60],
  ['km/h', 'velocity', 10, 36],
  ['mph', 'velocity', 44704, 100000],
  ['ft/s', 'velocity', 3048, 10000],
  ['m/s^2', 'acceleration', 1, 1],

  ['N', 'force', 1, 1],
  ['kN', 'force', 1000, 1],
  ['MN', 'force', 1000000, 1],
  ['lbf', 'force', POUND_FORCE, 1],

  ['N/m', 'stiffness', 1, 1],
  ['kN/m', 'stiffness', 1000, 1],
  ['MN/m', 'stiffness', 1000000, 1],
  ['N/mm', 'stiffness', 1000, 1],
  ['kN/mm', 'stiffness', 1000000, 1],
  ['N/µm', 'stiffness', 1000000, 1, ['N/um', 'N/μm']],
  ['lbf/in', 'stiffness', POUND_FORCE * 10000, INCH_PER_10000],
  ['lbf/ft', 'stiffness', POUND_FORCE * 10000, 3048],

  ['N·s/m', 'damping', 1, 1, ['Ns/m', 'N/(m/s)']],
  ['kN·s/m', 'damping', 1000, 1, ['kNs/m', 'kN/(m/s)']],
  ['N·s/mm', 'damping', 1000, 1, ['Ns/mm', 'N/(mm/s)']],
  ['lbf·s/in', 'damping', POUND_FORCE * 10000, INCH_PER_10000, ['lbfs/in']],
  ['lbf·s/ft', 'damping', POUND_FORCE * 10000, 3048, ['lbfs/ft']],

  ['N·m', 'torque', 1, 1, ['Nm']],
  ['kN·m', 'torque', 1000, 1, ['kNm']],
  ['lbf·ft', 'torque', POUND_FORCE * 3048, 10000, ['ft·lbf']],
  ['lbf·in', 'torque', POUND_FORCE * INCH_PER_10000, 10000, ['in·lbf']],
  ['N·m/rad', 'rotational stiffness', 1, 1, ['Nm/rad']],
  ['kN·m/rad', 'rotational stiffness', 1000, 1, ['kNm/rad']],
  ['N·m/deg', 'rotational stiffness', 180, Math.PI, ['Nm/deg', 'N·m/°', 'Nm/°']],
  ['N·m·s', 'rotational damping', 1, 1, ['Nms', 'Nm·s', 'N·m·s/rad', 'Nms/rad', 'Nm·s/rad']],

  ['kg·m^2', 'moment of inertia', 1, 1, ['kgm^2']],
  ['kg·cm^2', 'moment of inertia', 1, 10000, ['kgcm^2']],
  ['g·cm^2', 'moment of inertia', 1, 10000000, ['gcm^2']],
  ['lb·in^2', 'moment of inertia', 45359237 * 64516, 1e16],
  ['lb·ft^2', 'moment of inertia', 45359237 * 9290304, 1e16],

  ['N/rad', 'cornering stiffness', 1, 1],
  ['kN/rad', 'cornering stiffness', 1000, 1],
  ['N/deg', 'cornering stiffness', 180, Math.PI, ['N/°']],
];

/** Every unit the product converts, in the order in which forms may list them. */
export const units: readonly Unit[] = rows.map(([label, dimension, numerator, denominator]) => ({
  label,
  dimension,
  numerator,
  denominator,
  factor: numerator / denominator,
}));

/** One entry per accepted spelling, in normal form (see `find-unit.ts`). */
export const spellings: readonly (readonly [spelling: string, unit: Unit])[] = rows.flatMap(
  ([label, , , , others = []], index) =>
    [label, ...others].map((spelling) => [spelling, units[index]] as const),
);
