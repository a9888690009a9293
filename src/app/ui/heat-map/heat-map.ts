import {
  ChangeDetectionStrategy,
  Component,
  DOCUMENT,
  DestroyRef,
  ElementRef,
  afterNextRender,
  afterRenderEffect,
  computed,
  inject,
  input,
  linkedSignal,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { formatProved } from '../../../../shared/units';
import { BandHandle, type HandleMove } from '../band-handle';
import { edgeHandles, seenPart, type EdgeHandle } from './band-edges';
import { axisTitle, clearAxes, drawAxes } from './draw-axes';
import { FRAME_BOTTOM, FRAME_TOP, frameOf, isWithin, ledPoint, middleOf, scalesOf } from './map-frame';
import { MapGestures, pointAt, type GestureGround } from './map-gestures';
import {
  countCells,
  extentOf,
  sameWindow,
  type AxisText,
  type BandChange,
  type BandRectangle,
  type MapGrid,
  type MapPoint,
  type MapWindow,
} from './map-grid';
import { PALETTE_CLASSES, readPalette } from './map-palette';
import { mapSentence } from './map-sentence';
import { paintMap, pictureOf } from './paint-map';
import { onThemeChange } from './theme-changes';
import { zoomWindow } from './view-window';

/** Width of a frame that is not laid out yet. */
const USUAL_WIDTH = 640;
const NOTHING_YET: MapWindow = { xLow: 0, xHigh: 1, yLow: 0, yHigh: 1 };
/** Handles of opposite edges closer than this lean apart, CSS pixels. */
const CLOSE = 44;
const BUTTON_ZOOM = 1.6;

/**
 * A map of values over two parameters: cells on a canvas, axes and marks over it, and the tolerance band as a rectangle
 * whose edges are moved by handles. It shows the whole map or a closer part of it.
 */
@Component({
  selector: 'app-heat-map',
  imports: [BandHandle],
  templateUrl: './heat-map.html',
  styleUrl: './heat-map.scss',
  host: { role: 'group', 'aria-label': 'Map', '[attr.aria-busy]': 'pending() ? "true" : null' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HeatMap {
  readonly map = input<MapGrid | undefined>();
  /** Values below it fail. */
  readonly limit = input.required<number>();
  readonly xAxis = input.required<AxisText>();
  readonly yAxis = input.required<AxisText>();
  readonly nominal = input<MapPoint | undefined>();
  readonly failing = input<MapPoint | undefined>();
  readonly band = input<BandRectangle | undefined>();
  readonly editable = input(false);
  /** A newer map is under way: this one stays, greyed. */
  readonly pending = input(false);
  /** Where x is proved to; a dotted upright mark. */
  readonly provedTo = input<number | undefined>();
  /** What the proof may be called; a delay's approximation, for one, is to be named. */
  readonly provedWords = input('proved to');
  /** A point that was pinned. */
  readonly pinned = input<MapPoint | undefined>();
  readonly bandChange = output<BandChange>();
  readonly hover = output<MapPoint | null>();
  readonly pin = output<MapPoint>();

  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly canvas = viewChild.required<ElementRef<HTMLCanvasElement>>('canvas');
  private readonly surface = viewChild.required<ElementRef<HTMLElement>>('surface');
  private readonly swatches = viewChild.required<ElementRef<HTMLElement>>('swatches');
  private readonly xTicks = viewChild.required<ElementRef<SVGGElement>>('xTicks');
  private readonly yTicks = viewChild.required<ElementRef<SVGGElement>>('yTicks');

  private readonly width = signal(USUAL_WIDTH);
  private readonly theme = signal(0);
  private readonly gestures = new MapGestures();
  private readonly led = signal<MapPoint | undefined>(undefined);
  private readonly moving = signal<BandChange | undefined>(undefined);

  private readonly whole = computed(
    () => {
      const map = this.map();
      return map === undefined ? NOTHING_YET : extentOf(map);
    },
    { equal: sameWindow },
  );
  /** The closer part that is seen, undefined for the whole map; another range starts whole again. */
  private readonly closer = linkedSignal<MapWindow, MapWindow | undefined>({
    source: this.whole,
    computation: () => undefined,
  });
  protected readonly window = computed(() => this.closer() ?? this.whole());
  protected readonly zoomed = computed(() => this.closer() !== undefined);

  protected readonly frame = computed(() => frameOf(this.width(), this.window()));
  protected readonly colours = PALETTE_CLASSES;
  protected readonly top = FRAME_TOP;
  protected readonly outerHeight = computed(() => FRAME_TOP + this.frame().plotHeight + FRAME_BOTTOM);
  private readonly scales = computed(() => scalesOf(this.frame(), this.window()));

  protected readonly xTitle = computed(() => axisTitle(this.xAxis()));
  protected readonly yTitle = computed(() => axisTitle(this.yAxis()));
  private readonly counts = computed(() => {
    const map = this.map();
    return map === undefined ? undefined : countCells(map, this.limit());
  });
  protected readonly anyUnknown = computed(() => (this.counts()?.unknown ?? 0) > 0);
  protected readonly shownBand = computed(() => {
    const band = this.band();
    const moving = this.moving();
    return band && moving ? { ...band, [moving.edge]: moving.value } : band;
  });
  private readonly provedText = computed(() => {
    const proved = this.provedTo();
    if (proved === undefined || !Number.isFinite(proved)) return undefined;
    const figure = formatProved(proved, { side: 'down' }).replace('-', '\u2212');
    const { unit } = this.xAxis();
    return `${this.provedWords()} ${unit === '' ? figure : `${figure}\u2009${unit}`}`;
  });
  protected readonly sentence = computed(() => {
    const counts = this.counts();
    if (counts === undefined) return this.pending() ? 'The map is being computed.' : 'There is no map yet.';
    return mapSentence({
      xAxis: this.xAxis(),
      yAxis: this.yAxis(),
      extent: this.whole(),
      counts,
      nominal: this.nominal(),
      failing: this.failing(),
      band: this.shownBand(),
      proved: this.provedText(),
    });
  });

  protected readonly bandPath = computed(() => {
    const band = this.shownBand();
    const part = band && seenPart(band, this.window());
    if (band === undefined || part === undefined || this.map() === undefined) return '';
    const { x, y } = this.scales();
    const [left, right, top, bottom] = [x(part.xLow), x(part.xHigh), y(part.yHigh), y(part.yLow)];
    // An end that is open or out of view has no line.
    return [
      part.xLow === band.xLow ? `M${left} ${top}V${bottom}` : '',
      part.xHigh === band.xHigh ? `M${right} ${top}V${bottom}` : '',
      part.yHigh === band.yHigh ? `M${left} ${top}H${right}` : '',
      part.yLow === band.yLow ? `M${left} ${bottom}H${right}` : '',
    ].join('');
  });
  protected readonly handles = computed(() => {
    const band = this.shownBand();
    if (band === undefined || !this.editable() || this.map() === undefined) return [];
    const { x, y } = this.scales();
    const axes = { x: this.xAxis(), y: this.yAxis() };
    const found = edgeHandles(band, this.nominal(), this.whole(), this.window(), axes);
    return found.map((handle) => {
      const opposite = found.find(({ along, edge }) => along === handle.along && edge !== handle.edge);
      const scale = handle.along === 'x' ? x : y;
      const close = opposite && Math.abs(scale(opposite.value) - scale(handle.value)) < CLOSE;
      // To the right and down is forward: the high end of x, the low end of y.
      const forward = (handle.along === 'x') === (handle.side === 'high');
      const lean: 'none' | 'back' | 'forward' = !close ? 'none' : forward ? 'forward' : 'back';
      return {
        ...handle,
        left: x(handle.at.x),
        top: y(handle.at.y),
        perPixel: handle.along === 'x' ? 1 / (x(1) - x(0)) : 1 / (y(1) - y(0)),
        lean,
      };
    });
  });
  protected readonly nominalPlace = computed(() => this.placeOf(this.nominal()));
  protected readonly failingPlace = computed(() => this.placeOf(this.failing()));
  protected readonly ledPlace = computed(() => this.placeOf(this.led()));
  protected readonly pinnedPlace = computed(() => this.placeOf(this.pinned()));
  protected readonly provedMark = computed(() => {
    const [at, text] = [this.provedTo(), this.provedText()];
    const { xLow, xHigh } = this.window();
    if (at === undefined || text === undefined || this.map() === undefined || at < xLow || at > xHigh) {
      return undefined;
    }
    const place = this.scales().x(at);
    return { place, text, leftwards: place > this.frame().plotWidth * 0.6 };
  });
  protected readonly farText = computed(() => (this.limit() > 0 ? 'twice the limit' : 'far from it'));

  /** Pictures of the cells: new for another map, limit or theme, not for another size or view. */
  private readonly picture = computed(() => {
    this.theme();
    const map = this.map();
    if (map === undefined) return undefined;
    const palette = readPalette(this.swatches().nativeElement);
    return { ...pictureOf(map, this.limit(), palette), palette };
  });

  constructor() {
    const destroyed = inject(DestroyRef);
    const document = inject(DOCUMENT);
    afterNextRender(() => {
      const measure = () => {
        if (this.host.clientWidth > 0) this.width.set(this.host.clientWidth);
      };
      measure();
      const observer = new ResizeObserver(measure);
      observer.observe(this.host);
      const themeEnd = onThemeChange(document, () => this.theme.update((count) => count + 1));
      // A wheel listener of a template is passive or not as the browser likes; this one has to be able to refuse.
      const surface = this.surface().nativeElement;
      const wheel = (event: WheelEvent) => this.zoomByWheel(event);
      surface.addEventListener('wheel', wheel, { passive: false });
      destroyed.onDestroy(() => {
        observer.disconnect();
        themeEnd();
        surface.removeEventListener('wheel', wheel);
      });
    });
    afterRenderEffect({ write: () => this.paint() });
    afterRenderEffect({ write: () => this.drawAxes() });
  }

  protected moveBandEdge({ edge }: EdgeHandle, { value, final }: HandleMove): void {
    const change = { edge, value, final };
    this.moving.set(final ? undefined : change);
    this.bandChange.emit(change);
  }

  protected press(event: PointerEvent): void {
    if (this.map() !== undefined) this.gestures.press(event);
  }

  protected followPointer(event: PointerEvent): void {
    if (this.map() === undefined) return;
    this.show(this.gestures.drag(event, this.ground()));
    this.hover.emit(pointAt(this.ground(), event.clientX, event.clientY));
  }

  protected release(event: PointerEvent): void {
    this.gestures.release(event);
  }

  protected leave(event: PointerEvent): void {
    this.gestures.release(event);
    this.hover.emit(null);
  }

  protected pinPoint(event: MouseEvent): void {
    // The second press of a double click zooms out again and pins nothing.
    if (this.map() === undefined || event.detail > 1 || !this.gestures.pressedOnly) return;
    this.pin.emit(pointAt(this.ground(), event.clientX, event.clientY));
  }

  protected showWhole(): void {
    this.closer.set(undefined);
  }

  protected zoomBy(direction: 1 | -1): void {
    const nominal = this.nominal();
    const seen = nominal && isWithin(nominal, this.window());
    const about = seen ? nominal : middleOf(this.window());
    this.closer.set(zoomWindow(this.window(), this.whole(), BUTTON_ZOOM ** direction, about));
  }

  /** A point led by the keys, for those who have no pointer: read like a hovered one, pinned by Enter. */
  protected leadPoint(event: KeyboardEvent): void {
    if (this.map() === undefined || event.ctrlKey || event.altKey || event.metaKey) return;
    const start = this.led() ?? this.nominal();
    const at = start && isWithin(start, this.window()) ? start : middleOf(this.window());
    const led = ledPoint(event, at, this.window());
    if (led !== undefined) this.readLed(led);
    else if (event.key === 'Enter') this.pin.emit(at);
    else if (event.key === '+' || event.key === '-') this.zoomBy(event.key === '+' ? 1 : -1);
    else if (event.key === '0') this.showWhole();
    else if (event.key === 'Escape' && this.led() !== undefined) this.dropLed();
    else return;
    event.preventDefault();
  }

  protected dropLed(): void {
    if (this.led() === undefined) return;
    this.led.set(undefined);
    this.hover.emit(null);
  }

  private readLed(point: MapPoint): void {
    this.led.set(point);
    this.hover.emit(point);
  }

  private zoomByWheel(event: WheelEvent): void {
    if (this.map() === undefined) return;
    const window = this.gestures.wheel(event, this.ground());
    if (window !== 'none') event.preventDefault();
    this.show(window);
  }

  private show(window: MapWindow | undefined | 'none'): void {
    if (window !== 'none') this.closer.set(window);
  }

  private ground(): GestureGround {
    const { plotWidth, plotHeight } = this.frame();
    return {
      element: this.surface().nativeElement,
      size: { width: plotWidth, height: plotHeight },
      whole: this.whole(),
      window: this.window(),
    };
  }

  private placeOf(point: MapPoint | undefined): MapPoint | undefined {
    if (point === undefined || this.map() === undefined) return undefined;
    if (!isWithin(point, this.window())) return undefined;
    const { x, y } = this.scales();
    return { x: x(point.x), y: y(point.y) };
  }

  private paint(): void {
    const { plotWidth, plotHeight } = this.frame();
    const { x, y } = this.scales();
    const map = this.map();
    const canvas = this.canvas().nativeElement;
    const context = canvas.getContext('2d');
    if (context === null) return;
    const pixelRatio = canvas.ownerDocument.defaultView?.devicePixelRatio ?? 1;
    const width = Math.round(plotWidth * pixelRatio);
    const height = Math.round(plotHeight * pixelRatio);
    // Setting the size clears the canvas and takes a new buffer.
    if (canvas.width !== width) canvas.width = width;
    if (canvas.height !== height) canvas.height = height;
    const picture = this.picture();
    if (map === undefined || picture === undefined) {
      context.clearRect(0, 0, width, height);
      return;
    }
    const { xLow, xHigh, yLow, yHigh } = this.whole();
    const [x0, y0] = [x(xLow) * pixelRatio, y(yLow) * pixelRatio];
    paintMap(context, picture, picture.palette, {
      width,
      height,
      x0,
      y0,
      dx: (x(xHigh) * pixelRatio - x0) / (map.x.length - 1),
      dy: (y(yHigh) * pixelRatio - y0) / (map.y.length - 1),
      pixelRatio,
    });
  }

  private drawAxes(): void {
    const groups = { x: this.xTicks().nativeElement, y: this.yTicks().nativeElement };
    if (this.map() === undefined) clearAxes(groups);
    else drawAxes(groups, this.scales(), this.frame());
  }
}
