const view = new DataView(new ArrayBuffer(8));

/** The least double above a finite `value`. */
export function nextUp(value: number): number {
  if (value === 0) return Number.MIN_VALUE;
  view.setFloat64(0, value);
  const bits = view.getBigInt64(0);
  view.setBigInt64(0, value > 0 ? bits + 1n : bits - 1n);
  return view.getFloat64(0);
}

/** The largest double below a finite `value`. */
export function nextDown(value: number): number {
  return -nextUp(-value);
}
