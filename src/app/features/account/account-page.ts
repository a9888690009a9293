import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { pageHead } from '../../core/page';
import { Session } from '../../core/session';
import { OpenSessions } from './open-sessions';
import { PasswordForm } from './password-form';

@Component({
  selector: 'app-account',
  imports: [OpenSessions, PasswordForm],
  template: `
    <div class="page page-narrow">
      <div class="page-head">
        <div class="page-title">
          <h1>Your account</h1>
          @if (person(); as person) {
            <p class="second">{{ person.name }}, {{ person.email }}, {{ person.role }}</p>
          }
        </div>
      </div>
      <section class="section" aria-labelledby="password-title">
        <h2 id="password-title">Password</h2>
        <app-password-form />
      </section>
      <section class="section" aria-labelledby="sessions-title">
        <app-open-sessions />
      </section>
    </div>
  `,
  styles: `
    app-password-form {
      display: block;
      max-width: 22rem;
      margin-top: 0.5rem;
    }
    @media (max-width: 40rem) {
      app-password-form {
        max-width: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountPage {
  protected readonly person = inject(Session).person;

  constructor() {
    pageHead(() => ({ title: 'Your account', trail: [] }));
  }
}
