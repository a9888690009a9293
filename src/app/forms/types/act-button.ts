import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FieldType, type FieldTypeConfig } from '@ngx-formly/core';
import { Description } from '../description';
import type { StudyProps } from '../fields/study-field';

/** A button that changes the study: adds, removes. A reader has none. */
@Component({
  selector: 'app-act-button',
  template: `
    @if (!description.readOnly()) {
      <button type="button" class="link" [id]="id" (click)="act()">{{ props.label }}</button>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    button {
      min-height: 26px;
      font-size: 0.75rem;
    }
    @media (pointer: coarse) {
      button {
        min-height: 44px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ActButton extends FieldType<FieldTypeConfig<StudyProps>> {
  protected readonly description = inject(Description);

  protected act(): void {
    const { act } = this.props;
    if (act !== undefined) this.description.change(act(this.description.draft()));
  }
}
