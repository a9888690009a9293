import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { ActivatedRoute, Router } from '@angular/router';
import { signInSchema } from '../../../../shared/contracts/api';
import { Refusal } from '../../core/api';
import { submission, validBy } from '../../core/form';
import { pageHead } from '../../core/page';
import { ownPath, Session } from '../../core/session';
import { TextField } from '../../ui/form';
import { Entrance } from './entrance';

@Component({
  selector: 'app-sign-in',
  imports: [Entrance, ReactiveFormsModule, TextField],
  template: `
    <app-entrance title="Sign in">
      @if (expired) {
        <p class="message" role="status">Your session ended. Sign in to go on where you were.</p>
      }
      <form class="form" [formGroup]="form" (ngSubmit)="signIn()" novalidate>
        @if (submission.fault(); as fault) {
          <p class="form-fault" role="alert">{{ fault }}</p>
        }
        <app-text-field
          label="E-mail address"
          type="email"
          autocomplete="username"
          [control]="form.controls.email"
        />
        <app-text-field
          label="Password"
          type="password"
          autocomplete="current-password"
          [control]="form.controls.password"
        />
        <div class="acts">
          <button type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
            Sign in
          </button>
        </div>
      </form>
      <p class="note">No account yet? An administrator of your organisation can invite you.</p>
    </app-entrance>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignInPage {
  private readonly session = inject(Session);
  private readonly router = inject(Router);
  private readonly query = inject(ActivatedRoute).snapshot.queryParamMap;

  protected readonly expired = this.query.get('expired') !== null;
  protected readonly form = new FormGroup({
    email: new FormControl('', { nonNullable: true, validators: validBy(signInSchema.shape.email.min(1)) }),
    password: new FormControl('', { nonNullable: true, validators: validBy(signInSchema.shape.password) }),
  });
  protected readonly submission = submission(this.form);

  constructor() {
    pageHead(() => ({ title: 'Sign in', trail: [] }));
  }

  protected async signIn(): Promise<void> {
    await this.submission.send(async () => {
      try {
        await this.session.signIn(signInSchema.parse(this.form.getRawValue()));
      } catch (error) {
        if (!(error instanceof Refusal) || error.status !== 401) throw error;
        this.submission.say('E-mail address or password is wrong.');
        return;
      }
      await this.router.navigateByUrl(ownPath(this.query.get('then')));
    });
  }
}
