import { ChangeDetectionStrategy, Component, computed } from '@angular/core';
import { StudyFieldType } from './study-field-type';

/** One line of text, taken up when the field is left or on Enter: a half-typed name would change what stands around it. */
@Component({
  selector: 'app-text-line',
  template: `
    @if (readOnly()) {
      <span class="figure">{{ text() }}</span>
    } @else {
      <input
        type="text"
        autocomplete="off"
        spellcheck="false"
        [id]="id"
        [value]="text()"
        [placeholder]="props.placeholder ?? ''"
        [attr.list]="props.choices === undefined ? null : id + '-choices'"
        [attr.aria-invalid]="hasFault() || null"
        [attr.aria-describedby]="hasFault() ? faultsId : null"
        (change)="take($event)"
      />
      @if (props.choices; as choices) {
        <datalist [id]="id + '-choices'">
          @for (choice of choices; track choice.value) {
            <option [value]="choice.value"></option>
          }
        </datalist>
      }
    }
  `,
  styleUrls: ['./field-input.scss'],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TextLine extends StudyFieldType {
  protected readonly text = computed(() => String(this.value() ?? ''));

  protected take(event: Event): void {
    this.set((event.target as HTMLInputElement).value.trim());
  }
}
