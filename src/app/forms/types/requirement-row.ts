import { ChangeDetectionStrategy, Component } from '@angular/core';
import { FieldType, FormlyField, type FormlyFieldConfig } from '@ngx-formly/core';
import type { StudyProps } from '../fields/study-field';

/** A tick and, beside it, the level. */
@Component({
  selector: 'app-requirement-row',
  imports: [FormlyField],
  template: `
    <div class="row">
      @for (part of field.fieldGroup; track $index) {
        <formly-field [field]="part" />
      }
    </div>
  `,
  styleUrls: ['./row.scss'],
  styles: `
    formly-field {
      display: contents;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RequirementRow extends FieldType<FormlyFieldConfig<StudyProps>> {}
