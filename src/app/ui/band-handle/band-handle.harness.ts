/** Acts on a band handle as a hand would, for tests. */
export class BandHandleHarness {
  private constructor(readonly element: HTMLElement) {}

  static all(within: ParentNode): BandHandleHarness[] {
    return [...within.querySelectorAll<HTMLElement>('[role="slider"]')].map(
      (element) => new BandHandleHarness(element),
    );
  }

  static named(within: ParentNode, name: string): BandHandleHarness {
    const found = BandHandleHarness.all(within).find((handle) => handle.name === name);
    if (found === undefined) throw new Error(`There is no handle named "${name}".`);
    return found;
  }

  get name(): string {
    return this.element.getAttribute('aria-label') ?? '';
  }

  get value(): number {
    return Number(this.element.getAttribute('aria-valuenow'));
  }

  get range(): [number, number] {
    return [
      Number(this.element.getAttribute('aria-valuemin')),
      Number(this.element.getAttribute('aria-valuemax')),
    ];
  }

  get valueText(): string {
    return this.element.getAttribute('aria-valuetext') ?? '';
  }

  /** Drags through the offsets from where the handle was gripped, in CSS pixels, and lets go at the last. */
  drag(...offsets: readonly (readonly [number, number])[]): void {
    this.grip();
    for (const [x, y] of offsets) this.dragOn(x, y);
    this.point('pointerup', ...(offsets.at(-1) ?? [0, 0]));
  }

  grip(): void {
    this.point('pointerdown', 0, 0);
  }

  dragOn(x: number, y: number): void {
    this.point('pointermove', x, y);
  }

  /** Presses a key and lets it go, or holds it for several repeats. */
  press(key: string, { shift = false, times = 1 } = {}): void {
    for (let time = 0; time < times; time++) this.key('keydown', key, shift);
    this.key('keyup', key, shift);
  }

  private key(type: string, key: string, shiftKey: boolean): void {
    this.element.dispatchEvent(new KeyboardEvent(type, { key, shiftKey, bubbles: true, cancelable: true }));
  }

  private point(type: string, clientX: number, clientY: number): void {
    this.element.dispatchEvent(
      new PointerEvent(type, { pointerId: 1, button: 0, clientX, clientY, bubbles: true, cancelable: true }),
    );
  }
}
