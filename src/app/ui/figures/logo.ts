import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The load mark. */
@Component({
  selector: 'app-logo',
  template: `
    <svg width="30" height="24" viewBox="0 0 30 24" aria-hidden="true">
      <path class="scale" d="M4 1v22M3 2h7M3 7h4.5M3 17h4.5M3 22h7" />
      <path class="mark" d="M1 12h28" />
    </svg>
  `,
  styles: `
    :host,
    svg {
      display: block;
    }
    .scale {
      fill: none;
      stroke: var(--ink);
      stroke-width: 2;
    }
    .mark {
      stroke: var(--limit);
      stroke-width: 3;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Logo {}
