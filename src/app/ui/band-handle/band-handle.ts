import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  computed,
  inject,
  input,
  output,
} from '@angular/core';
import { clamped, roundStep, toStep } from './round-step';

export interface HandleMove {
  readonly value: number;
  /** False while the hand is still at it, true once it lets go. */
  readonly final: boolean;
}

const TEN_STEPS = 10;

/**
 * The band handle: a rounded bar on an edge that is dragged across a track or a map, or stepped with the keys. Its
 * parent places it (left and top) where the value is drawn. Pointer: the value follows the hand, Escape takes it back.
 * Keys: arrows one step, Shift or Page keys ten, Home and End to the ends.
 */
@Component({
  selector: 'app-band-handle',
  template: `<span class="bar"></span>`,
  styleUrl: './band-handle.scss',
  host: {
    role: 'slider',
    tabindex: '0',
    '[attr.aria-label]': 'label()',
    '[attr.aria-orientation]': 'along() === "x" ? "horizontal" : "vertical"',
    '[attr.aria-valuenow]': 'value()',
    '[attr.aria-valuemin]': 'minimum()',
    '[attr.aria-valuemax]': 'maximum()',
    '[attr.aria-valuetext]': 'valueText()',
    '[class.along-x]': 'along() === "x"',
    '[class.along-y]': 'along() === "y"',
    '[class.lean-back]': 'lean() === "back"',
    '[class.lean-forward]': 'lean() === "forward"',
    '(pointerdown)': 'grip($event)',
    '(pointermove)': 'follow($event)',
    '(pointerup)': 'release($event)',
    '(pointercancel)': 'release($event)',
    '(keydown)': 'pressKey($event)',
    '(keyup)': 'liftKey()',
    '(blur)': 'liftKey()',
  },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BandHandle {
  /** The direction the handle moves in. */
  readonly along = input<'x' | 'y'>('x');
  readonly label = input.required<string>();
  readonly value = input.required<number>();
  readonly valueText = input.required<string>();
  readonly minimum = input.required<number>();
  readonly maximum = input.required<number>();
  /** Value per CSS pixel to the right or down: negative where the axis runs up. */
  readonly perPixel = input.required<number>();
  /** What one press of an arrow key adds. */
  readonly step = input.required<number>();
  /** Where the touch target lies about the bar; two handles that stand close lean away from each other. */
  readonly lean = input<'none' | 'back' | 'forward'>('none');
  readonly move = output<HandleMove>();

  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  /** Dragged values are round to the pixel: a hand cannot mean more digits than that. */
  private readonly grain = computed(() => roundStep(Math.abs(this.perPixel())));
  private drag:
    { pointer: number; from: number; startValue: number; last: number; moved: boolean } | undefined;
  /** The value the keys have reached: the parent may not have drawn it yet when the next key comes. */
  private keyed: number | undefined;

  protected grip(event: PointerEvent): void {
    if (event.button !== 0 || this.drag !== undefined) return;
    event.stopPropagation();
    event.preventDefault();
    this.liftKey();
    this.element.focus({ preventScroll: true });
    this.element.setPointerCapture(event.pointerId);
    const value = this.value();
    this.drag = {
      pointer: event.pointerId,
      from: this.position(event),
      startValue: value,
      last: value,
      moved: false,
    };
  }

  protected follow(event: PointerEvent): void {
    if (this.drag?.pointer !== event.pointerId) return;
    event.stopPropagation();
    const moved = this.position(event) - this.drag.from;
    const wanted = this.drag.startValue + moved * this.perPixel();
    const value = moved === 0 ? this.drag.startValue : this.held(toStep(wanted, this.grain()));
    if (value === this.drag.last) return;
    this.drag.last = value;
    this.drag.moved = true;
    this.move.emit({ value, final: false });
  }

  protected release(event: PointerEvent): void {
    if (this.drag?.pointer !== event.pointerId) return;
    event.stopPropagation();
    const { last, moved } = this.drag;
    this.drag = undefined;
    // A drag that came back to its start has shown other values in between: its end is an end all the same.
    if (moved) this.move.emit({ value: last, final: true });
  }

  protected pressKey(event: KeyboardEvent): void {
    if (event.ctrlKey || event.altKey || event.metaKey) return;
    if (event.key === 'Escape' && this.drag !== undefined) {
      event.stopPropagation();
      const { startValue, moved } = this.drag;
      this.drag = undefined;
      if (moved) this.move.emit({ value: startValue, final: true });
      return;
    }
    const from = this.keyed ?? this.value();
    const wanted = this.keyValue(event, from);
    if (wanted === undefined || this.drag !== undefined) return;
    event.preventDefault();
    const value = this.held(wanted);
    if (value === from) return;
    this.keyed = value;
    this.move.emit({ value, final: false });
  }

  /** A held key is one move: it ends when the key is let go or the focus leaves. */
  protected liftKey(): void {
    if (this.keyed === undefined) return;
    const value = this.keyed;
    this.keyed = undefined;
    this.move.emit({ value, final: true });
  }

  private keyValue({ key, shiftKey }: KeyboardEvent, from: number): number | undefined {
    const by = (steps: number) =>
      Number((from + steps * this.step() * (shiftKey ? TEN_STEPS : 1)).toPrecision(12));
    switch (key) {
      case 'ArrowRight':
      case 'ArrowUp':
        return by(1);
      case 'ArrowLeft':
      case 'ArrowDown':
        return by(-1);
      case 'PageUp':
        return by(shiftKey ? 1 : TEN_STEPS);
      case 'PageDown':
        return by(shiftKey ? -1 : -TEN_STEPS);
      case 'Home':
        return this.minimum();
      case 'End':
        return this.maximum();
      default:
        return undefined;
    }
  }

  private held(value: number): number {
    return clamped(value, this.minimum(), this.maximum());
  }

  private position(event: PointerEvent): number {
    return this.along() === 'x' ? event.clientX : event.clientY;
  }
}
