import type { Signal } from '@angular/core';
import type { Study } from '../../../shared/contracts';
import type { NominalValues } from './values/nominal-values';
import type { StudyFaults } from './values/study-faults';

/** What the fields of a description share: the study as it stands, what is wrong with it, and the way to change it. */
export abstract class Description {
  /** The study with every change made here, whether or not the page has taken it up yet. */
  abstract readonly draft: Signal<Study>;
  abstract readonly readOnly: Signal<boolean>;
  abstract readonly problems: Signal<StudyFaults>;
  abstract readonly values: Signal<NominalValues>;
  abstract change(study: Study): void;
}
