import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  type ElementRef,
  afterNextRender,
  computed,
  inject,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { scaleLinear } from 'd3';
import { BandHandle, figureText, roundStep, withUnit, type HandleMove } from '../band-handle';
import { FigureEntry } from './figure-entry';

export interface LaneRange {
  readonly low: number;
  readonly high: number;
}

export interface LaneChange {
  readonly edge: 'low' | 'high';
  readonly value: number;
  /** False while the hand is still at it. */
  readonly final: boolean;
}

interface LaneEnd {
  readonly edge: 'low' | 'high';
  readonly value: number;
  readonly label: string;
  readonly share: number;
  /** The track's part within the limits: what a hand can reach. */
  readonly minimum: number;
  readonly maximum: number;
  /** The limits alone: what may be typed. */
  readonly least: number;
  readonly most: number;
}

/** Width of a track that is not laid out yet. */
const USUAL_WIDTH = 480;
/** Handles closer than this lean apart, figures closer than this stand aside, in CSS pixels. */
const CLOSE = 44;

/** The tolerance lane of one parameter: its track, its band with a handle at each end, nominal tick and limit mark. */
@Component({
  selector: 'app-lane',
  imports: [BandHandle, FigureEntry],
  templateUrl: './lane.html',
  styleUrl: './lane.scss',
  host: { role: 'group', '[attr.aria-label]': 'title()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Lane {
  readonly label = input.required<string>();
  readonly symbol = input('');
  readonly unit = input('');
  /** The drawn range. */
  readonly track = input.required<LaneRange>();
  /** The band; an end that is null has no handle. */
  readonly low = input<number | null | undefined>();
  readonly high = input<number | null | undefined>();
  readonly nominal = input<number | null | undefined>();
  /** Physical limits; typed figures may go beyond the track but never beyond these. */
  readonly minimum = input<number | null | undefined>();
  readonly maximum = input<number | null | undefined>();
  /** Where the requirement ends: the limit mark. */
  readonly mark = input<number | null | undefined>();
  /** A proved range, drawn softly behind the band. */
  readonly proved = input<LaneRange | undefined>();
  readonly editable = input(false);
  /** What stands at the lane's end; of two lines the first is the figure. */
  readonly note = input<string | undefined>();
  readonly bandChange = output<LaneChange>();

  private readonly rail = viewChild.required<ElementRef<HTMLElement>>('rail');
  private readonly width = signal(USUAL_WIDTH);
  private readonly moving = signal<{ edge: 'low' | 'high'; value: number } | undefined>(undefined);

  protected readonly title = computed(() => sentenceCase(this.label()));
  protected readonly noteLines = computed(() => this.note()?.split('\n') ?? []);
  protected readonly perPixel = computed(() => (this.track().high - this.track().low) / this.width());
  protected readonly step = computed(() => roundStep((this.track().high - this.track().low) / 100));
  protected readonly band = computed(() => {
    const moving = this.moving();
    const { low, high } = { low: this.low(), high: this.high() };
    return {
      low: moving?.edge === 'low' ? moving.value : (low ?? undefined),
      high: moving?.edge === 'high' ? moving.value : (high ?? undefined),
    };
  });
  protected readonly ends = computed(() => {
    const { low, high } = this.band();
    const nominal = this.nominal() ?? undefined;
    const least = this.minimum() ?? -Infinity;
    const most = this.maximum() ?? Infinity;
    const ends: LaneEnd[] = [];
    if (low !== undefined) ends.push(this.end('low', low, least, Math.min(most, nominal ?? high ?? most)));
    if (high !== undefined) ends.push(this.end('high', high, Math.max(least, nominal ?? low ?? least), most));
    return ends;
  });
  protected readonly close = computed(() => {
    const [low, high] = this.ends();
    return high !== undefined && (high.share - low.share) * this.width() < CLOSE;
  });
  protected readonly bar = computed(() => this.stretch(this.band().low, this.band().high));
  protected readonly provedBar = computed(() => {
    const proved = this.proved();
    return proved === undefined ? undefined : this.stretch(proved.low, proved.high);
  });
  protected readonly divisions = computed(() => {
    const { low, high } = this.track();
    return scaleLinear([low, high], [0, 1])
      .ticks(8)
      .map((value) => this.share(value) * 100);
  });
  /** Nominal tick and limit mark, as far as they lie on the track. */
  protected readonly ticks = computed(() => {
    const { low, high } = this.track();
    const marks = [
      { kind: 'nominal', at: this.nominal() ?? NaN },
      { kind: 'mark', at: this.mark() ?? NaN },
    ];
    return marks
      .filter(({ at }) => at >= low && at <= high)
      .map(({ kind, at }) => ({ kind, share: this.share(at) }));
  });
  protected readonly readOnlyText = computed(() => {
    const { low, high } = this.band();
    if (low === undefined && high === undefined) return 'no band';
    const from = low === undefined ? 'open' : figureText(low);
    return high === undefined ? `from ${from} up` : `${from} to ${withUnit(high, this.unit())}`;
  });

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      const rail = this.rail().nativeElement;
      const measure = () => {
        if (rail.clientWidth > 0) this.width.set(rail.clientWidth);
      };
      measure();
      const observer = new ResizeObserver(measure);
      observer.observe(rail);
      destroyed.onDestroy(() => observer.disconnect());
    });
  }

  protected moveEnd(edge: 'low' | 'high', { value, final }: HandleMove): void {
    this.moving.set(final ? undefined : { edge, value });
    this.bandChange.emit({ edge, value, final });
  }

  protected enter(edge: 'low' | 'high', value: number): void {
    this.bandChange.emit({ edge, value, final: true });
  }

  protected figure(value: number): string {
    return figureText(value);
  }

  protected textOf(value: number): string {
    return withUnit(value, this.unit());
  }

  protected lean(edge: 'low' | 'high'): 'none' | 'back' | 'forward' {
    if (!this.close()) return 'none';
    return edge === 'low' ? 'back' : 'forward';
  }

  private end(edge: 'low' | 'high', value: number, least: number, most: number): LaneEnd {
    const { low, high } = this.track();
    // A value that was typed beyond the track can be dragged back, not further out.
    const minimum = Math.max(least, Math.min(low, value));
    const maximum = Math.min(most, Math.max(high, value));
    const label = `${this.title()}, ${edge} end`;
    return { edge, value, label, share: this.share(value), minimum, maximum, least, most };
  }

  private stretch(
    from: number | undefined,
    to: number | undefined,
  ): { from: number; length: number } | undefined {
    if (from === undefined && to === undefined) return undefined;
    const start = from === undefined ? 0 : this.share(from);
    const end = to === undefined ? 1 : this.share(to);
    return { from: start, length: Math.max(0, end - start) };
  }

  private share(value: number): number {
    const { low, high } = this.track();
    return high > low ? Math.max(0, Math.min(1, (value - low) / (high - low))) : 0;
  }
}

function sentenceCase(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
