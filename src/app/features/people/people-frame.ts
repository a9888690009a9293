import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';

/** What administrators do: people, the audit log, and the mail that the product sends. */
@Component({
  selector: 'app-people-frame',
  imports: [RouterLink, RouterLinkActive, RouterOutlet],
  template: `
    <div class="page">
      <nav class="tabs" aria-label="Administration">
        <a
          routerLink="/people"
          routerLinkActive
          ariaCurrentWhenActive="page"
          [routerLinkActiveOptions]="{ exact: true }"
          >People</a
        >
        <a routerLink="/people/audit" routerLinkActive ariaCurrentWhenActive="page">Audit log</a>
        <a routerLink="/people/mail" routerLinkActive ariaCurrentWhenActive="page">Outgoing mail</a>
      </nav>
      <router-outlet />
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeopleFrame {}
