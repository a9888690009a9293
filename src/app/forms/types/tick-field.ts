import { ChangeDetectionStrategy, Component } from '@angular/core';
import { StudyFieldType } from './study-field-type';

/** A tick with its words; they stand in the first two columns of the row around them. */
@Component({
  selector: 'app-tick-field',
  template: `
    @if (readOnly()) {
      <span class="mark" aria-hidden="true">{{ value() ? '✓' : '' }}</span>
      <span
        >{{ props.label }}<span class="unseen">{{ value() ? ', required' : ', not required' }}</span></span
      >
    } @else {
      <input
        type="checkbox"
        [id]="id"
        [checked]="value() === true"
        [disabled]="props.disabled === true"
        (change)="toggle($event)"
      />
      <label [for]="id">{{ props.label }}</label>
    }
  `,
  styles: `
    :host {
      display: contents;
    }
    input {
      width: 14px;
      height: 14px;
      margin: 2px 0 0;
      align-self: start;
      accent-color: var(--ink);
    }
    label,
    span {
      color: var(--ink-second);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TickField extends StudyFieldType {
  protected toggle(event: Event): void {
    this.set((event.target as HTMLInputElement).checked);
  }
}
