import { ChangeDetectionStrategy, Component } from '@angular/core';
import { FieldType, FormlyField, type FormlyFieldConfig } from '@ngx-formly/core';
import type { StudyProps } from '../fields/study-field';

/** Fields under a small heading. */
@Component({
  selector: 'app-field-group',
  imports: [FormlyField],
  template: `
    <fieldset>
      <legend>{{ props.head }}</legend>
      @if (props.hint; as hint) {
        <p class="second">{{ hint }}</p>
      }
      @for (part of field.fieldGroup; track $index) {
        <formly-field [field]="part" />
      }
    </fieldset>
  `,
  styles: `
    fieldset {
      min-width: 0;
      margin: 0.5rem 0 0.25rem;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      font-weight: 600;
    }
    p {
      font-size: 0.75rem;
    }
    formly-field {
      display: block;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FieldGroup extends FieldType<FormlyFieldConfig<StudyProps>> {}
