import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Parameter, Study } from '../../../../../shared/contracts';
import { controlFacts, machineText, ratingFacts, requirementFacts, scalarText } from './study-text';

const KIND_WORDS = { tolerance: 'tolerance', use: 'use', wear: 'wear' };

/** What the study is: machine, parameters with their bands, control, requirements, rating. */
@Component({
  selector: 'app-study-view',
  templateUrl: './study-view.html',
  styleUrl: './study-view.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StudyView {
  readonly study = input.required<Study>();

  protected readonly machine = computed(() => machineText(this.study()));
  protected readonly groups = computed(() =>
    [
      {
        title: 'Control',
        facts: controlFacts(this.study()),
        none: 'No control: the machine runs without a loop.',
      },
      { title: 'Requirements', facts: requirementFacts(this.study().requirements), none: '' },
      {
        title: 'Rating',
        facts: ratingFacts(this.study()),
        none: 'No rating: the study asks for no plate value.',
      },
    ].filter(({ facts, none }) => facts.length > 0 || none !== ''),
  );

  protected readonly text = scalarText;

  protected band({ low, high }: Parameter): string {
    return low === undefined || high === undefined ? 'exact' : `${scalarText(low)} to ${scalarText(high)}`;
  }

  protected kind(parameter: Parameter): string {
    if (parameter.id === this.study().payload) return 'payload';
    return parameter.low === undefined ? '' : KIND_WORDS[parameter.kind ?? 'tolerance'];
  }
}
