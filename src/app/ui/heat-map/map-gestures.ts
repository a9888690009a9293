import type { MapPoint, MapWindow } from './map-grid';
import { panWindow, zoomWindow } from './view-window';

/** What the gestures work on: the plot as it is drawn now. */
export interface GestureGround {
  readonly element: HTMLElement;
  /** Size of the plot in CSS pixels. */
  readonly size: { readonly width: number; readonly height: number };
  readonly whole: MapWindow;
  readonly window: MapWindow;
}

/** A hand that moved no further than this has pressed, not dragged; CSS pixels. */
const STILL = 5;
/** Zoom of one notch of a usual wheel (100 pixels). */
const WHEEL_NOTCH = 1.25;

/** Pan with one pointer, zoom with two or with the wheel. Returns the window to show; undefined is the whole map. */
export class MapGestures {
  private readonly pointers = new Map<number, MapPoint>();
  private start: MapPoint | undefined;
  /** A drag or pinch that went on: the click at its end is none. */
  private moved = false;

  press(event: PointerEvent): void {
    if (event.button !== 0) return;
    if (this.pointers.size === 0) {
      this.start = { x: event.clientX, y: event.clientY };
      this.moved = false;
    }
    this.pointers.set(event.pointerId, { x: event.clientX, y: event.clientY });
  }

  /** The new window, or 'none' where this pointer moves nothing. */
  drag(event: PointerEvent, ground: GestureGround): MapWindow | undefined | 'none' {
    const before = this.pointers.get(event.pointerId);
    if (before === undefined || this.start === undefined) return 'none';
    const now = { x: event.clientX, y: event.clientY };
    const zoomed = ground.window !== ground.whole;
    if (this.pointers.size === 1) {
      const far = Math.max(Math.abs(now.x - this.start.x), Math.abs(now.y - this.start.y)) > STILL;
      if (!this.moved && !far) return 'none';
      this.moved = true;
      this.pointers.set(event.pointerId, now);
      if (!zoomed) return 'none';
      ground.element.setPointerCapture(event.pointerId);
      return this.panned(ground, ground.window, before, now);
    }
    const other = [...this.pointers].find(([id]) => id !== event.pointerId)?.[1];
    if (other === undefined) return 'none';
    this.moved = true;
    this.pointers.set(event.pointerId, now);
    const factor = distanceOf(now, other) / Math.max(1, distanceOf(before, other));
    const middle = { x: (now.x + other.x) / 2, y: (now.y + other.y) / 2 };
    const middleBefore = { x: (before.x + other.x) / 2, y: (before.y + other.y) / 2 };
    const closer = zoomWindow(
      ground.window,
      ground.whole,
      factor,
      pointAt(ground, middleBefore.x, middleBefore.y),
    );
    return closer && this.panned(ground, closer, middleBefore, middle);
  }

  release(event: PointerEvent): void {
    this.pointers.delete(event.pointerId);
  }

  /** Whether the click that follows a press stands for the point under it. */
  get pressedOnly(): boolean {
    return !this.moved;
  }

  /** The new window, or 'none' where the page may scroll on. */
  wheel(event: WheelEvent, ground: GestureGround): MapWindow | undefined | 'none' {
    const outwards = event.deltaY > 0;
    if (event.deltaY === 0 || (outwards && ground.window === ground.whole)) return 'none';
    const pixels = event.deltaMode === 0 ? event.deltaY : event.deltaY * 33;
    const factor = WHEEL_NOTCH ** (-Math.max(-300, Math.min(300, pixels)) / 100);
    return zoomWindow(ground.window, ground.whole, factor, pointAt(ground, event.clientX, event.clientY));
  }

  private panned({ size, whole }: GestureGround, window: MapWindow, from: MapPoint, to: MapPoint): MapWindow {
    return panWindow(window, whole, {
      x: ((from.x - to.x) * (window.xHigh - window.xLow)) / size.width,
      y: ((to.y - from.y) * (window.yHigh - window.yLow)) / size.height,
    });
  }
}

/** The point of the map under a place of the page. */
export function pointAt(
  { element, size, window }: GestureGround,
  clientX: number,
  clientY: number,
): MapPoint {
  const { left, top } = element.getBoundingClientRect();
  const across = Math.max(0, Math.min(1, (clientX - left) / size.width));
  const up = Math.max(0, Math.min(1, 1 - (clientY - top) / size.height));
  return {
    x: window.xLow + across * (window.xHigh - window.xLow),
    y: window.yLow + up * (window.yHigh - window.yLow),
  };
}

function distanceOf(a: MapPoint, b: MapPoint): number {
  return Math.hypot(a.x - b.x, a.y - b.y);
}
