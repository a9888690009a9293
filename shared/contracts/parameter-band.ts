/** The numbers of a parameter, in one and the same unit, as far as they are known. */
export interface ParameterNumbers {
  readonly nominal?: number | undefined;
  readonly low?: number | undefined;
  readonly high?: number | undefined;
  readonly minimum?: number | undefined;
  readonly maximum?: number | undefined;
}

export interface ParameterFault {
  readonly key: keyof ParameterNumbers;
  readonly message: string;
}

/** minimum ≤ low ≤ nominal ≤ high ≤ maximum, pair by pair; the fault stands at the key named first. */
const ORDERED = [
  ['low', 'above', 'nominal'],
  ['high', 'below', 'nominal'],
  ['minimum', 'above', 'low'],
  ['minimum', 'above', 'nominal'],
  ['maximum', 'below', 'high'],
  ['maximum', 'below', 'nominal'],
] as const;

/** Faults of a parameter's numbers: not finite, or not in order. Numbers that are not known yet are left out. */
export function bandFaults(numbers: ParameterNumbers): ParameterFault[] {
  const faults: ParameterFault[] = [];
  for (const key of ['nominal', 'low', 'high', 'minimum', 'maximum'] as const) {
    const value = numbers[key];
    if (value !== undefined && !Number.isFinite(value)) faults.push({ key, message: 'must be finite' });
  }
  for (const [key, side, other] of ORDERED) {
    const value = numbers[key];
    const bound = numbers[other];
    if (value === undefined || bound === undefined) continue;
    if (side === 'above' ? value > bound : value < bound) {
      faults.push({
        key,
        message: `must not be ${side} ${other} (${value} ${side === 'above' ? '>' : '<'} ${bound})`,
      });
    }
  }
  return faults;
}

/**
 * Why a payload search cannot end at these values; undefined if it can. The search upwards starts at the nominal
 * payload and must cover the band; the search downwards must end at or below the nominal.
 */
export function searchFault(
  which: 'searchUpTo' | 'searchDownTo',
  value: number,
  payload: ParameterNumbers,
): string | undefined {
  if (!Number.isFinite(value)) return 'must be finite';
  const { nominal, high = nominal } = payload;
  if (which === 'searchUpTo') {
    return high !== undefined && value < high
      ? `must not be below the high end of the payload's band (${value} < ${high})`
      : undefined;
  }
  return nominal !== undefined && value > nominal
    ? `must not be above the nominal payload (${value} > ${nominal})`
    : undefined;
}
