import {
  lawsOf,
  stateNames,
  type CustomMachine,
  type Law,
  type LawName,
  type PathPart,
  type Study,
} from '../../../../shared/contracts';
import { expandMachine } from '../../../../shared/machines';
import { gainUnit, lawsPath, NO_LAW, signalOf, withLaw } from '../values/switch-law';
import { readScalarText, scalarText } from '../values/number-text';
import { valueAt, withValueAt } from '../values/at-path';
import {
  actField,
  choiceField,
  gridField,
  groupField,
  optionalScalarField,
  scalarField,
  textField,
  type Lens,
  type StudyField,
} from './study-field';

const LAW_WORDS: Readonly<Record<LawName, string>> = {
  pid: 'PID',
  'state-feedback': 'State feedback',
  'transfer-function': 'Transfer function',
  'state-space': 'State space',
};

/** Every law with its gains; another one where the machine has an input without a law. */
export function controlFields(study: Study): StudyField[] {
  const laws = lawsOf(study.control);
  const machine = expandMachine(study.machine);
  if (laws.length === 0) return [lawChoice(study, 0)];
  const fields = laws.map((law, index) => [
    lawChoice(study, index),
    ...lawFields(study, machine, law, index),
  ]);
  const more = Object.keys(machine.inputs ?? {}).length > laws.length;
  return [
    ...(laws.length === 1 ? fields[0] : fields.map((group, index) => groupField(`Law ${index + 1}`, group))),
    ...(more ? [actField('Add a law', (now) => withLaw(now, lawsOf(now.control).length, 'pid'))] : []),
  ];
}

function lawChoice(study: Study, index: number): StudyField {
  return choiceField(
    [...lawsPath(study, index), 'law'],
    {
      label: 'Law',
      choices: [
        ...Object.entries(LAW_WORDS).map(([value, label]) => ({ value, label })),
        { value: NO_LAW, label: 'No control' },
      ],
    },
    {
      read: ({ control }) => lawsOf(control)[index]?.law ?? NO_LAW,
      write: (now, value) => withLaw(now, index, String(value)),
    },
  );
}

function lawFields(study: Study, machine: CustomMachine, law: Law, index: number): StudyField[] {
  const path = lawsPath(study, index);
  const names = (list: readonly string[]) =>
    list.map((name) => ({ value: name, label: signalChoice(study, name) }));
  const inputs = Object.keys(machine.inputs ?? {});
  const outputs = Object.keys(machine.outputs ?? {});
  const acts = choiceField([...path, 'input'], { label: 'Acts on', choices: names(inputs) });
  if (law.law === 'state-feedback')
    return [acts, ...stateFeedbackFields(study, machine, law, path, names(outputs))];
  const measures = choiceField([...path, 'output'], { label: 'Measures', choices: names(outputs) });
  switch (law.law) {
    case 'pid': {
      const unit = (integrations: number) => gainUnit(study, law.input, law.output, integrations);
      return [
        measures,
        acts,
        scalarField([...path, 'kp'], { symbol: 'K_p', label: 'Proportional', unit: unit(0) }),
        scalarField([...path, 'ki'], { symbol: 'K_i', label: 'Integral', unit: unit(1) }),
        scalarField([...path, 'kd'], { symbol: 'K_d', label: 'Derivative', unit: unit(-1) }),
        optionalScalarField([...path, 'derivativeTime'], {
          symbol: 'T_d',
          label: 'Derivative time',
          unit: 's',
          placeholder: 'ideal',
        }),
      ];
    }
    case 'transfer-function':
      return [measures, acts, coefficients(path, 'numerator'), coefficients(path, 'denominator')];
    case 'state-space': {
      const states = law.A.map((_, state) => `x${state + 1}`);
      return [
        measures,
        acts,
        gridField('A', [...path, 'A'], states, states, (row, column) => [...path, 'A', row, column]),
        gridField('B', [...path, 'B'], states, [''], (row) => [...path, 'B', row]),
        gridField('C', [...path, 'C'], [''], states, (_, column) => [...path, 'C', column]),
        scalarField([...path, 'D'], { label: 'D' }),
        actField('Add a state', (now) => resizedLaw(now, path, 1)),
        actField('Remove the last state', (now) => resizedLaw(now, path, -1)),
      ];
    }
  }
}

function stateFeedbackFields(
  study: Study,
  machine: CustomMachine,
  law: Extract<Law, { law: 'state-feedback' }>,
  path: readonly PathPart[],
  outputs: readonly { value: string; label: string }[],
): StudyField[] {
  const gains = stateNames(machine).map((name) => {
    const at = [...path, 'gains', name];
    const velocity = name.endsWith("'");
    const coordinate = velocity ? name.slice(0, -1) : name;
    return optionalScalarField(at, {
      label: `Gain on ${velocity ? `velocity of ${coordinate}` : coordinate}`,
      unit: gainUnit(study, law.input, coordinate, velocity ? -1 : 0),
      placeholder: '0',
    });
  });
  if (law.integral === undefined) {
    return [
      ...gains,
      ...(outputs.length === 0
        ? []
        : [
            actField('Add an integral', (now) =>
              withValueAt(now, [...path, 'integral'], { output: outputs[0].value, gain: 0 }),
            ),
          ]),
    ];
  }
  return [
    ...gains,
    choiceField([...path, 'integral', 'output'], { label: 'Integral of', choices: outputs }),
    scalarField([...path, 'integral', 'gain'], {
      label: 'Integral gain',
      unit: gainUnit(study, law.input, law.integral.output, 1),
    }),
    actField('Remove the integral', (now) => withValueAt(now, [...path, 'integral'], undefined)),
  ];
}

function signalChoice(study: Study, name: string): string {
  const { label } = signalOf(study, name);
  return label === name ? name : `${label}, ${name}`;
}

/** Coefficients in descending powers, as one text: `1, 3` or `0.2; tau; 1`. */
function coefficients(path: readonly PathPart[], key: 'numerator' | 'denominator'): StudyField {
  const at = [...path, key];
  const lens: Lens = {
    read: (study) => {
      const list = valueAt(study, at);
      return Array.isArray(list) ? list.map((item: string | number) => scalarText(item)).join('; ') : '';
    },
    write: (study, value) =>
      withValueAt(
        study,
        at,
        String(value ?? '')
          .split(';')
          .map((text) => readScalarText(text) ?? ''),
      ),
  };
  return textField(
    at,
    {
      label: key === 'numerator' ? 'Numerator' : 'Denominator',
      hint: 'Descending powers of s, separated by semicolons',
    },
    lens,
  );
}

/** A state-space law with one state more or fewer; it keeps at least one. */
function resizedLaw(study: Study, path: readonly PathPart[], change: 1 | -1): Study {
  const law = valueAt(study, path) as Extract<Law, { law: 'state-space' }>;
  const size = Math.max(1, law.A.length + change);
  const places = Array.from({ length: size }, (_, place) => place);
  return withValueAt(study, path, {
    ...law,
    A: places.map((row) => places.map((column) => law.A[row]?.[column] ?? (row === column ? -1 : 0))),
    B: places.map((place) => law.B[place] ?? 0),
    C: places.map((place) => law.C[place] ?? 0),
  });
}
