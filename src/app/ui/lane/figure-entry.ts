import {
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  afterNextRender,
  Injector,
  computed,
  inject,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { figureText, withUnit } from '../band-handle';
import { readFigure } from './read-figure';

let made = 0;

/** A figure that turns into a field when it is pressed. Enter and leaving the field keep, Escape takes back. */
@Component({
  selector: 'app-figure-entry',
  template: `
    @if (draft() === undefined) {
      <button #figure type="button" [attr.aria-label]="pressLabel()" (click)="open()">
        {{ text() }}
      </button>
    } @else {
      <input
        #field
        type="text"
        inputmode="decimal"
        autocomplete="off"
        [attr.aria-label]="label()"
        [attr.aria-invalid]="fault() === '' ? null : 'true'"
        [attr.aria-describedby]="fault() === '' ? null : faultId"
        [value]="draft()"
        (input)="draft.set(field.value)"
        (keydown.enter)="keepByKey($event)"
        (keydown.escape)="takeBack($event)"
        (blur)="keep(false)"
      />
      @if (fault(); as fault) {
        <span class="fault" role="alert" [id]="faultId">{{ fault }}</span>
      }
    }
  `,
  styles: `
    :host {
      display: block;
    }
    button,
    input {
      height: 20px;
      padding: 0 3px;
      border: 0;
      border-radius: var(--radius);
      background: none;
      font-size: 0.75rem;
      font-weight: 500;
      line-height: 20px;
    }
    button {
      white-space: nowrap;
      cursor: text;
    }
    button:hover {
      background: var(--rule);
    }
    input {
      width: 72px;
      border: 1px solid var(--ink);
      background: var(--raised);
    }
    .fault {
      position: absolute;
      z-index: 4;
      top: 100%;
      left: var(--fault-left, 0);
      right: var(--fault-right, auto);
      width: max-content;
      max-width: 240px;
      margin-top: 2px;
      padding: 4px 8px;
      border-left: 4px solid var(--ink);
      background: var(--raised);
      font-size: 0.75rem;
      font-weight: 600;
      text-align: left;
    }
    @media (pointer: coarse) {
      button {
        position: relative;
      }
      button::before {
        content: '';
        position: absolute;
        inset: -14px -10px 0;
      }
      input {
        height: 32px;
        font-size: 1rem;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FigureEntry {
  /** What the figure is: "Payload, high end". */
  readonly label = input.required<string>();
  readonly unit = input('');
  readonly value = input.required<number>();
  readonly minimum = input.required<number>();
  readonly maximum = input.required<number>();
  readonly entered = output<number>();

  protected readonly faultId = `figure-fault-${++made}`;
  /** The text under the hand; undefined where the figure is only shown. */
  protected readonly draft = signal<string | undefined>(undefined);
  protected readonly text = computed(() => figureText(this.value()));
  protected readonly pressLabel = computed(
    () => `${this.label()}: ${withUnit(this.value(), this.unit())}, enter a figure`,
  );
  private readonly tried = signal(false);
  private readonly read = computed(() => {
    const range = { minimum: this.minimum(), maximum: this.maximum() };
    return readFigure(this.draft() ?? '', this.unit(), range, (value) => withUnit(value, this.unit()));
  });
  protected readonly fault = computed(() => {
    const read = this.read();
    return this.tried() && 'fault' in read ? `${this.label()} ${read.fault}.` : '';
  });

  private readonly injector = inject(Injector);
  private readonly figure = viewChild<ElementRef<HTMLElement>>('figure');
  private readonly field = viewChild<ElementRef<HTMLInputElement>>('field');

  protected open(): void {
    this.tried.set(false);
    this.draft.set(figureText(this.value()));
    afterNextRender(
      () => {
        const field = this.field()?.nativeElement;
        field?.focus();
        field?.select();
      },
      { injector: this.injector },
    );
  }

  /** A field that is left with a fault is taken back: nothing unusable stays behind out of sight. */
  protected keep(byKey: boolean): void {
    const draft = this.draft();
    if (draft === undefined) return;
    const read = this.read();
    if ('fault' in read) {
      if (byKey) this.tried.set(true);
      else this.draft.set(undefined);
      return;
    }
    this.close(byKey);
    // The shown figure is rounded; leaving it as it was must not round the value.
    if (draft !== figureText(this.value())) this.entered.emit(read.value);
  }

  protected keepByKey(event: Event): void {
    // The focus goes back to the figure: the same press must not open it again.
    event.preventDefault();
    this.keep(true);
  }

  protected takeBack(event: Event): void {
    event.stopPropagation();
    this.close(true);
  }

  private close(backToFigure: boolean): void {
    this.draft.set(undefined);
    if (!backToFigure) return;
    afterNextRender(() => this.figure()?.nativeElement.focus(), { injector: this.injector });
  }
}
