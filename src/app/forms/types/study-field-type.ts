import { computed, Directive, inject } from '@angular/core';
import { FieldType, type FieldTypeConfig } from '@ngx-formly/core';
import { Description } from '../description';
import type { FieldValue, StudyProps } from '../fields/study-field';

/** A field that reads its value from the study and writes it through its form control. */
@Directive()
export abstract class StudyFieldType extends FieldType<FieldTypeConfig<StudyProps>> {
  protected readonly description = inject(Description);
  protected readonly readOnly = this.description.readOnly;
  protected readonly value = computed(() => this.props.lens?.read(this.description.draft()));
  protected readonly hasFault = computed(() => {
    const { path } = this.props;
    return path !== undefined && this.description.problems().at(path).length > 0;
  });

  protected set(value: FieldValue): void {
    this.formControl.setValue(value);
  }

  protected get faultsId(): string {
    return `${this.id}-faults`;
  }
}
