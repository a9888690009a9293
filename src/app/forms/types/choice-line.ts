import { ChangeDetectionStrategy, Component, computed } from '@angular/core';
import { StudyFieldType } from './study-field-type';

/** One of a few words. A value that is none of them is shown as it is. */
@Component({
  selector: 'app-choice-line',
  template: `
    @if (readOnly()) {
      <span class="figure">{{ word() }}</span>
    } @else {
      <select
        [id]="id"
        [attr.aria-describedby]="hasFault() ? faultsId : null"
        [attr.aria-invalid]="hasFault() || null"
        (change)="choose($event)"
      >
        @for (choice of choices(); track choice.value) {
          <option [value]="choice.value" [selected]="choice.value === chosen()">{{ choice.label }}</option>
        }
      </select>
    }
  `,
  styleUrls: ['./field-input.scss'],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ChoiceLine extends StudyFieldType {
  protected readonly chosen = computed(() => String(this.value() ?? ''));
  protected readonly choices = computed(() => {
    const choices = this.props.choices ?? [];
    const value = this.chosen();
    return choices.some((choice) => choice.value === value)
      ? choices
      : [{ value, label: value === '' ? 'not chosen' : value }, ...choices];
  });
  protected readonly word = computed(
    () => this.choices().find(({ value }) => value === this.chosen())?.label ?? '',
  );

  protected choose(event: Event): void {
    this.set((event.target as HTMLSelectElement).value);
  }
}
