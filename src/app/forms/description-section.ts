import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  Injector,
  input,
  linkedSignal,
} from '@angular/core';
import { FormGroup } from '@angular/forms';
import { FormlyForm } from '@ngx-formly/core';
import type { Study } from '../../../shared/contracts';
import { Description } from './description';
import type { FieldValue, Lens, StudyField } from './fields/study-field';

/** The values of a section's fields by their keys, as Formly keeps them. */
type Values = Record<string, FieldValue>;

interface Shape {
  readonly signature: string;
  readonly fields: StudyField[];
  readonly lenses: ReadonlyMap<string, Lens>;
  readonly claimed: ReadonlySet<string>;
  readonly form: FormGroup;
}

/**
 * One part of a description as a form. Its fields are made anew only when they change in kind or number, so that what
 * moves under a hand keeps its place and its focus; values reach the fields through the study itself.
 */
@Component({
  selector: 'app-description-section',
  imports: [FormlyForm],
  template: `
    <formly-form
      [form]="shape().form"
      [fields]="shape().fields"
      [model]="model()"
      (modelChange)="take($event)"
    />
    @for (fault of others(); track $index) {
      <p class="other">{{ fault.path }} {{ fault.message }}.</p>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .other {
      margin-top: 0.25rem;
      padding-left: 0.5rem;
      border-left: 3px solid var(--ink);
      font-size: 0.75rem;
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DescriptionSection {
  private readonly description = inject(Description);
  private readonly injector = inject(Injector);
  /** Makes the fields of this part; what it returns depends on the study alone. */
  readonly fields = input.required<(study: Study) => StudyField[]>();
  /** The keys of the study that this part stands for. */
  readonly roots = input.required<readonly string[]>();
  readonly prefix = input.required<string>();

  protected readonly shape = computed<Shape>(
    () => shapeOf(this.fields()(this.description.draft()), this.prefix()),
    {
      equal: (one, other) => one.signature === other.signature,
    },
  );

  protected readonly model = linkedSignal<Values>(() => valuesOf(this.shape(), this.description.draft()), {
    equal: sameValues,
  });

  protected readonly others = computed(() =>
    this.description.problems().unclaimed(this.roots(), this.shape().claimed),
  );

  constructor() {
    effect(() => {
      this.shape();
      const focused = document.activeElement?.id;
      if (focused === undefined || !focused.startsWith(this.prefix())) return;
      afterNextRender(() => document.getElementById(focused)?.focus(), { injector: this.injector });
    });
  }

  /** The study with every field that Formly reports as changed. */
  protected take(values: Values): void {
    const before = this.description.draft();
    let study = before;
    for (const [key, lens] of this.shape().lenses) {
      // Compared with what stood there before: one write may take away what another lens looks at.
      if (values[key] !== lens.read(before)) study = lens.write(study, values[key]);
    }
    if (study !== before) this.description.change(study);
  }
}

function shapeOf(fields: StudyField[], prefix: string): Shape {
  const lenses = new Map<string, Lens>();
  const claimed = new Set<string>();
  const visit = (field: StudyField, place: string) => {
    const key = Array.isArray(field.key) ? String(field.key[0]) : place;
    field.id = `${prefix}-${key}`;
    const { lens, path } = field.props ?? {};
    if (lens !== undefined && field.key !== undefined) lenses.set(key, lens);
    if (path !== undefined) claimed.add(path);
    field.fieldGroup?.forEach((part, index) => visit(part, `${place}-${index}`));
  };
  fields.forEach((field, index) => visit(field, String(index)));
  // Taken before Formly adds its own marks to the fields; functions are left out of it.
  return { signature: JSON.stringify(fields), fields, lenses, claimed, form: new FormGroup({}) };
}

function valuesOf({ lenses }: Shape, study: Study): Values {
  return Object.fromEntries([...lenses].map(([key, lens]) => [key, lens.read(study)]));
}

function sameValues(one: Values, other: Values): boolean {
  const keys = new Set([...Object.keys(one), ...Object.keys(other)]);
  return [...keys].every((key) => one[key] === other[key]);
}
