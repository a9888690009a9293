import { ChangeDetectionStrategy, Component, computed, effect, inject, signal } from '@angular/core';
import { auditPageSchema, type AuditEntry } from '../../../../shared/contracts/api';
import { Api, loaded } from '../../core/api';
import { Notices } from '../../core/notices';
import { pageHead } from '../../core/page';
import { MomentView } from '../../core/words';
import { Empty, WhenLoaded } from '../../ui/states';

@Component({
  selector: 'app-audit-log',
  imports: [Empty, MomentView, WhenLoaded],
  template: `
    <div class="page-head"><h1>Audit log</h1></div>
    <div class="sheet" *appWhenLoaded="newest; let renewing = renewing" [class.renewing]="renewing">
      @if (entries().length === 0) {
        <app-empty title="Nothing happened yet">
          Sign-ins, invitations, roles and runs are kept here as they happen. Nobody can change them.
        </app-empty>
      } @else {
        <table class="table padded stacks">
          <thead>
            <tr>
              <th scope="col">When</th>
              <th scope="col">Who</th>
              <th scope="col">What</th>
              <th scope="col">On</th>
              <th scope="col">Details</th>
            </tr>
          </thead>
          <tbody>
            @for (entry of entries(); track entry.id) {
              <tr>
                <td data-label="When"><app-moment [at]="entry.at" /></td>
                <td data-label="Who">{{ entry.who ?? 'Not signed in' }}</td>
                <td data-label="What" class="strong-text">{{ entry.action }}</td>
                <td data-label="On">{{ entry.subject }}</td>
                <td class="second details" [attr.data-label]="entry.details ? 'Details' : null">
                  {{ entry.details }}
                </td>
              </tr>
            }
          </tbody>
        </table>
      }
    </div>
    @if (next() !== null) {
      <p class="more">
        <button type="button" class="button" [attr.aria-disabled]="fetching()" (click)="fetchOlder()">
          Show older entries
        </button>
      </p>
    }
  `,
  styles: `
    .details {
      overflow-wrap: anywhere;
    }
    .more {
      margin-top: 1rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AuditLog {
  private readonly api = inject(Api);
  private readonly notices = inject(Notices);
  private readonly older = signal<readonly AuditEntry[]>([]);

  protected readonly newest = loaded(() => '/api/audit', auditPageSchema, 'the audit log');
  protected readonly next = signal<string | null>(null);
  protected readonly fetching = signal(false);
  protected readonly entries = computed(() => [...(this.newest.value()?.entries ?? []), ...this.older()]);

  constructor() {
    pageHead(() => ({ title: 'Audit log', trail: [] }));
    effect(() => {
      const page = this.newest.value();
      if (page === undefined) return;
      this.older.set([]);
      this.next.set(page.next);
    });
  }

  protected async fetchOlder(): Promise<void> {
    const before = this.next();
    if (before === null || this.fetching()) return;
    this.fetching.set(true);
    await this.notices.during(async () => {
      const path = `/api/audit?before=${encodeURIComponent(before)}`;
      const page = await this.api.send('GET', path, auditPageSchema);
      this.older.update((older) => [...older, ...page.entries]);
      this.next.set(page.next);
    });
    this.fetching.set(false);
  }
}
