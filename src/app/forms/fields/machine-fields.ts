import {
  isSecondOrder,
  isTemplateMachine,
  type CustomMachine,
  type PathPart,
  type Study,
} from '../../../../shared/contracts';
import { templateOf, templates } from '../../../../shared/machines';
import { readNames, withSignals, withStates } from '../values/resized-machine';
import { machineChoice, OWN_MACHINE, OWN_STATES, withMachine } from '../values/switch-machine';
import {
  actField,
  choiceField,
  gridField,
  groupField,
  textField,
  type FieldValue,
  type Lens,
  type StudyField,
} from './study-field';

/** The choice of a template and, for an own machine, its names and matrices. */
export function machineFields({ machine }: Study): StudyField[] {
  const hint = isTemplateMachine(machine) ? templateOf(machine.template) : undefined;
  const choice = choiceField(
    ['machine', 'template'],
    {
      label: 'Kind',
      choices: [
        ...templates.map(({ id, label }) => ({ value: id, label })),
        { value: OWN_MACHINE, label: 'Own machine: mass, damping, stiffness' },
        { value: OWN_STATES, label: 'Own machine: states' },
      ],
      ...(hint === undefined ? {} : { hint: `${hint.purpose} Left out: ${lowered(hint.leavesOut)}` }),
    },
    {
      read: machineChoice,
      write: (study, value) => withMachine(study, String(value)),
    },
  );
  return isTemplateMachine(machine) ? [choice] : [choice, ...customFields(machine)];
}

function lowered(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1);
}

function customFields(machine: CustomMachine): StudyField[] {
  const second = isSecondOrder(machine);
  const key = second ? 'coordinates' : 'states';
  const names = second ? machine.coordinates : machine.states;
  const matrix = (head: string, name: string) =>
    gridField(head, ['machine', name], names, names, (row, column) => ['machine', name, row, column]);
  const vectors = (head: string, part: 'inputs' | 'disturbances') =>
    Object.keys(machine[part] ?? {}).map((name) =>
      gridField(`${head} ${name}`, ['machine', part, name], [''], names, (_, column) => [
        'machine',
        part,
        name,
        column,
      ]),
    );
  return [
    textField(['machine', key], { label: second ? 'Coordinates' : 'States' }, statesLens),
    ...(second
      ? [matrix('Mass', 'mass'), matrix('Damping', 'damping'), matrix('Stiffness', 'stiffness')]
      : [
          ...(machine.descriptor === undefined
            ? [actField('Add a descriptor matrix', withDescriptor)]
            : [matrix('Descriptor', 'descriptor')]),
          matrix('Dynamics', 'dynamics'),
        ]),
    groupField('Inputs', [signalNames('inputs'), ...vectors('Input', 'inputs')]),
    groupField('Disturbances', [signalNames('disturbances'), ...vectors('Disturbance', 'disturbances')]),
    groupField('Outputs', [signalNames('outputs'), ...outputFields(machine, names)]),
  ];
}

function outputFields(machine: CustomMachine, names: readonly string[]): StudyField[] {
  const row = (head: string, path: readonly PathPart[]) =>
    gridField(head, path, [''], names, (_, column) => [...path, column]);
  if (!isSecondOrder(machine)) {
    return Object.keys(machine.outputs ?? {}).map((name) =>
      row(`Output ${name}`, ['machine', 'outputs', name]),
    );
  }
  return Object.entries(machine.outputs ?? {}).flatMap(([name, output]) =>
    (['position', 'velocity'] as const).map((part) =>
      output[part] === undefined
        ? actField(`Add a ${part} part to ${name}`, (study) => withOutputPart(study, name, part))
        : row(`Output ${name}, ${part}`, ['machine', 'outputs', name, part]),
    ),
  );
}

const statesLens: Lens = {
  read: ({ machine }) => {
    if (isTemplateMachine(machine)) return '';
    return (isSecondOrder(machine) ? machine.coordinates : machine.states).join(', ');
  },
  write: (study, value) => withCustom(study, (machine) => withStates(machine, namesOf(value))),
};

function signalNames(key: 'inputs' | 'disturbances' | 'outputs'): StudyField {
  return textField(
    ['machine', key],
    { label: 'Names' },
    {
      read: ({ machine }) => (isTemplateMachine(machine) ? '' : Object.keys(machine[key] ?? {}).join(', ')),
      write: (study, value) => withCustom(study, (machine) => withSignals(machine, key, namesOf(value))),
    },
  );
}

function namesOf(value: FieldValue): string[] {
  return [...new Set(readNames(value === undefined ? '' : String(value)))];
}

function withCustom(study: Study, change: (machine: CustomMachine) => CustomMachine): Study {
  return isTemplateMachine(study.machine) ? study : { ...study, machine: change(study.machine) };
}

function withDescriptor(study: Study): Study {
  return withCustom(study, (machine) =>
    isSecondOrder(machine)
      ? machine
      : {
          ...machine,
          descriptor: machine.states.map((_, row) =>
            machine.states.map((__, column) => (row === column ? '1' : '0')),
          ),
        },
  );
}

function withOutputPart(study: Study, name: string, part: 'position' | 'velocity'): Study {
  return withCustom(study, (machine) =>
    isSecondOrder(machine)
      ? {
          ...machine,
          outputs: {
            ...machine.outputs,
            [name]: { ...machine.outputs?.[name], [part]: machine.coordinates.map(() => '0') },
          },
        }
      : machine,
  );
}
