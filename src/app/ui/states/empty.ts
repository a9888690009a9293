import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Nothing here yet: the empty gauge, and what to do first. */
@Component({
  selector: 'app-empty',
  template: `
    <svg width="44" height="72" viewBox="0 0 44 72" aria-hidden="true">
      <path class="scale" d="M14 2v68M14 2h-8M14 19h-5M14 36h-8M14 53h-5M14 70h-8" />
      <rect class="track" x="18.5" y="2.5" width="14" height="67" />
      <path class="mark" d="M4 70h38" />
    </svg>
    <div>
      <h2>{{ title() }}</h2>
      <p class="note"><ng-content /></p>
      <div class="acts"><ng-content select="button, a" /></div>
    </div>
  `,
  styles: `
    :host {
      display: flex;
      gap: 1.5rem;
      padding: 2rem 1.25rem;
    }
    svg {
      flex: none;
    }
    .scale,
    .mark {
      fill: none;
      stroke: var(--edge);
      stroke-width: 1.5;
    }
    .track {
      fill: none;
      stroke: var(--rule);
      stroke-dasharray: 3 3;
    }
    .mark {
      stroke: var(--ink);
      stroke-width: 3;
    }
    .note {
      margin: 0.25rem 0 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Empty {
  readonly title = input.required<string>();
}
