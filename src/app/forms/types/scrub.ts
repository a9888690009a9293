import { Directive, input, output } from '@angular/core';
import { scrubStep, stepped } from '../values/scrub-step';

/** Way of the pointer in pixels for one step. */
const STEP_WAY = 3;

interface Hold {
  readonly x: number;
  readonly value: number;
  readonly step: number;
}

/** Lets a number be moved by dragging its label sideways: one unit of the third digit a step, with Shift ten. */
@Directive({
  selector: '[appScrub]',
  host: {
    '[class.scrubs]': 'value() !== undefined',
    '(pointerdown)': 'take($event)',
    '(pointermove)': 'move($event)',
    '(pointerup)': 'letGo()',
    '(pointercancel)': 'letGo()',
    '(click)': 'endDrag($event)',
  },
})
export class Scrub {
  /** Undefined where there is no number to move. */
  readonly value = input.required<number | undefined>({ alias: 'appScrub' });
  readonly scrubbed = output<number>();

  private hold: Hold | undefined;
  private steps = 0;
  private hasMoved = false;

  protected take(event: PointerEvent): void {
    const value = this.value();
    this.hasMoved = false;
    if (value === undefined || event.button !== 0) return;
    this.hold = { x: event.clientX, value, step: scrubStep(value) };
    this.steps = 0;
    if (event.currentTarget instanceof Element) event.currentTarget.setPointerCapture(event.pointerId);
  }

  protected move(event: PointerEvent): void {
    if (this.hold === undefined) return;
    const { x, value, step } = this.hold;
    const steps = Math.trunc((event.clientX - x) / STEP_WAY) * (event.shiftKey ? 10 : 1);
    if (steps === this.steps) return;
    this.steps = steps;
    this.hasMoved = true;
    this.scrubbed.emit(stepped(value, steps, step));
  }

  protected letGo(): void {
    this.hold = undefined;
  }

  /** The click that ends a drag would put the cursor into the field. */
  protected endDrag(event: Event): void {
    if (this.hasMoved) event.preventDefault();
    this.hasMoved = false;
  }
}
