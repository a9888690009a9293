import { ChangeDetectionStrategy, Component, inject, viewChild } from '@angular/core';
import { FormControl, FormGroup, FormGroupDirective, ReactiveFormsModule } from '@angular/forms';
import { passwordChangeSchema } from '../../../../shared/contracts/api';
import { Api, Refusal } from '../../core/api';
import { submission, validBy } from '../../core/form';
import { Notices } from '../../core/notices';
import { TextField } from '../../ui/form';

@Component({
  selector: 'app-password-form',
  imports: [ReactiveFormsModule, TextField],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="change()" novalidate>
      @if (submission.fault(); as fault) {
        <p class="form-fault" role="alert">{{ fault }}</p>
      }
      <app-text-field
        label="Password now"
        type="password"
        autocomplete="current-password"
        [control]="form.controls.current"
      />
      <app-text-field
        label="New password"
        type="password"
        autocomplete="new-password"
        hint="At least 12 characters"
        [control]="form.controls.next"
      />
      <div class="acts">
        <button type="submit" class="button" [attr.aria-disabled]="submission.sending()">
          Change password
        </button>
      </div>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PasswordForm {
  private readonly api = inject(Api);
  private readonly notices = inject(Notices);
  private readonly shown = viewChild.required(FormGroupDirective);

  protected readonly form = new FormGroup({
    current: new FormControl('', {
      nonNullable: true,
      validators: validBy(passwordChangeSchema.shape.current),
    }),
    next: new FormControl('', { nonNullable: true, validators: validBy(passwordChangeSchema.shape.next) }),
  });
  protected readonly submission = submission(this.form);

  protected async change(): Promise<void> {
    await this.submission.send(async () => {
      try {
        await this.api.act('POST', '/api/session/password', this.form.getRawValue());
      } catch (error) {
        if (!(error instanceof Refusal) || error.status !== 401) throw error;
        this.form.controls.current.setErrors({ fault: 'is not right' });
        return;
      }
      this.shown().resetForm();
      this.notices.say('Password changed.');
    });
  }
}
