import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { openSessionSchema, type OpenSession } from '../../../../shared/contracts/api';
import { Api, listOf, loaded } from '../../core/api';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { MomentView } from '../../core/words';
import { confirm } from '../../ui/dialog';
import { WhenLoaded } from '../../ui/states';
import { browserName } from './browser-name';

@Component({
  selector: 'app-open-sessions',
  imports: [MomentView, WhenLoaded],
  template: `
    <div class="section-head">
      <h2 id="sessions-title">Where you are signed in</h2>
      <button type="button" class="button" (click)="signOutEverywhere()">Sign out everywhere</button>
    </div>
    <div
      class="sheet"
      *appWhenLoaded="sessions; let sessions; let renewing = renewing"
      [class.renewing]="renewing"
    >
      <table class="table padded stacks">
        <thead>
          <tr>
            <th scope="col">Browser</th>
            <th scope="col">Since</th>
            <th scope="col">Last seen</th>
            <th scope="col">Ends</th>
            <th scope="col"><span class="unseen">Act</span></th>
          </tr>
        </thead>
        <tbody>
          @for (session of sessions; track session.id) {
            <tr>
              <th scope="row">{{ browser(session) }}</th>
              <td data-label="Since"><app-moment [at]="session.createdAt" /></td>
              <td data-label="Last seen"><app-moment [at]="session.lastSeenAt" /></td>
              <td data-label="Ends"><app-moment [at]="session.expiresAt" /></td>
              <td class="number">
                @if (session.current) {
                  <span class="second">This browser</span>
                } @else {
                  <button
                    type="button"
                    class="link"
                    [attr.aria-label]="'Sign out ' + browser(session)"
                    (click)="end(session)"
                  >
                    Sign out
                  </button>
                }
              </td>
            </tr>
          }
        </tbody>
      </table>
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OpenSessions {
  private readonly api = inject(Api);
  private readonly session = inject(Session);
  private readonly notices = inject(Notices);
  private readonly dialogs = inject(MatDialog);

  protected readonly sessions = loaded(() => '/api/session/all', listOf(openSessionSchema), 'your sessions');

  protected browser(session: OpenSession): string {
    return browserName(session.userAgent);
  }

  protected async end(session: OpenSession): Promise<void> {
    await this.notices.during(
      () => this.api.act('DELETE', `/api/session/all/${session.id}`),
      'Signed out there.',
    );
    this.sessions.reload();
  }

  protected async signOutEverywhere(): Promise<void> {
    const sure = await confirm(this.dialogs, {
      title: 'Sign out everywhere?',
      text: 'Every browser, this one too, has to sign in again.',
      act: 'Sign out everywhere',
    });
    if (sure) await this.notices.during(() => this.session.signOutEverywhere());
  }
}
