import { BandHandleHarness } from '../band-handle/band-handle.harness';

/** Reads and works one tolerance lane, for tests. */
export class LaneHarness {
  private constructor(readonly element: HTMLElement) {}

  static named(within: ParentNode, name: string): LaneHarness {
    const lanes = [...within.querySelectorAll<HTMLElement>('app-lane, [role="group"]')];
    const found = lanes.find((lane) => lane.getAttribute('aria-label') === name);
    if (found === undefined) throw new Error(`There is no lane named "${name}".`);
    return new LaneHarness(found);
  }

  get handles(): BandHandleHarness[] {
    return BandHandleHarness.all(this.element);
  }

  handle(edge: 'low' | 'high'): BandHandleHarness {
    return BandHandleHarness.named(this.element, `${this.name}, ${edge} end`);
  }

  /** Where something is drawn, in per cent of the track; undefined where it is not. */
  drawnAt(what: 'nominal' | 'mark' | 'band' | 'proved'): number | undefined {
    const drawn = this.element.querySelector<HTMLElement>(`.rail .${what}`);
    return drawn === null ? undefined : Number.parseFloat(drawn.style.left);
  }

  get bandLength(): number {
    return Number.parseFloat(this.element.querySelector<HTMLElement>('.rail .band')?.style.width ?? 'NaN');
  }

  get name(): string {
    return this.element.getAttribute('aria-label') ?? '';
  }
}
