import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal, signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router } from '@angular/router';
import { EMPTY, catchError, debounceTime, filter, of, switchMap, take } from 'rxjs';
import { plainFigure, reserveFigure, withUnit } from '../../../core/answers';
import { EngineClient } from '../../../engine';
import { HeatMap, type BandChange, type MapPoint } from '../../../ui/heat-map';
import { Lane } from '../../../ui/lane';
import { withBandEnd, type BandEnd } from '../store/band-edits';
import { parameterFacts, type ParameterFacts } from '../store/parameter-facts';
import { ScenarioStore } from '../store/scenario-store';
import { shownRanges } from '../store/shown-ranges';
import { axisRange, stillShows, type Range } from './axis-range';
import { followMap } from './follow-map';
import { readMapChoice, writeMapChoice, type MapChoice } from './map-choice';
import { MapControls } from './map-controls';
import { limitOf, pointStudy, wantedMap } from './map-request';
import { readingFacts } from './point-reading';

const HOVER_MILLISECONDS = 60;
const PIN = 'at';

/** The map with its band, and under it a lane for every toleranced parameter. */
@Component({
  selector: 'app-map-panel',
  imports: [HeatMap, Lane, MapControls],
  templateUrl: './map-panel.html',
  styleUrl: './map-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MapPanel {
  private readonly engine = inject(EngineClient);
  private readonly route = inject(ActivatedRoute);
  private readonly router = inject(Router);

  protected readonly store = inject(ScenarioStore);

  private readonly query = toSignal(this.route.queryParamMap, { requireSync: true });
  private readonly facts = computed(() => {
    const study = this.store.study();
    return study === undefined ? [] : parameterFacts(study);
  });
  private readonly ranges = computed(() => {
    const answer = this.store.shown();
    return answer && shownRanges(answer);
  });

  /** What is drawn of each parameter: stays while its band is dragged, so that the ground does not move as well. */
  private readonly tracks = linkedSignal<
    { facts: readonly ParameterFacts[]; place: string; failsAt: number | undefined },
    ReadonlyMap<string, Range>
  >({
    source: () => ({
      facts: this.facts(),
      // Where it fails is to be seen: with the first answer the ground is laid once more.
      place: `${this.store.path()} ${this.store.revision()?.number} ${this.ranges() !== undefined}`,
      failsAt: this.ranges()?.failsAbove,
    }),
    computation: ({ facts, place, failsAt }, previous) => {
      const tracks = new Map<string, Range>();
      for (const parameter of facts) {
        const old = previous?.source.place === place ? previous.value.get(parameter.id) : undefined;
        const track =
          old !== undefined && stillShows(old, parameter)
            ? old
            : axisRange(parameter, parameter.isPayload ? failsAt : undefined);
        if (track !== undefined) tracks.set(parameter.id, track);
      }
      return tracks;
    },
  });

  protected readonly plainParameters = computed(() => this.facts().filter(({ id }) => this.tracks().has(id)));
  protected readonly choice = computed(() => {
    const study = this.store.study();
    return study && readMapChoice(this.query(), study);
  });
  private readonly across = computed(() => this.facts().find(({ id }) => id === this.choice()?.x));
  private readonly up = computed(() => this.facts().find(({ id }) => id === this.choice()?.y));
  protected readonly axes = computed(() => {
    const [x, y] = [this.across(), this.up()];
    const plain = x && y && this.tracks().has(x.id) && this.tracks().has(y.id);
    return plain ? { x: axisText(x), y: axisText(y) } : undefined;
  });
  protected readonly limit = computed(() => {
    const [study, choice] = [this.store.study(), this.choice()];
    return study && choice ? limitOf(choice.measure, study) : 0;
  });

  private readonly wanted = computed(() => {
    const [study, choice] = [this.store.study(), this.choice()];
    const x = choice && this.tracks().get(choice.x);
    const y = choice && this.tracks().get(choice.y);
    return study && choice && x && y ? wantedMap(study, choice, x, y) : undefined;
  });
  private readonly drawn = toSignal(
    followMap(this.engine, toObservable(this.wanted).pipe(filter((wanted) => wanted !== undefined))),
  );
  protected readonly map = computed(() => this.drawn()?.map);
  protected readonly mapIsOld = computed(() => {
    const drawn = this.drawn();
    return drawn !== undefined && drawn.key !== this.wanted()?.key;
  });
  protected readonly cells = computed(() => {
    const drawn = this.drawn();
    if (drawn === undefined) return '';
    const { x, y } = drawn.map;
    const seconds = (drawn.took / 1000).toFixed(2);
    return `${x.length} × ${y.length} cells${drawn.finest ? `, ${withUnit(seconds, 's')}` : ''}`;
  });

  protected readonly nominal = computed(() => this.pointOf(({ nominal }) => nominal));
  protected readonly failing = computed(() => {
    const answer = this.store.shown()?.result;
    const witness = answer?.largestPayload?.witness ?? answer?.bands.witness;
    return witness && this.pointOf(({ id }) => witness[id]);
  });
  protected readonly band = computed(() => {
    const [x, y] = [this.across(), this.up()];
    if (x === undefined || y === undefined || (!x.hasBand && !y.hasBand)) return undefined;
    const end = (facts: ParameterFacts, which: BandEnd) => (facts.hasBand ? (facts[which] ?? null) : null);
    return {
      ...{ xLow: end(x, 'low'), xHigh: end(x, 'high') },
      ...{ yLow: end(y, 'low'), yHigh: end(y, 'high') },
    };
  });
  protected readonly provedTo = computed(() =>
    this.across()?.isPayload === true ? this.ranges()?.proved?.high : undefined,
  );

  protected readonly provedWords = computed(() =>
    this.ranges()?.sampled === true ? 'sampled to' : 'proved to',
  );

  protected readonly lanes = computed(() =>
    this.facts().flatMap((facts) => {
      const track = this.tracks().get(facts.id);
      if (!facts.hasBand || track === undefined || facts.low === undefined || facts.high === undefined)
        return [];
      const ranges = facts.isPayload ? this.ranges() : undefined;
      return [
        {
          ...{ facts, track, mark: ranges?.failsAbove ?? ranges?.proved?.high, proved: ranges?.proved },
          note: ranges?.reserve === undefined ? undefined : reserveNote(ranges.reserve, facts.unit),
        },
      ];
    }),
  );
  protected readonly unplain = computed(() =>
    this.facts().filter(
      ({ hasBand, low, high, nominal }) =>
        hasBand && (low === undefined || high === undefined || nominal === undefined),
    ),
  );

  protected readonly hovered = signal<MapPoint | null>(null);
  protected readonly pinned = computed(() => pointIn(this.query().get(PIN)));
  protected readonly readingAt = computed(() => this.hovered() ?? this.pinned());
  private readonly readingStudy = computed(() => {
    const [study, choice, at] = [this.store.study(), this.choice(), this.readingAt()];
    return study && choice && at ? pointStudy(study, { [choice.x]: at.x, [choice.y]: at.y }) : undefined;
  });
  protected readonly reading = toSignal(
    toObservable(this.readingStudy).pipe(
      debounceTime(HOVER_MILLISECONDS),
      switchMap((study) => {
        // The engine answers one study at a time, and the hand's comes first.
        if (study === undefined || this.store.isAnswering()) return of(undefined);
        return this.engine.live(study).pipe(
          filter((answer) => 'result' in answer),
          take(1),
          catchError(() => EMPTY),
          switchMap(({ result }) => of(readingFacts(result.nominal))),
        );
      }),
    ),
  );

  protected choose(choice: MapChoice): void {
    const study = this.store.study();
    if (study !== undefined) this.tell({ ...writeMapChoice(choice, study), [PIN]: null });
  }

  protected pin({ x, y }: MapPoint): void {
    this.tell({ [PIN]: `${Number(x.toPrecision(6))},${Number(y.toPrecision(6))}` });
  }

  protected unpin(): void {
    this.tell({ [PIN]: null });
  }

  protected moveMapEdge({ edge, value, final }: BandChange): void {
    const facts = edge.startsWith('x') ? this.across() : this.up();
    if (facts === undefined) return;
    this.moveBand(facts, { edge: edge.endsWith('Low') ? 'low' : 'high', value, final });
  }

  protected moveBand(
    { id, label }: ParameterFacts,
    { edge, value, final }: { edge: BandEnd; value: number; final: boolean },
  ): void {
    this.store.edit((study) => withBandEnd(study, id, edge, value), {
      what: `move the ${edge} end of ${label}`,
      gesture: `band ${id} ${edge}`,
      open: !final,
    });
  }

  protected pointText({ x, y }: MapPoint): string {
    const part = (facts: ParameterFacts | undefined, value: number) =>
      facts === undefined ? '' : `${facts.label} ${withUnit(plainFigure(value), facts.unit)}`;
    return `${part(this.across(), x)}, ${part(this.up(), y)}`;
  }

  private pointOf(value: (facts: ParameterFacts) => number | undefined): MapPoint | undefined {
    const [across, up] = [this.across(), this.up()];
    const x = across && value(across);
    const y = up && value(up);
    return x === undefined || y === undefined ? undefined : { x, y };
  }

  private tell(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams,
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }
}

function axisText({ label, symbol, unit }: ParameterFacts) {
  return { label: label === symbol ? label : `${label} ${symbol}`, unit };
}

function reserveNote(reserve: number, unit: string): string {
  return `${withUnit(reserveFigure(reserve), unit)}\nreserve`;
}

/** A point as the address holds it: "300,150". */
function pointIn(text: string | null): MapPoint | null {
  const [x, y] = (text ?? '').split(',').map(Number);
  return text !== null && Number.isFinite(x) && Number.isFinite(y) ? { x, y } : null;
}
