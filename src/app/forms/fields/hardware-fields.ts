import { lawsOf, type PathPart, type Study } from '../../../../shared/contracts';
import { withValueAt } from '../values/at-path';
import { groupField, optionalLensAt, optionalScalarField, type Lens, type StudyField } from './study-field';

/** Lags, delays and sampling, all in s; what is left empty is not there. */
export function hardwareFields(study: Study): StudyField[] {
  const { actuator, control } = study;
  const drives = Array.isArray(actuator)
    ? actuator.map((_, index) => {
        const path = ['actuator', index];
        const name = lawsOf(control)[index]?.input;
        return groupField(`Drive ${name ?? index + 1}`, pathFields(path, path, 'Drive'));
      })
    : pathFields(['actuator'], ['actuator'], 'Drive');
  return [
    ...drives,
    ...pathFields(['sensor'], ['sensor'], 'Sensor'),
    optionalScalarField(
      ['sampling', 'period'],
      { symbol: 'T_s', label: 'Sampling period', unit: 's', placeholder: 'none' },
      samplingLens,
    ),
    ...(study.sampling === undefined ? [] : [padeField(['sampling', 'padeOrder'], 'Sampling, Padé order')]),
  ];

  function pathFields(path: readonly PathPart[], parent: readonly PathPart[], name: string): StudyField[] {
    const drive = name === 'Drive';
    const part = (key: 'lag' | 'delay', symbol: string) => {
      const at = [...path, key];
      // An entry of a list stays, empty: it keeps the place of its law.
      const lens = path.length > 1 ? undefined : optionalLensAt(at, parent);
      return optionalScalarField(
        at,
        { symbol, label: `${name} ${key}`, unit: 's', placeholder: 'none' },
        lens,
      );
    };
    const written = drive ? (Array.isArray(actuator) ? actuator[Number(path[1])] : actuator) : study.sensor;
    return [
      part('lag', drive ? 'τ_a' : 'τ_m'),
      part('delay', drive ? 'T_a' : 'T_m'),
      ...(written?.delay === undefined ? [] : [padeField([...path, 'padeOrder'], `${name}, Padé order`)]),
    ];
  }
}

function padeField(path: readonly PathPart[], label: string): StudyField {
  return optionalScalarField(path, { label, placeholder: '2' });
}

const samplingLens: Lens = {
  read: ({ sampling }) => sampling?.period,
  write: (study, value) =>
    value === undefined
      ? withValueAt(study, ['sampling'], undefined)
      : withValueAt(study, ['sampling', 'period'], value),
};
