import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { MatMenuModule } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import type { SignedIn } from '../../../shared/contracts/api';
import { Notices } from '../core/notices';
import { Session } from '../core/session';
import { THEMES, ThemeChoice, type Theme } from '../core/theme';

const THEME_WORDS: Record<Theme, string> = { system: 'As the system', light: 'Light', dark: 'Dark' };

/** Who is signed in, and what belongs to a person rather than to a page. */
@Component({
  selector: 'app-person-menu',
  imports: [MatMenuModule, RouterLink],
  template: `
    <button type="button" class="button quiet" [matMenuTriggerFor]="menu">
      <span class="unseen">Your menu: </span>{{ person().name }}
      <svg width="9" height="6" viewBox="0 0 9 6" aria-hidden="true"><path d="M0 0h9L4.5 5.5z" /></svg>
    </button>
    <mat-menu #menu="matMenu" xPosition="before">
      <a mat-menu-item routerLink="/products">Products</a>
      @if (session.isAdministrator()) {
        <a mat-menu-item routerLink="/people">People</a>
      }
      <a mat-menu-item routerLink="/account">Your account</a>
      <hr />
      <div role="group" aria-label="Theme">
        @for (theme of themes; track theme) {
          <button
            type="button"
            mat-menu-item
            role="menuitemradio"
            [attr.aria-checked]="choice.theme() === theme"
            (click)="choice.choose(theme)"
          >
            <span class="ring" [class.chosen]="choice.theme() === theme"></span>
            {{ words[theme] }}
          </button>
        }
      </div>
      <hr />
      <button type="button" mat-menu-item (click)="shortcuts.emit()">Keyboard shortcuts</button>
      <button type="button" mat-menu-item (click)="signOut()">Sign out</button>
    </mat-menu>
  `,
  styles: `
    svg {
      fill: var(--ink-second);
    }
    .button {
      color: var(--ink-second);
      font-weight: 500;
    }
    hr {
      margin: 0.375rem 0;
      border: 0;
      border-top: 1px solid var(--rule);
    }
    .ring {
      display: inline-block;
      width: 9px;
      height: 9px;
      margin-right: 0.625rem;
      border: 2px solid var(--ink-second);
      border-radius: 50%;
    }
    .ring.chosen {
      border-color: var(--ink);
      background: var(--ink);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PersonMenu {
  readonly person = input.required<SignedIn>();
  readonly shortcuts = output();

  protected readonly session = inject(Session);
  protected readonly choice = inject(ThemeChoice);
  protected readonly themes = THEMES;
  protected readonly words = THEME_WORDS;
  private readonly notices = inject(Notices);

  protected async signOut(): Promise<void> {
    await this.notices.during(() => this.session.signOut());
  }
}
