import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MAP_MEASURES, MAP_OTHERS } from '../../../../../shared/contracts';
import type { ParameterFacts } from '../store/parameter-facts';
import type { MapChoice } from './map-choice';
import { MAP_MEASURE_WORDS, MAP_OTHERS_WORDS } from './map-words';

/** What the map shows, chosen in the words of one line. */
@Component({
  selector: 'app-map-controls',
  template: `
    @let choice = this.choice();
    <span class="control">
      <label for="map-across">Across</label>
      <select id="map-across" #x (change)="choose({ x: x.value })">
        @for (parameter of parameters(); track parameter.id) {
          <option [value]="parameter.id" [selected]="parameter.id === choice.x">{{ parameter.label }}</option>
        }
      </select>
    </span>
    <span class="control">
      <label for="map-up">Up</label>
      <select id="map-up" #y (change)="choose({ y: y.value })">
        @for (parameter of parameters(); track parameter.id) {
          <option [value]="parameter.id" [selected]="parameter.id === choice.y">{{ parameter.label }}</option>
        }
      </select>
    </span>
    <span class="control">
      <label for="map-colour">Colour</label>
      <select id="map-colour" #measure (change)="chooseMeasure(measure.selectedIndex)">
        @for (known of measures; track known) {
          <option [selected]="known === choice.measure">{{ measureWords[known] }}</option>
        }
      </select>
    </span>
    <span class="control">
      <label for="map-others">Others</label>
      <select id="map-others" #others (change)="chooseOthers(others.selectedIndex)">
        @for (known of othersKnown; track known) {
          <option [selected]="known === choice.others">{{ othersWords[known] }}</option>
        }
      </select>
      @if (choice.others === 'anywhere') {
        <span class="sampled">sampled</span>
      }
    </span>
    <span class="cells">{{ note() }}</span>
  `,
  styleUrl: './map-controls.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MapControls {
  readonly choice = input.required<MapChoice>();
  readonly parameters = input.required<readonly ParameterFacts[]>();
  readonly note = input('');
  readonly choiceChange = output<MapChoice>();

  protected readonly measures = MAP_MEASURES;
  protected readonly othersKnown = MAP_OTHERS;
  protected readonly measureWords = MAP_MEASURE_WORDS;
  protected readonly othersWords = MAP_OTHERS_WORDS;

  /** An axis that takes the other's parameter gives its own to it. */
  protected choose(axes: Partial<Pick<MapChoice, 'x' | 'y'>>): void {
    const { choice } = this;
    const { x, y } = choice();
    const next = { ...choice(), ...axes };
    if (next.x === next.y) Object.assign(next, { x: y, y: x });
    this.choiceChange.emit(next);
  }

  protected chooseMeasure(index: number): void {
    this.choiceChange.emit({ ...this.choice(), measure: MAP_MEASURES[index] });
  }

  protected chooseOthers(index: number): void {
    this.choiceChange.emit({ ...this.choice(), others: MAP_OTHERS[index] });
  }
}
