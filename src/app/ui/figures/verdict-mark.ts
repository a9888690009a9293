import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Verdict as a shape, so that colour is never alone: tick, cross, or an open ring for "undecided". */
@Component({
  selector: 'app-verdict-mark',
  template: `
    <svg width="16" height="16" viewBox="0 0 16 16" aria-hidden="true" [attr.class]="verdict()">
      @switch (verdict()) {
        @case ('holds') {
          <path d="M14.2 8A6.2 6.2 0 1 1 8 1.8 6.2 6.2 0 0 1 14.2 8ZM5 8.2l2.2 2.2L11.2 6" />
        }
        @case ('fails') {
          <path d="M14.2 8A6.2 6.2 0 1 1 8 1.8 6.2 6.2 0 0 1 14.2 8ZM5.5 5.5l5 5m0-5-5 5" />
        }
        @default {
          <circle cx="8" cy="8" r="6.2" stroke-dasharray="2.6 2.2" />
        }
      }
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
      flex: none;
    }
    svg {
      fill: none;
      stroke: var(--ink-second);
      stroke-width: 1.8;
    }
    .holds {
      stroke: var(--proved);
    }
    .fails {
      stroke: var(--limit);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class VerdictMark {
  readonly verdict = input.required<'holds' | 'fails' | 'undecided'>();
}
