import { formatPath, type PathPart, type Study } from '../../../../shared/contracts';
import { valueAt, withValueAt } from '../values/at-path';
import { unitText } from '../values/unit-text';
import { requirementFields } from './requirement-fields';
import {
  actField,
  choiceField,
  groupField,
  optionalLensAt,
  optionalScalarField,
  scalarField,
  textField,
  type Lens,
  type StudyField,
} from './study-field';

const NO_PAYLOAD = '';

/** Which parameter is the payload, how far it is searched, and what the plate says with which tests. */
export function ratingFields(study: Study): StudyField[] {
  const payload = study.parameters.find(({ id }) => id === study.payload);
  const unit = unitText(payload?.unit ?? '');
  const choice = choiceField(
    ['payload'],
    {
      label: 'Payload',
      choices: [
        ...study.parameters.map(({ id, label }) => ({
          value: id,
          label: label === undefined ? id : `${label}, ${id}`,
        })),
        { value: NO_PAYLOAD, label: 'None' },
      ],
    },
    payloadLens,
  );
  if (payload === undefined) return [choice];
  const part = (key: 'payload' | 'step', label: string) => {
    const path = ['rating', key];
    return optionalScalarField(path, { label, unit, placeholder: 'none' }, optionalLensAt(path, ['rating']));
  };
  return [
    choice,
    part('payload', 'Rated payload'),
    part('step', 'Plate step'),
    optionalScalarField(['searchUpTo'], { label: 'Search up to', unit, placeholder: '5 × high' }),
    optionalScalarField(['searchDownTo'], { label: 'Search down to', unit, placeholder: '0' }),
    ...(study.rating?.tests ?? []).map((test, index) => testField(study, test.name, index)),
    actField('Add an over-load test', (now) =>
      withValueAt(
        now,
        ['rating', 'tests'],
        [
          ...(now.rating?.tests ?? []),
          { name: `test ${(now.rating?.tests?.length ?? 0) + 1}`, factor: 1.25 },
        ],
      ),
    ),
  ];
}

const payloadLens: Lens = {
  read: ({ payload }) => payload ?? NO_PAYLOAD,
  write: (study, value) => withValueAt(study, ['payload'], value === NO_PAYLOAD ? undefined : value),
};

function testField(study: Study, name: string, index: number): StudyField {
  const path: readonly PathPart[] = ['rating', 'tests', index];
  const own: readonly PathPart[] = [...path, 'requirements'];
  const hasOwn = valueAt(study, own) !== undefined;
  return {
    type: 'study-parameter',
    props: { path: formatPath(path) },
    fieldGroup: [
      scalarField([...path, 'factor'], { symbol: '×', label: `Test, ${name}` }),
      textField([...path, 'name'], { label: 'Name' }, textLens([...path, 'name'])),
      textField([...path, 'clause'], { label: 'Clause' }, textLens([...path, 'clause'])),
      ...(hasOwn
        ? [
            groupField('Required in this test', requirementFields(study, own)),
            actField("Use the study's requirements", (now) => withValueAt(now, own, undefined)),
          ]
        : [
            actField('Give it requirements of its own', (now) =>
              withValueAt(now, own, [{ measure: 'stability' }]),
            ),
          ]),
      actField(`Remove the ${name} test`, (now) => withoutTest(now, index)),
    ],
  };
}

function textLens(path: readonly PathPart[]): Lens {
  return {
    read: (study) => valueAt(study, path) as string | undefined,
    write: (study, value) => withValueAt(study, path, value ?? ''),
  };
}

function withoutTest(study: Study, index: number): Study {
  const without = withValueAt(study, ['rating', 'tests', index], undefined);
  if ((without.rating?.tests ?? []).length > 0) return without;
  const bare = withValueAt(without, ['rating', 'tests'], undefined);
  return Object.keys(bare.rating ?? {}).length > 0 ? bare : withValueAt(bare, ['rating'], undefined);
}
