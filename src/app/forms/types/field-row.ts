import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { FieldWrapper, type FormlyFieldConfig } from '@ngx-formly/core';
import type { Scalar } from '../../../../shared/contracts';
import { Description } from '../description';
import { symbolParts } from '../drawing/symbol-parts';
import { SymbolText } from '../drawing/symbol-text';
import type { StudyProps } from '../fields/study-field';
import { figureText } from '../values/number-text';
import { FieldFaults } from './field-faults';
import { Scrub } from './scrub';

/** Expressions longer than this get a line of their own. */
const SHORT = 8;

/** Symbol, label, value and unit in one line; what an expression gives and what is wrong under it. */
@Component({
  selector: 'app-field-row',
  imports: [SymbolText, FieldFaults, Scrub],
  template: `
    <div class="row" [class.wide]="props.wide" [class.long]="long()">
      <span class="symbol" aria-hidden="true">
        @if (shortSymbol(); as symbol) {
          <app-symbol [symbol]="symbol" />
        }
      </span>
      @if (description.readOnly()) {
        <span class="label">{{ props.label }}{{ longSymbol() }}</span>
      } @else {
        <label class="label" [for]="id" [appScrub]="number()" (scrubbed)="formControl.setValue($event)"
          >{{ props.label }}{{ longSymbol() }}</label
        >
      }
      <span class="value" [class.long]="long()"><ng-container #fieldComponent /></span>
      @if (!props.wide) {
        <span class="unit">{{ props.unit }}</span>
      }
      @if (aside(); as aside) {
        <span class="aside">{{ aside }}</span>
      }
      @if (props.hint; as hint) {
        <span class="aside hint">{{ hint }}</span>
      }
      <app-field-faults
        class="faults"
        [id]="id + '-faults'"
        [path]="props.path"
        [value]="value()"
        [label]="props.label ?? ''"
        [expression]="isScalar"
      />
    </div>
  `,
  styleUrls: ['./row.scss'],
  styles: `
    :host {
      display: block;
    }
    .hint {
      margin: 0.25rem 0;
      text-align: left;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FieldRow extends FieldWrapper<FormlyFieldConfig<StudyProps>> {
  protected readonly description = inject(Description);

  protected readonly value = computed(() => this.props.lens?.read(this.description.draft()));
  protected readonly number = computed(() => {
    const value = this.value();
    return this.isScalar && typeof value === 'number' ? value : undefined;
  });
  protected readonly long = computed(() => {
    const value = this.value();
    return this.isScalar && typeof value === 'string' && value.length > SHORT;
  });

  /** What an expression gives at the nominal point, and an angle in degrees. */
  protected readonly aside = computed(() => {
    const written = this.value();
    if (!this.isScalar || written === undefined || written === '') return '';
    const value = this.description.values().of(written as Scalar);
    if (value === undefined) return '';
    const unit = this.props.unit === undefined ? '' : `\u2009${this.props.unit}`;
    const parts = [
      ...(typeof written === 'string' ? [`= ${figureText(value)}${unit}`] : []),
      ...(this.props.angle === true ? [`${figureText((value * 180) / Math.PI)}°`] : []),
    ];
    return parts.join(', ');
  });

  /** A name that is too long for the column of the symbols stands after the label. */
  protected readonly shortSymbol = computed(() => {
    const { symbol } = this.props;
    return symbol !== undefined && symbolParts(symbol).base.length <= 2 ? symbol : undefined;
  });
  protected readonly longSymbol = computed(() => {
    const { symbol, label } = this.props;
    return symbol === undefined || symbol === label || this.shortSymbol() !== undefined ? '' : `, ${symbol}`;
  });

  protected get isScalar(): boolean {
    return this.field.type === 'study-scalar';
  }
}
