import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  forwardRef,
  input,
  linkedSignal,
  output,
} from '@angular/core';
import { isTemplateMachine, lawsOf, type Fault, type Study } from '../../../shared/contracts';
import { Description } from './description';
import { DescriptionSection } from './description-section';
import { MachineDrawing } from './drawing/machine-drawing';
import { controlFields } from './fields/control-fields';
import { hardwareFields } from './fields/hardware-fields';
import { machineFields } from './fields/machine-fields';
import { parameterFields } from './fields/parameter-fields';
import { ratingFields } from './fields/rating-fields';
import { requirementFields } from './fields/requirement-fields';
import type { StudyField } from './fields/study-field';
import { NominalValues } from './values/nominal-values';
import { StudyFaults } from './values/study-faults';

interface Section {
  readonly name: string;
  readonly title: string;
  readonly roots: readonly string[];
  readonly fields: (study: Study) => StudyField[];
}

const SECTIONS: readonly Section[] = [
  { name: 'machine', title: 'Machine', roots: ['machine'], fields: machineFields },
  { name: 'parameters', title: 'Parameters', roots: ['parameters', 'definitions'], fields: parameterFields },
  { name: 'control', title: 'Control', roots: ['control'], fields: controlFields },
  { name: 'hardware', title: 'Hardware', roots: ['actuator', 'sensor', 'sampling'], fields: hardwareFields },
  { name: 'requirements', title: 'Requirements', roots: ['requirements'], fields: requirementFields },
  {
    name: 'rating',
    title: 'Payload and rating',
    roots: ['payload', 'searchUpTo', 'searchDownTo', 'rating', 'map', 'name', 'study'],
    fields: ratingFields,
  },
];

let descriptions = 0;

/**
 * Everything that is described of a machine, its control and what is required of it, in forms made from the study. Each
 * change is given out as a new study at once, also one that is not usable yet: the faults stand at their fields.
 */
@Component({
  selector: 'app-study-description',
  imports: [DescriptionSection, MachineDrawing],
  template: `
    @for (section of sections; track section.name) {
      <section [attr.aria-labelledby]="id + '-' + section.name">
        <div class="head">
          <h3 [id]="id + '-' + section.name">{{ section.title }}</h3>
          <span class="second">{{ asides()[section.name] }}</span>
        </div>
        @if (section.name === 'machine') {
          <app-machine-drawing [template]="template()" [custom]="custom()" />
        }
        <app-description-section
          [fields]="section.fields"
          [roots]="section.roots"
          [prefix]="id + '-' + section.name"
        />
      </section>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    section + section {
      margin-top: 1rem;
      padding-top: 0.875rem;
      border-top: 1px solid var(--rule);
    }
    .head {
      display: flex;
      align-items: baseline;
      justify-content: space-between;
      gap: 0.5rem;
      margin-bottom: 0.5rem;
    }
    .head .second {
      font-size: 0.75rem;
      font-stretch: 88%;
      text-align: right;
    }
    app-machine-drawing {
      margin: 0.75rem 0;
    }
  `,
  providers: [{ provide: Description, useExisting: forwardRef(() => StudyDescription) }],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StudyDescription extends Description {
  readonly study = input.required<Study>();
  readonly readOnly = input(false, { transform: booleanAttribute });
  /** What the engine found; faults that need no evaluation are found here. */
  readonly faults = input<readonly Fault[]>([]);
  readonly studyChange = output<Study>();

  readonly draft = linkedSignal(() => this.study());
  readonly problems = computed(() => new StudyFaults(this.draft(), this.faults()));
  readonly values = computed(() => new NominalValues(this.draft()));

  protected readonly sections = SECTIONS;
  protected readonly id = `description-${(descriptions += 1)}`;
  protected readonly template = computed(() => {
    const { machine } = this.draft();
    return isTemplateMachine(machine) ? machine.template : undefined;
  });
  protected readonly custom = computed(() => {
    const { machine } = this.draft();
    return isTemplateMachine(machine) ? undefined : machine;
  });
  protected readonly asides = computed<Record<string, string>>(() => {
    const { control, requirements, parameters } = this.draft();
    const toleranced = parameters.filter(({ low, high }) => low !== undefined || high !== undefined).length;
    const laws = lawsOf(control).length;
    return {
      parameters: `${toleranced} with a band`,
      control: laws === 0 ? 'none' : laws === 1 ? '' : `${laws} laws`,
      requirements: `${requirements.length} chosen`,
    };
  });

  change(study: Study): void {
    this.draft.set(study);
    this.studyChange.emit(study);
  }
}
