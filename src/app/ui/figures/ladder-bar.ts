import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { layOutRanges, type PayloadRanges, type Stretch } from './payload-ranges';
import { nextPictureId } from './picture-id';

/**
 * A rung of the variant ladder: the load gauge laid on its side. Proved range filled, rated range in a bracket
 * above it and darker where it is proved, beyond the load mark hatched.
 */
@Component({
  selector: 'app-ladder-bar',
  template: `
    <svg width="100%" height="46" role="img" [attr.aria-label]="label()">
      <defs>
        <pattern
          [attr.id]="id + '-fails'"
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect class="fails-ground" width="6" height="6" />
          <line class="fails-line" x1="0.5" y1="0" x2="0.5" y2="6" />
        </pattern>
        <pattern
          [attr.id]="id + '-open'"
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect class="open-ground" width="6" height="6" />
          <line class="open-line" x1="0.5" y1="0" x2="0.5" y2="6" />
        </pattern>
      </defs>
      @let layout = this.layout();
      @for (part of beyond(); track part.from) {
        <rect
          y="17"
          height="18"
          [attr.x]="percent(part.from)"
          [attr.width]="width(part)"
          [attr.fill]="'url(#' + id + (part.fails ? '-fails)' : '-open)')"
        />
      }
      @if (layout.proved; as part) {
        <rect class="proved" y="17" height="18" [attr.x]="percent(part.from)" [attr.width]="width(part)" />
      }
      @if (layout.ratedAndProved; as part) {
        <rect
          class="held"
          [class.sampled]="ranges().sampled"
          y="21"
          height="10"
          [attr.x]="percent(part.from)"
          [attr.width]="width(part)"
        />
      }
      @if (layout.rated; as part) {
        <line class="bracket" y1="8" y2="8" [attr.x1]="percent(part.from)" [attr.x2]="percent(part.to)" />
        <line class="bracket" y1="2" y2="8.5" [attr.x1]="percent(part.from)" [attr.x2]="percent(part.from)" />
        <line class="bracket" y1="2" y2="8.5" [attr.x1]="percent(part.to)" [attr.x2]="percent(part.to)" />
      }
      @for (mark of layout.marks; track mark) {
        <line
          class="mark"
          [class.sampled]="ranges().sampled"
          y1="10"
          y2="42"
          [attr.x1]="percent(mark)"
          [attr.x2]="percent(mark)"
        />
      }
    </svg>
  `,
  styles: `
    :host {
      display: block;
    }
    svg {
      display: block;
      overflow: visible;
    }
    .fails-ground {
      fill: var(--limit-soft);
    }
    .fails-line {
      stroke: var(--limit-hatch);
    }
    .open-ground {
      fill: var(--unknown-soft);
    }
    .open-line {
      stroke: var(--unknown-hatch);
    }
    .proved {
      fill: var(--proved-soft);
    }
    .held {
      fill: var(--proved);
    }
    .held.sampled {
      fill: none;
      stroke: var(--proved);
      stroke-width: 2;
      stroke-dasharray: 2 3;
    }
    .bracket {
      stroke: var(--ink-second);
      stroke-width: 1.5;
    }
    .mark {
      stroke: var(--limit);
      stroke-width: 3;
    }
    .mark.sampled {
      stroke-dasharray: 3 3;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LadderBar {
  readonly ranges = input.required<PayloadRanges>();
  /** The value at the right end of the scale that all bars of a ladder share. */
  readonly scaleEnd = input.required<number>();
  /** The picture in words. */
  readonly label = input.required<string>();

  protected readonly id = nextPictureId();
  protected readonly layout = computed(() => layOutRanges(this.ranges(), this.scaleEnd()));
  protected readonly beyond = computed(() =>
    [this.layout().below, this.layout().above].filter((part) => part !== undefined),
  );

  protected percent(share: number): string {
    return `${Number((share * 100).toFixed(3))}%`;
  }

  protected width(part: Stretch): string {
    return this.percent(part.to - part.from);
  }
}
