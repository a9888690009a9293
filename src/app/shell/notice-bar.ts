import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { Notices } from '../core/notices';

/** Where the news of the page appear. Both regions stay in the page, else a screen reader would miss their first text. */
@Component({
  selector: 'app-notice-bar',
  template: `
    @let notice = notices.notice();
    <div class="bar" [class.open]="notice !== undefined">
      <p role="status">{{ notice && !notice.refused ? notice.text : '' }}</p>
      <p role="alert">{{ notice?.refused ? notice?.text : '' }}</p>
      @if (notice) {
        <button type="button" class="link" (click)="notices.close()">Close</button>
      }
    </div>
  `,
  styles: `
    .bar.open {
      position: fixed;
      z-index: 20;
      inset: auto 1rem 1rem;
      display: flex;
      align-items: baseline;
      gap: 1.25rem;
      width: fit-content;
      max-width: 40rem;
      margin-inline: auto;
      padding: 0.75rem 1rem;
      border-radius: var(--radius);
      background: var(--ink);
      color: var(--sheet);
    }
    p:empty {
      display: none;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NoticeBar {
  protected readonly notices = inject(Notices);
}
