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
      bottom: 1rem;
      left: 50%;
      display: flex;
      align-items: baseline;
      gap: 1.25rem;
      max-width: min(40rem, calc(100vw - 2rem));
      padding: 0.75rem 1rem;
      border-radius: var(--radius);
      background: var(--ink);
      color: var(--sheet);
      transform: translateX(-50%);
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
