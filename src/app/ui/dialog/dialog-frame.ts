import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatDialogModule } from '@angular/material/dialog';

/** Title, content and acts of a dialog; what is marked `dialogActs` stands in the last row. */
@Component({
  selector: 'app-dialog-frame',
  imports: [MatDialogModule],
  template: `
    <h2 mat-dialog-title>{{ title() }}</h2>
    <mat-dialog-content>
      <ng-content />
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" class="button" mat-dialog-close>{{ leave() }}</button>
      <ng-content select="[dialogActs]" />
    </mat-dialog-actions>
  `,
  styles: `
    h2[mat-dialog-title] {
      padding: 1.125rem 1.25rem 0.25rem;
      font-size: 1.375rem;
      font-stretch: 75%;
      font-weight: 680;
    }
    h2[mat-dialog-title]::before {
      display: none;
    }
    mat-dialog-content.mat-mdc-dialog-content {
      padding: 0.5rem 1.25rem;
      color: var(--ink);
    }
    mat-dialog-actions {
      gap: 0.75rem;
      padding: 0.75rem 1.25rem 1.125rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DialogFrame {
  readonly title = input.required<string>();
  /** What the button that changes nothing says. */
  readonly leave = input('Cancel');
}
