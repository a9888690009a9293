import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FieldType, FormlyField, type FormlyFieldConfig } from '@ngx-formly/core';
import { Description } from '../description';
import type { StudyProps } from '../fields/study-field';

/** A row that opens to what else there is to say about it; open by itself where that has a fault. */
@Component({
  selector: 'app-parameter-row',
  imports: [FormlyField],
  template: `
    <div class="head">
      <formly-field [field]="field.fieldGroup![0]" />
      <button
        type="button"
        [attr.aria-expanded]="opened()"
        [attr.aria-controls]="id + '-more'"
        [attr.aria-label]="'More of ' + field.fieldGroup![0].props?.label"
        (click)="toggle()"
      >
        <svg viewBox="0 0 10 10" aria-hidden="true"><path d="M2 3.5L5 6.5L8 3.5" /></svg>
      </button>
    </div>
    @if (opened()) {
      <div class="more" [id]="id + '-more'">
        @if (props.hint; as hint) {
          <p class="second">{{ hint }}</p>
        }
        @for (part of rest(); track $index) {
          <formly-field [field]="part" />
        }
      </div>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .head {
      position: relative;
    }
    button {
      position: absolute;
      top: 0;
      right: 0;
      width: 16px;
      height: 24px;
      padding: 0;
      border: 0;
      background: none;
      cursor: pointer;
    }
    svg {
      width: 10px;
      fill: none;
      stroke: var(--ink-second);
      stroke-width: 1.5;
    }
    [aria-expanded='true'] svg {
      transform: rotate(180deg);
    }
    .more {
      margin: 0.125rem 0 0.625rem;
      padding-left: 0.5rem;
      border-left: 2px solid var(--rule);
    }
    .more p {
      margin-bottom: 0.25rem;
      font-size: 0.75rem;
      line-height: 1rem;
    }
    formly-field {
      display: block;
    }
    @media (pointer: coarse) {
      button {
        width: 44px;
        height: 44px;
        right: -14px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParameterRow extends FieldType<FormlyFieldConfig<StudyProps>> {
  private readonly description = inject(Description);
  private readonly chosen = signal(false);

  protected readonly opened = computed(
    () =>
      this.chosen() ||
      this.rest().some(({ props }) => {
        const path = props?.path;
        return path !== undefined && this.description.problems().at(path).length > 0;
      }),
  );

  protected rest(): FormlyFieldConfig<StudyProps>[] {
    return this.field.fieldGroup?.slice(1) ?? [];
  }

  protected toggle(): void {
    this.chosen.set(!this.opened());
  }
}
