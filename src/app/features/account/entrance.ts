import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The sheet that people meet before they are signed in: the load gauge, and a form beside it. */
@Component({
  selector: 'app-entrance',
  template: `
    <div class="entrance">
      <svg width="96" height="300" viewBox="0 0 96 300" aria-hidden="true">
        <defs>
          <pattern
            id="entrance-hatch"
            width="7"
            height="7"
            patternUnits="userSpaceOnUse"
            patternTransform="rotate(45)"
          >
            <line x1="0.5" y1="0" x2="0.5" y2="7" />
          </pattern>
        </defs>
        <path
          class="scale"
          d="M30 1v298M30 2H14M30 51H20M30 101H14M30 150H20M30 199H14M30 249H20M30 298H14"
        />
        <rect class="beyond" x="40" y="2" width="30" height="88" fill="url(#entrance-hatch)" />
        <rect class="carried" x="40" y="90" width="30" height="208" />
        <path class="mark" d="M4 90h88" />
      </svg>
      <div class="words">
        <h1>{{ title() }}</h1>
        <ng-content />
      </div>
    </div>
  `,
  styles: `
    .entrance {
      display: flex;
      justify-content: center;
      gap: 3.5rem;
      max-width: 44rem;
      margin: 0 auto;
      padding: 6rem 1rem 4rem;
    }
    svg {
      flex: none;
    }
    line {
      stroke: var(--edge);
    }
    .scale {
      fill: none;
      stroke: var(--ink);
      stroke-width: 2;
    }
    .carried {
      fill: var(--rule);
    }
    .mark {
      stroke: var(--limit);
      stroke-width: 5;
    }
    .words {
      display: grid;
      align-content: start;
      gap: 1rem;
      width: 22rem;
    }
    @media (max-width: 40rem) {
      .entrance {
        padding-top: 2rem;
      }
      svg {
        display: none;
      }
      .words {
        width: 100%;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Entrance {
  readonly title = input.required<string>();
}
