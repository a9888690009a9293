import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Scale } from '../scale/ticks';

/** The scale that the bars of a ladder hang from. */
@Component({
  selector: 'app-ladder-scale',
  template: `
    <svg width="100%" height="30" aria-hidden="true">
      @for (tick of halves(); track tick) {
        <line y1="25" y2="30" [attr.x1]="at(tick)" [attr.x2]="at(tick)" />
      }
      @for (tick of scale().ticks; track tick; let first = $first; let last = $last) {
        <line y1="22" y2="30" [attr.x1]="at(tick)" [attr.x2]="at(tick)" />
        <text y="15" [attr.x]="at(tick)" [attr.text-anchor]="first ? 'start' : last ? 'end' : 'middle'">
          {{ figure(tick, last) }}
        </text>
      }
    </svg>
  `,
  styles: `
    :host,
    svg {
      display: block;
      overflow: visible;
    }
    line {
      stroke: var(--ink-second);
    }
    text {
      fill: var(--ink-second);
      font-size: 0.6875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LadderScale {
  readonly scale = input.required<Scale>();
  readonly unit = input.required<string>();

  protected readonly halves = computed(() =>
    this.scale()
      .ticks.slice(0, -1)
      .map((tick) => tick + this.scale().step / 2),
  );

  protected figure(value: number, last: boolean): string {
    return last ? `${value}\u2009${this.unit()}` : String(value);
  }

  protected at(value: number): string {
    return `${(value / this.scale().end) * 100}%`;
  }
}
