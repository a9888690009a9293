import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { Failure } from './load-state';

/** What went wrong, where, and what can be done; a closed gauge for what may not be seen. */
@Component({
  selector: 'app-failed',
  template: `
    <svg width="44" height="72" viewBox="0 0 44 72" aria-hidden="true">
      <path class="scale" d="M14 2v68M14 2h-8M14 19h-5M14 36h-8M14 53h-5M14 70h-8" />
      @if (failure().kind === 'forbidden') {
        <path class="mark" d="M4 28h38M4 44h38" />
      } @else {
        <path class="mark" d="M4 36h14M26 36h16" />
      }
    </svg>
    <div role="alert">
      @if (page()) {
        <h1>{{ failure().title }}</h1>
      } @else {
        <h2>{{ failure().title }}</h2>
      }
      <p class="note">{{ failure().detail }}</p>
      @if (failure().requestId; as requestId) {
        <p class="second">Request {{ requestId }}</p>
      }
      @if (mayTryAgain()) {
        <button type="button" class="button" (click)="again.emit()">Try again</button>
      }
    </div>
  `,
  styles: `
    :host {
      display: flex;
      gap: 1.5rem;
      padding: 2rem 1.25rem;
    }
    h1 {
      font-size: 1.625rem;
    }
    svg {
      flex: none;
    }
    .scale {
      fill: none;
      stroke: var(--edge);
      stroke-width: 1.5;
    }
    .mark {
      fill: none;
      stroke: var(--ink);
      stroke-width: 3;
    }
    .note {
      margin: 0.25rem 0 0.875rem;
    }
    .second {
      margin-bottom: 0.875rem;
    }
  `,
  host: { '[class.page]': 'page()', '[class.page-narrow]': 'page()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Failed {
  readonly failure = input.required<Failure>();
  /** It stands for the whole page, whose heading it then is. */
  readonly page = input(false);
  readonly again = output();

  protected readonly mayTryAgain = computed(() => ['unreachable', 'broken'].includes(this.failure().kind));
}
