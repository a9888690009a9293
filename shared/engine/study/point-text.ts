import { fromSi } from '../../units';
import type { ComposedParameter } from './composed-study';

/** Digits of a point that is shown to a person. */
const SHOWN_DIGITS = 8;

/** ` at m = 300, k = 120000` in the parameters' units; empty for no parameters. */
export function pointText(
  parameters: readonly ComposedParameter[],
  indices: readonly number[],
  values: ArrayLike<number>,
): string {
  if (indices.length === 0) return '';
  const parts = indices.map((index, i) => {
    const { id, unit } = parameters[index];
    const value = unit === undefined ? values[i] : fromSi(values[i], unit);
    return `${id} = ${Number(value.toPrecision(SHOWN_DIGITS))}`;
  });
  return ` at ${parts.join(', ')}`;
}
