import {
  lawsOf,
  MEASURES,
  type LevelMeasure,
  type Measure,
  type PathPart,
  type Requirement,
  type Study,
} from '../../../../shared/contracts';
import { valueAt, withValueAt } from '../values/at-path';
import { choiceField, scalarField, type Lens, type StudyField, type StudyProps } from './study-field';

export const MEASURE_WORDS: Readonly<Record<Measure, string>> = {
  stability: 'Stability',
  decayRate: 'Decay rate',
  dampingRatio: 'Damping ratio',
  gainMargin: 'Gain margin',
  phaseMargin: 'Phase margin',
  modulusMargin: 'Modulus margin',
};

const LEVEL_PROPS: Readonly<Record<LevelMeasure, StudyProps>> = {
  decayRate: { unit: '1/s' },
  dampingRatio: {},
  gainMargin: { unit: 'factor' },
  phaseMargin: { unit: 'rad', angle: true },
  modulusMargin: {},
};

/** Levels that a measure starts with when it is chosen. */
const FIRST_LEVEL: Readonly<Record<LevelMeasure, number | string>> = {
  decayRate: 0.5,
  dampingRatio: 0.1,
  gainMargin: 2,
  phaseMargin: '30*pi/180',
  modulusMargin: 0.5,
};

/** Every measure with a tick and its level; at `path` stands the list of requirements. */
export function requirementFields(study: Study, path: readonly PathPart[] = ['requirements']): StudyField[] {
  const laws = lawsOf(study.control);
  return MEASURES.flatMap((measure) => {
    const places = listAt(study, path).flatMap((item, index) => (item.measure === measure ? [index] : []));
    const tick = tickField(path, measure);
    if (measure === 'stability' || places.length === 0) return [{ ...requirementRow(tick) }];
    return places.flatMap((index, nth) => {
      const level = scalarField([...path, index, 'atLeast'], {
        label: `${MEASURE_WORDS[measure]}, at least`,
        ...LEVEL_PROPS[measure],
      });
      const atInput =
        laws.length > 1 && measure.endsWith('Margin')
          ? [
              choiceField([...path, index, 'input'], {
                label: 'Loop broken at',
                choices: laws.map(({ input }) => ({ value: input, label: input })),
              }),
            ]
          : [];
      return [
        requirementRow(nth === 0 ? tick : undefined, { ...level, wrappers: ['study-level'] }),
        ...atInput,
      ];
    });
  });
}

function requirementRow(tick: StudyField | undefined, level?: StudyField): StudyField {
  return {
    type: 'study-requirement',
    fieldGroup: [...(tick === undefined ? [] : [tick]), ...(level === undefined ? [] : [level])],
  };
}

function tickField(path: readonly PathPart[], measure: Measure): StudyField {
  const lens: Lens = {
    read: (study) => listAt(study, path).some((item) => item.measure === measure),
    write: (study, value) => {
      const rest = listAt(study, path).filter((item) => item.measure !== measure);
      const chosen = value === true ? inOrder([...rest, fresh(measure)]) : rest;
      // The list may not be empty, and stability is always required.
      return withValueAt(study, path, chosen.length > 0 ? chosen : [fresh('stability')]);
    },
  };
  return {
    key: [`${path.join('.')}:${measure}`],
    type: 'study-tick',
    props: { label: MEASURE_WORDS[measure], lens, disabled: measure === 'stability' },
  };
}

function listAt(study: Study, path: readonly PathPart[]): readonly Requirement[] {
  const list = valueAt(study, path);
  return Array.isArray(list) ? (list as Requirement[]) : [];
}

function inOrder(list: readonly Requirement[]): Requirement[] {
  return [...list].sort((one, other) => MEASURES.indexOf(one.measure) - MEASURES.indexOf(other.measure));
}

function fresh(measure: Measure): Requirement {
  return measure === 'stability' ? { measure } : { measure, atLeast: FIRST_LEVEL[measure] };
}
