import {
  isTemplateMachine,
  PARAMETER_KINDS,
  type Parameter,
  type PathPart,
  type Study,
} from '../../../../shared/contracts';
import { templateOf } from '../../../../shared/machines';
import { units } from '../../../../shared/units';
import { withValueAt } from '../values/at-path';
import { unitText } from '../values/unit-text';
import {
  actField,
  choiceField,
  groupField,
  lensAt,
  optionalScalarField,
  scalarField,
  textField,
  type Lens,
  type StudyField,
} from './study-field';

const KIND_WORDS = {
  tolerance: 'Tolerance, from manufacture',
  use: 'Use, chosen by the operator',
  wear: 'Wear, over the life',
};

/** A row for every parameter, which opens to its band, kind and limits; then the definitions. */
export function parameterFields(study: Study): StudyField[] {
  const names = Object.keys(study.definitions ?? {});
  return [
    ...study.parameters.map((parameter, index) => parameterField(study, parameter, index)),
    actField('Add a parameter', withNewParameter),
    ...(names.length === 0
      ? []
      : [groupField('Definitions', names.map(definitionField), 'Names for expressions; values in SI')]),
    actField('Add a definition', withNewDefinition),
  ];
}

function parameterField(study: Study, parameter: Parameter, index: number): StudyField {
  const { machine } = study;
  const known = isTemplateMachine(machine)
    ? templateOf(machine.template).parameters.find(({ id }) => id === parameter.id)
    : undefined;
  const at = (key: keyof Parameter) => ['parameters', index, key];
  const unit = unitText(parameter.unit ?? '');
  const end = (key: 'low' | 'high' | 'minimum' | 'maximum', label: string, placeholder: string) =>
    optionalScalarField(at(key), { label, unit, placeholder });
  return {
    type: 'study-parameter',
    props: { path: `parameters[${index}]`, ...(known === undefined ? {} : { hint: known.hint }) },
    fieldGroup: [
      scalarField(at('nominal'), {
        symbol: known?.symbol ?? parameter.id,
        label: parameter.label ?? known?.label ?? parameter.id,
        unit,
      }),
      end('low', 'Band from', 'exact'),
      end('high', 'Band to', 'exact'),
      choiceField(
        at('kind'),
        {
          label: 'Kind',
          choices: PARAMETER_KINDS.map((value) => ({ value, label: KIND_WORDS[value] })),
        },
        kindLens(at('kind')),
      ),
      end('minimum', 'Never below', 'none'),
      end('maximum', 'Never above', 'none'),
      textField(at('label'), { label: 'Name' }, optionalText(at('label'))),
      textField(
        at('unit'),
        { label: 'Unit', choices: unitChoices(parameter.unit) },
        optionalText(at('unit')),
      ),
      ...(known === undefined
        ? [
            textField(at('id'), { label: 'Symbol' }, requiredText(at('id'))),
            actField(`Remove ${parameter.label ?? parameter.id}`, (now) =>
              withValueAt(now, ['parameters', index], undefined),
            ),
          ]
        : []),
    ],
  };
}

/** Units that measure the same quantity. */
function unitChoices(label: string | undefined) {
  const dimension = units.find((unit) => unit.label === label?.replaceAll(' ', '·'))?.dimension;
  return units
    .filter((unit) => unit.dimension === dimension)
    .map((unit) => ({ value: unit.label.replaceAll('·', ' '), label: unit.label.replaceAll('·', ' ') }));
}

function kindLens(path: readonly PathPart[]): Lens {
  const { read, write } = lensAt(path);
  return { read: (study) => read(study) ?? 'tolerance', write };
}

function optionalText(path: readonly PathPart[]): Lens {
  const { read, write } = lensAt(path);
  return { read, write: (study, value) => write(study, value === '' ? undefined : value) };
}

function requiredText(path: readonly PathPart[]): Lens {
  const { read, write } = lensAt(path);
  return { read, write: (study, value) => write(study, value ?? '') };
}

function definitionField(name: string): StudyField {
  return {
    type: 'study-parameter',
    props: { path: `definitions.${name}` },
    fieldGroup: [
      scalarField(['definitions', name], { label: name }),
      textField(['definitions', name, 'name'], { label: 'Symbol' }, definitionName(name)),
      actField(`Remove ${name}`, (study) => {
        const without = withValueAt(study, ['definitions', name], undefined);
        return Object.keys(without.definitions ?? {}).length > 0
          ? without
          : withValueAt(without, ['definitions'], undefined);
      }),
    ],
  };
}

/** Renames a definition at its place; a name that is taken is refused. */
function definitionName(name: string): Lens {
  return {
    read: () => name,
    write: (study, value) => {
      const given = String(value ?? '').trim();
      if (given === '' || Object.hasOwn(study.definitions ?? {}, given)) return study;
      const entries = Object.entries(study.definitions ?? {});
      return {
        ...study,
        definitions: Object.fromEntries(entries.map(([key, item]) => [key === name ? given : key, item])),
      };
    },
  };
}

function withNewParameter(study: Study): Study {
  return { ...study, parameters: [...study.parameters, { id: freeName(study, 'p'), nominal: 1 }] };
}

function withNewDefinition(study: Study): Study {
  return { ...study, definitions: { ...study.definitions, [freeName(study, 'd')]: 1 } };
}

function freeName({ parameters, definitions }: Study, letter: string): string {
  const taken = new Set([...parameters.map(({ id }) => id), ...Object.keys(definitions ?? {})]);
  let number = 1;
  while (taken.has(`${letter}${number}`)) number += 1;
  return `${letter}${number}`;
}
