import { BandHandleHarness } from '../band-handle/band-handle.harness';

/** Reads and works a heat map, for tests. Places are in CSS pixels from the plot's upper left corner. */
export class HeatMapHarness {
  constructor(private readonly root: ParentNode) {}

  get sentence(): string {
    return this.found('[role="img"]').getAttribute('aria-label') ?? '';
  }

  get handles(): BandHandleHarness[] {
    return BandHandleHarness.all(this.root);
  }

  handle(name: string): BandHandleHarness {
    return BandHandleHarness.named(this.root, name);
  }

  /** Width and height of the plot. */
  get size(): [number, number] {
    const { style } = this.surface;
    return [Number.parseFloat(style.width), Number.parseFloat(style.height)];
  }

  tickLabels(axis: 'x' | 'y'): string[] {
    const groups = [...this.root.querySelectorAll('.axis')];
    const group = groups[axis === 'x' ? 0 : 1];
    return [...(group?.querySelectorAll('text') ?? [])].map((text) => text.textContent ?? '');
  }

  drawn(what: 'nominal' | 'failing' | 'pinned' | 'proved' | 'band'): boolean {
    return this.root.querySelector(`svg .${what}`) !== null;
  }

  get greyed(): boolean {
    return this.found('canvas').classList.contains('greyed');
  }

  hover(x: number, y: number): void {
    this.point('pointermove', x, y);
  }

  leave(): void {
    this.point('pointerleave', 0, 0);
  }

  click(x: number, y: number): void {
    this.point('pointerdown', x, y);
    this.point('pointerup', x, y);
    this.mouse('click', x, y, 1);
  }

  doubleClick(x: number, y: number): void {
    this.click(x, y);
    this.mouse('click', x, y, 2);
    this.mouse('dblclick', x, y, 2);
  }

  drag(from: readonly [number, number], to: readonly [number, number]): void {
    this.point('pointerdown', ...from);
    this.point('pointermove', ...to);
    this.point('pointerup', ...to);
    this.mouse('click', ...to, 1);
  }

  /** Two fingers, from one distance apart to another, about a place; the fingers lie beside each other. */
  pinch(about: readonly [number, number], from: number, to: number): void {
    const [x, y] = about;
    this.point('pointerdown', x - from / 2, y, 1);
    this.point('pointerdown', x + from / 2, y, 2);
    this.point('pointermove', x - to / 2, y, 1);
    this.point('pointermove', x + to / 2, y, 2);
    this.point('pointerup', x - to / 2, y, 1);
    this.point('pointerup', x + to / 2, y, 2);
  }

  /** Turns the wheel; whether the page may still scroll. */
  wheel(x: number, y: number, deltaY: number): boolean {
    const event = new WheelEvent('wheel', { deltaY, bubbles: true, cancelable: true });
    // DOM emulators leave the place of a wheel event out.
    Object.defineProperties(event, { clientX: { value: x }, clientY: { value: y } });
    return this.surface.dispatchEvent(event);
  }

  /** Presses a key on the point that the keys lead. */
  press(key: string, shiftKey = false): void {
    this.surface.dispatchEvent(
      new KeyboardEvent('keydown', { key, shiftKey, bubbles: true, cancelable: true }),
    );
  }

  private get surface(): HTMLElement {
    return this.found('.surface');
  }

  private found(selector: string): HTMLElement {
    const element = this.root.querySelector<HTMLElement>(selector);
    if (element === null) throw new Error(`The map has no ${selector}.`);
    return element;
  }

  private point(type: string, clientX: number, clientY: number, pointerId = 1): void {
    const bubbles = type !== 'pointerleave';
    this.surface.dispatchEvent(new PointerEvent(type, { pointerId, button: 0, clientX, clientY, bubbles }));
  }

  private mouse(type: string, clientX: number, clientY: number, detail: number): void {
    this.surface.dispatchEvent(new MouseEvent(type, { clientX, clientY, detail, bubbles: true }));
  }
}
