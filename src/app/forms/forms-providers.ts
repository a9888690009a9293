import type { EnvironmentProviders, Provider } from '@angular/core';
import { provideFormlyCore } from '@ngx-formly/core';
import { ActButton } from './types/act-button';
import { ChoiceLine } from './types/choice-line';
import { EntryGrid } from './types/entry-grid';
import { FieldGroup } from './types/field-group';
import { FieldRow } from './types/field-row';
import { LevelCells } from './types/level-cells';
import { ParameterRow } from './types/parameter-row';
import { RequirementRow } from './types/requirement-row';
import { ScalarField } from './types/scalar-field';
import { TextLine } from './types/text-line';
import { TickField } from './types/tick-field';

/** What a route needs that shows a description; it belongs to a lazy one, so that the first script stays small. */
export const formsProviders: (Provider | EnvironmentProviders)[] = [
  provideFormlyCore([
    {
      types: [
        { name: 'study-scalar', component: ScalarField },
        { name: 'study-text', component: TextLine },
        { name: 'study-choice', component: ChoiceLine },
        { name: 'study-tick', component: TickField },
        { name: 'study-act', component: ActButton },
        { name: 'study-group', component: FieldGroup },
        { name: 'study-grid', component: EntryGrid },
        { name: 'study-parameter', component: ParameterRow },
        { name: 'study-requirement', component: RequirementRow },
      ],
      wrappers: [
        { name: 'study-row', component: FieldRow },
        { name: 'study-level', component: LevelCells },
      ],
    },
  ]),
];
