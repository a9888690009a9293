import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { renameSchema } from '../../../../shared/contracts/api';
import { submission, validBy } from '../../core/form';
import { DialogFrame } from '../../ui/dialog';
import { TextField } from '../../ui/form';

export interface RenameData {
  readonly title: string;
  readonly act: string;
  readonly name: string;
  readonly save: (name: string) => Promise<void>;
}

/** Asks for a name: of a copy, or another one of the thing itself. */
@Component({
  selector: 'app-rename-dialog',
  imports: [DialogFrame, ReactiveFormsModule, TextField],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="save()" novalidate>
      <app-dialog-frame [title]="data.title">
        @if (submission.fault(); as fault) {
          <p class="form-fault" role="alert">{{ fault }}</p>
        }
        <app-text-field label="Name" [control]="form.controls.name" />
        <button dialogActs type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
          {{ data.act }}
        </button>
      </app-dialog-frame>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RenameDialog {
  private readonly dialog = inject<MatDialogRef<RenameDialog, true>>(MatDialogRef);

  protected readonly data = inject<RenameData>(MAT_DIALOG_DATA);
  protected readonly form = new FormGroup({
    name: new FormControl(this.data.name, {
      nonNullable: true,
      validators: validBy(renameSchema.shape.name),
    }),
  });
  protected readonly submission = submission(this.form);

  protected async save(): Promise<void> {
    await this.submission.send(async () => {
      await this.data.save(renameSchema.parse(this.form.getRawValue()).name);
      this.dialog.close(true);
    });
  }
}
