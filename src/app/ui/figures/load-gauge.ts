import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { scaleFromZero } from '../scale/ticks';
import { layOutRanges, type PayloadRanges } from './payload-ranges';
import { nextPictureId } from './picture-id';

/** A test of the rating: a mark beside the gauge at the payload that it loads the machine with. */
export interface GaugeTest {
  readonly at: number;
  readonly label: string;
}

const HEIGHT = 336;
const TOP = 10;

/** The load gauge: an upright scale, the proved range filled, the rated range in a bracket, one heavy load mark. */
@Component({
  selector: 'app-load-gauge',
  template: `
    <svg width="132" height="356" viewBox="0 0 132 356" role="img" [attr.aria-label]="label()">
      <defs>
        <pattern
          [attr.id]="id + '-fails'"
          width="7"
          height="7"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect class="fails-ground" width="7" height="7" />
          <line class="fails-line" x1="0.5" y1="0" x2="0.5" y2="7" />
        </pattern>
        <pattern
          [attr.id]="id + '-open'"
          width="7"
          height="7"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect class="open-ground" width="7" height="7" />
          <line class="open-line" x1="0.5" y1="0" x2="0.5" y2="7" />
        </pattern>
      </defs>
      <path class="scale" [attr.d]="scalePath()" />
      @for (tick of scale().ticks; track tick) {
        <text class="figure" x="32" text-anchor="end" [attr.y]="y(tick / scale().end) + 4">{{ tick }}</text>
      }
      @let layout = this.layout();
      @for (part of beyond(); track part.from) {
        <rect
          x="50"
          width="22"
          [attr.y]="y(part.to)"
          [attr.height]="y(part.from) - y(part.to)"
          [attr.fill]="'url(#' + id + (part.fails ? '-fails)' : '-open)')"
        />
      }
      @if (layout.proved; as part) {
        <rect
          class="proved"
          x="50"
          width="22"
          [attr.y]="y(part.to)"
          [attr.height]="y(part.from) - y(part.to)"
        />
      }
      @if (layout.ratedAndProved; as part) {
        <rect
          class="held"
          [class.sampled]="ranges().sampled"
          x="51"
          width="20"
          [attr.y]="y(part.to)"
          [attr.height]="y(part.from) - y(part.to)"
        />
      }
      @if (layout.rated; as part) {
        <path class="bracket" [attr.d]="'M78 ' + y(part.to) + 'h7V' + y(part.from) + 'h-7'" />
        <text
          class="figure"
          text-anchor="middle"
          [attr.transform]="'translate(108 ' + y((part.from + part.to) / 2) + ') rotate(-90)'"
        >
          rated
        </text>
      }
      @for (mark of layout.marks; track mark) {
        <line
          class="mark"
          [class.sampled]="ranges().sampled"
          x1="38"
          x2="94"
          [attr.y1]="y(mark)"
          [attr.y2]="y(mark)"
        />
      }
      @for (test of shownTests(); track test.label) {
        <path class="test" [attr.d]="'M75 ' + y(test.share) + 'l9 -5v10z'" />
        <text class="figure" x="88" [attr.y]="y(test.share) + 4">{{ test.label }}</text>
      }
    </svg>
  `,
  styles: `
    svg {
      display: block;
      overflow: visible;
    }
    .scale,
    .bracket {
      fill: none;
      stroke: var(--ink);
      stroke-width: 2;
    }
    .bracket {
      stroke: var(--ink-second);
      stroke-width: 1.5;
    }
    .figure {
      fill: var(--ink-second);
      font-size: 0.6875rem;
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
    .mark {
      stroke: var(--limit);
      stroke-width: 4;
    }
    .mark.sampled {
      stroke-dasharray: 4 4;
    }
    .test {
      fill: var(--ink);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoadGauge {
  readonly ranges = input.required<PayloadRanges>();
  readonly tests = input<readonly GaugeTest[]>([]);
  readonly label = input.required<string>();

  protected readonly id = nextPictureId();
  protected readonly scale = computed(() => scaleFromZero(this.mostShown(), 7));
  protected readonly layout = computed(() => layOutRanges(this.ranges(), this.scale().end));
  protected readonly beyond = computed(() =>
    [this.layout().below, this.layout().above].filter((part) => part !== undefined),
  );
  protected readonly shownTests = computed(() =>
    this.tests()
      .map((test) => ({ ...test, share: test.at / this.scale().end }))
      .filter(({ share }) => share <= 1),
  );
  protected readonly scalePath = computed(() => {
    const { ticks, step, end } = this.scale();
    const long = ticks.map((tick) => `M46 ${this.y(tick / end)}h-8`);
    const short = ticks.slice(0, -1).map((tick) => `M46 ${this.y((tick + step / 2) / end)}h-5`);
    return `M46 ${TOP - 1}V${TOP + HEIGHT + 1}${long.join('')}${short.join('')}`;
  });

  protected y(share: number): number {
    return TOP + HEIGHT * (1 - share);
  }

  /** Room above the marks, but a range that is proved far beyond the rating does not press the rating together. */
  private mostShown(): number {
    const { rated, proved, failsAbove } = this.ranges();
    const high = Math.max(proved?.high ?? 0, failsAbove ?? 0);
    const needed = Math.max(rated?.high ?? 0, ...this.tests().map((test) => test.at));
    return Math.max(needed * 1.1, needed > 0 ? Math.min(high * 1.15, needed * 3.2) : high * 1.15);
  }
}
