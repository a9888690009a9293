import { ChangeDetectionStrategy, Component, computed, signal } from '@angular/core';
import type { Scalar } from '../../../../shared/contracts';
import { expressionFault } from '../values/expression-fault';
import { readScalarText, scalarText } from '../values/number-text';
import { stepped } from '../values/scrub-step';
import { StudyFieldType } from './study-field-type';

const DEGREES = /^(.+?)\s*(?:°|deg)$/;

/** A number or an expression, typed, or stepped with the arrow keys: one unit of the third digit, with Shift ten. */
@Component({
  selector: 'app-scalar-field',
  template: `
    @if (readOnly()) {
      <span class="figure" [class.none]="text() === ''">{{ text() || props.placeholder || '' }}</span>
    } @else {
      <input
        type="text"
        inputmode="decimal"
        autocomplete="off"
        spellcheck="false"
        [id]="id"
        [value]="text()"
        [placeholder]="props.placeholder ?? ''"
        [attr.aria-label]="field.wrappers?.length ? null : props.label"
        [attr.aria-invalid]="invalid() || null"
        [attr.aria-describedby]="invalid() ? faultsId : null"
        (input)="type($event)"
        (blur)="settle()"
        (keydown.arrowup)="step($event, 1)"
        (keydown.arrowdown)="step($event, -1)"
        (keydown.shift.arrowup)="step($event, 10)"
        (keydown.shift.arrowdown)="step($event, -10)"
      />
    }
  `,
  styleUrls: ['./field-input.scss'],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScalarField extends StudyFieldType {
  /** What is in the field while it is being typed in. */
  private readonly typed = signal<string | undefined>(undefined);
  private readonly scalar = computed(() => this.value() as Scalar | undefined);

  protected readonly text = computed(() => {
    const typed = this.typed();
    const scalar = this.scalar();
    return typed !== undefined && (this.read(typed) ?? '') === (scalar ?? '') ? typed : scalarText(scalar);
  });

  protected readonly invalid = computed(
    () => this.hasFault() || expressionFault(this.scalar(), this.description.values().names) !== undefined,
  );

  protected type(event: Event): void {
    const text = (event.target as HTMLInputElement).value;
    this.typed.set(text);
    this.set(this.read(text));
  }

  protected settle(): void {
    this.typed.set(undefined);
  }

  protected step(event: Event, steps: number): void {
    const scalar = this.scalar();
    if (typeof scalar !== 'number') return;
    event.preventDefault();
    this.typed.set(undefined);
    this.set(stepped(scalar, steps));
  }

  private read(text: string): Scalar | undefined {
    const degrees = this.props.angle === true ? DEGREES.exec(text.trim())?.[1] : undefined;
    if (degrees === undefined) return readScalarText(text);
    const value = readScalarText(degrees);
    return typeof value === 'number' ? `${value}*pi/180` : text;
  }
}
