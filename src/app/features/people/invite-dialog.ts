import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatDialogRef } from '@angular/material/dialog';
import { inviteSchema, personSchema, type Person } from '../../../../shared/contracts/api';
import { Api } from '../../core/api';
import { submission, validBy } from '../../core/form';
import { DialogFrame } from '../../ui/dialog';
import { ChoiceField, TextField, type Choice } from '../../ui/form';

@Component({
  selector: 'app-invite-dialog',
  imports: [ChoiceField, DialogFrame, ReactiveFormsModule, TextField],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="invite()" novalidate>
      <app-dialog-frame title="Invite a person">
        @if (submission.fault(); as fault) {
          <p class="form-fault" role="alert">{{ fault }}</p>
        }
        <app-text-field label="Name" [control]="form.controls.name" />
        <app-text-field label="E-mail address" type="email" [control]="form.controls.email" />
        <app-choice-field
          label="Role in the organisation"
          hint="Roles in products are given on the product's page"
          [choices]="roles"
          [control]="form.controls.role"
        />
        <label class="tick">
          <input type="checkbox" formControlName="mayCreateProducts" />
          May create products
        </label>
        <button dialogActs type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
          Send invitation
        </button>
      </app-dialog-frame>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class InviteDialog {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<InviteDialog, Person>>(MatDialogRef);

  protected readonly roles: readonly Choice[] = [
    { value: 'member', label: 'Member' },
    { value: 'administrator', label: 'Administrator' },
  ];
  protected readonly form = new FormGroup({
    name: new FormControl('', { nonNullable: true, validators: validBy(inviteSchema.shape.name) }),
    email: new FormControl('', { nonNullable: true, validators: validBy(inviteSchema.shape.email) }),
    role: new FormControl('member', { nonNullable: true }),
    mayCreateProducts: new FormControl(false, { nonNullable: true }),
  });
  protected readonly submission = submission(this.form);

  protected async invite(): Promise<void> {
    await this.submission.send(async () => {
      const invite = inviteSchema.parse(this.form.getRawValue());
      this.dialog.close(await this.api.send('POST', '/api/people/invitations', personSchema, invite));
    });
  }
}
