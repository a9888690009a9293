import { ChangeDetectionStrategy, Component } from '@angular/core';
import { FieldFaults } from './field-faults';
import { FieldRow } from './field-row';

/** The level of a requirement: value, unit and faults in the columns of the row around them. */
@Component({
  selector: 'app-level-cells',
  imports: [FieldFaults],
  template: `
    <span class="value" [class.long]="long()">
      <span class="sign" aria-hidden="true">≥</span>
      <label class="unseen" [for]="id">{{ props.label }}</label>
      <ng-container #fieldComponent />
    </span>
    <span class="unit">{{ props.unit }}</span>
    @if (aside(); as aside) {
      <span class="aside">{{ aside }}</span>
    }
    <app-field-faults
      class="faults"
      [id]="id + '-faults'"
      [path]="props.path"
      [value]="value()"
      [label]="props.label ?? ''"
    />
  `,
  styleUrls: ['./row.scss'],
  styles: `
    :host {
      display: contents;
    }
    .value {
      display: grid;
      grid-template-columns: auto minmax(0, 1fr);
      align-items: baseline;
    }
    label {
      grid-row: 1;
    }
    .value:not(.long) {
      grid-column: 3;
    }
    .sign {
      color: var(--ink-second);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LevelCells extends FieldRow {}
