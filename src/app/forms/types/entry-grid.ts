import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { FieldType, FormlyField, type FormlyFieldConfig } from '@ngx-formly/core';
import { Description } from '../description';
import { SymbolText } from '../drawing/symbol-text';
import type { FieldValue, StudyField, StudyProps } from '../fields/study-field';
import { figureText } from '../values/number-text';
import { FieldFaults } from './field-faults';

interface Entry {
  readonly field: StudyField;
  readonly value: FieldValue;
  /** The number that an expression gives at the nominal point. */
  readonly figure: string;
}

/** A matrix or vector of expressions, each with the number it gives at the nominal point. */
@Component({
  selector: 'app-entry-grid',
  imports: [FormlyField, SymbolText, FieldFaults],
  template: `
    <div class="scroll">
      <table>
        <caption>
          {{
            props.head
          }}
        </caption>
        @if (hasColumnNames()) {
          <thead>
            <tr>
              @if (hasRowNames()) {
                <td></td>
              }
              @for (name of props.columnNames; track $index) {
                <th scope="col"><app-symbol [symbol]="name" /></th>
              }
            </tr>
          </thead>
        }
        <tbody>
          @for (row of entries(); track $index) {
            <tr>
              @if (hasRowNames()) {
                <th scope="row"><app-symbol [symbol]="props.rowNames![$index]" /></th>
              }
              @for (entry of row; track $index) {
                <td>
                  <formly-field [field]="entry.field" />
                  @if (entry.figure !== '') {
                    <span class="figure">= {{ entry.figure }}</span>
                  }
                </td>
              }
            </tr>
          }
        </tbody>
      </table>
    </div>
    @for (row of entries(); track $index) {
      @for (entry of row; track $index) {
        <app-field-faults
          [id]="entry.field.id + '-faults'"
          [path]="entry.field.props?.path"
          [value]="entry.value"
          [label]="entry.field.props?.label ?? ''"
          [place]="(entry.field.props?.label ?? '') + ': '"
        />
      }
    }
    @for (message of messages(); track $index) {
      <p class="whole">{{ props.head }} {{ message }}.</p>
    }
  `,
  styleUrl: './entry-grid.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EntryGrid extends FieldType<FormlyFieldConfig<StudyProps>> {
  private readonly description = inject(Description);

  protected readonly entries = computed<Entry[][]>(() => {
    const columns = this.props.columnNames?.length ?? 0;
    const study = this.description.draft();
    const values = this.description.values();
    const fields = (this.field.fieldGroup ?? []) as StudyField[];
    return (this.props.rowNames ?? []).map((_, row) =>
      fields.slice(row * columns, (row + 1) * columns).map((field) => {
        const value = field.props?.lens?.read(study);
        const number =
          typeof value === 'string' && Number.isNaN(Number(value)) ? values.of(value) : undefined;
        return { field, value, figure: number === undefined ? '' : figureText(number) };
      }),
    );
  });

  protected readonly messages = computed(() => {
    const { path } = this.props;
    return path === undefined ? [] : this.description.problems().at(path);
  });

  protected hasRowNames(): boolean {
    return this.props.rowNames?.some((name) => name !== '') === true;
  }

  protected hasColumnNames(): boolean {
    return this.props.columnNames?.some((name) => name !== '') === true;
  }
}
