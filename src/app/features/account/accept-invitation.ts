import { ChangeDetectionStrategy, Component, effect, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { ActivatedRoute, Router } from '@angular/router';
import { map } from 'rxjs';
import {
  acceptInvitationSchema,
  invitationSchema,
  passwordSchema,
  signedInSchema,
  titleSchema,
} from '../../../../shared/contracts/api';
import { Api, loaded } from '../../core/api';
import { submission, validBy } from '../../core/form';
import { pageHead } from '../../core/page';
import { Session } from '../../core/session';
import { TextField } from '../../ui/form';
import { WhenLoaded } from '../../ui/states';
import { Entrance } from './entrance';

@Component({
  selector: 'app-accept-invitation',
  imports: [Entrance, ReactiveFormsModule, TextField, WhenLoaded],
  template: `
    <app-entrance title="Accept the invitation">
      <ng-container *appWhenLoaded="invitation; let invitation">
        <p>
          {{ invitation.organisation }} invites <strong>{{ invitation.email }}</strong>. Choose a password,
          and you are in.
        </p>
        <form class="form" [formGroup]="form" (ngSubmit)="accept()" novalidate>
          @if (submission.fault(); as fault) {
            <p class="form-fault" role="alert">{{ fault }}</p>
          }
          <app-text-field label="Your name" autocomplete="name" [control]="form.controls.name" />
          <app-text-field
            label="Password"
            type="password"
            autocomplete="new-password"
            hint="At least 12 characters"
            [control]="form.controls.password"
          />
          <div class="acts">
            <button type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
              Accept and sign in
            </button>
          </div>
        </form>
      </ng-container>
    </app-entrance>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AcceptInvitation {
  private readonly api = inject(Api);
  private readonly session = inject(Session);
  private readonly router = inject(Router);
  private readonly token = toSignal(
    inject(ActivatedRoute).paramMap.pipe(map((params) => params.get('token') ?? '')),
    { requireSync: true },
  );

  protected readonly invitation = loaded(() => this.path(), invitationSchema, 'this invitation');
  protected readonly form = new FormGroup({
    name: new FormControl('', { nonNullable: true, validators: validBy(titleSchema) }),
    password: new FormControl('', { nonNullable: true, validators: validBy(passwordSchema) }),
  });
  protected readonly submission = submission(this.form);

  constructor() {
    pageHead(() => ({ title: 'Accept the invitation', trail: [] }));
    effect(() => {
      const name = this.invitation.value()?.name;
      if (name !== undefined && this.form.controls.name.pristine) this.form.controls.name.setValue(name);
    });
  }

  protected async accept(): Promise<void> {
    await this.submission.send(async () => {
      const body = acceptInvitationSchema.parse(this.form.getRawValue());
      this.session.enter(await this.api.send('POST', `${this.path()}/accept`, signedInSchema, body));
      await this.router.navigateByUrl('/');
    });
  }

  private path(): string {
    return `/api/invitations/${encodeURIComponent(this.token())}`;
  }
}
