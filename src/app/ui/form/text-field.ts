import { ChangeDetectionStrategy, Component, booleanAttribute, input } from '@angular/core';
import { ReactiveFormsModule, type FormControl } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { faultText } from './fault-text';

/** One line of text with its label above the line's edge, a hint, and the fault under it once it was left. */
@Component({
  selector: 'app-text-field',
  imports: [ReactiveFormsModule, MatFormFieldModule, MatInputModule],
  template: `
    <mat-form-field appearance="outline" subscriptSizing="dynamic">
      <mat-label>{{ label() }}</mat-label>
      @if (lines() > 1) {
        <textarea matInput [formControl]="control()" [rows]="lines()"></textarea>
      } @else {
        <input
          matInput
          [type]="type()"
          [formControl]="control()"
          [autocomplete]="autocomplete()"
          [attr.autocapitalize]="type() === 'text' ? null : 'none'"
        />
      }
      @if (hint(); as hint) {
        <mat-hint>{{ hint }}</mat-hint>
      }
      <mat-error>{{ fault() }}</mat-error>
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
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TextField {
  readonly control = input.required<FormControl<string>>();
  readonly label = input.required<string>();
  readonly type = input<'text' | 'email' | 'password'>('text');
  readonly autocomplete = input('off');
  readonly hint = input<string>();
  readonly lines = input(1);
  readonly disabled = input(false, { transform: booleanAttribute });

  protected fault(): string {
    return faultText(this.label(), this.control().errors);
  }
}
