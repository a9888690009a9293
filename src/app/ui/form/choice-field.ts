import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';

export interface Choice {
  readonly value: string;
  readonly label: string;
}

/** One of a few words. */
@Component({
  selector: 'app-choice-field',
  imports: [ReactiveFormsModule, MatFormFieldModule, MatInputModule],
  template: `
    <mat-form-field appearance="outline" subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      <select matNativeControl [formControl]="control()">
        @for (choice of choices(); track choice.value) {
          <option [value]="choice.value">{{ choice.label }}</option>
        }
      </select>
      @if (hint(); as hint) {
        <mat-hint>{{ hint }}</mat-hint>
      }
    </mat-form-field>
  `,
  styles: `
    :host,
    mat-form-field {
      display: block;
    }
    :host {
      padding: 0.375rem 0 0.25rem;
    }
    option {
      background: var(--raised);
      color: var(--ink);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ChoiceField {
  readonly control = input.required<FormControl<string>>();
  readonly label = input.required<string>();
  readonly choices = input.required<readonly Choice[]>();
  readonly hint = input<string>();
}
