import type { StudyModel } from './study-model';
import type { Term } from './term';

/** The same study with its coordinates (or states) and its parameters in reverse order. */
export function reversed(model: StudyModel): StudyModel {
  const n = model.parameters.length;
  const { machine } = model;
  // A term reads its parameter by its place: give it the places of the original.
  const term = ({ text, at }: Term): Term => ({
    text,
    at: (point) => at(Float64Array.from({ length: n }, (_, i) => point[n - 1 - i])),
  });
  const row = (terms: readonly Term[]): Term[] => [...terms].reverse().map(term);
  const matrix = (rows: readonly Term[][]): Term[][] => [...rows].reverse().map(row);
  const rows = (record: Record<string, Term[]>): Record<string, Term[]> =>
    Object.fromEntries(Object.entries(record).map(([key, terms]) => [key, row(terms)]));
  const names = [...machine.names].reverse();
  const parts =
    machine.order === 2
      ? {
          order: machine.order,
          names,
          mass: matrix(machine.mass),
          damping: matrix(machine.damping),
          stiffness: matrix(machine.stiffness),
          inputs: rows(machine.inputs),
          outputs: Object.fromEntries(
            Object.entries(machine.outputs).map(([key, { position, velocity }]) => [
              key,
              { ...(position && { position: row(position) }), ...(velocity && { velocity: row(velocity) }) },
            ]),
          ),
        }
      : {
          order: machine.order,
          names,
          ...(machine.descriptor && { descriptor: matrix(machine.descriptor) }),
          dynamics: matrix(machine.dynamics),
          inputs: rows(machine.inputs),
          outputs: rows(machine.outputs),
        };
  return {
    ...model,
    machine: parts,
    parameters: [...model.parameters].reverse(),
    ...(model.payload !== undefined && { payload: n - 1 - model.payload }),
  };
}

/** The same study with every band wider by a factor on both sides, within minimum and maximum. */
export function widened(model: StudyModel, factor: number): StudyModel {
  return {
    ...model,
    parameters: model.parameters.map((p) => ({
      ...p,
      low: Math.max(p.minimum ?? -Infinity, p.nominal - factor * (p.nominal - p.low)),
      high: Math.min(p.maximum ?? Infinity, p.nominal + factor * (p.high - p.nominal)),
    })),
  };
}
