import { ChangeDetectionStrategy, Component, model, signal } from '@angular/core';
import { readStudy, StudyFaultError, type Fault, type Study } from '../../../shared/contracts';
import { FileField } from '../ui/form';

/** A study out of a file, judged before it is sent: every fault is shown with its path. */
@Component({
  selector: 'app-study-choice',
  imports: [FileField],
  template: `
    <app-file-field label="Study file (JSON)" accept=".json,application/json" (picked)="read($event.text)" />
    @if (study(); as study) {
      <p role="status">
        Read: {{ study.name ?? 'a study without a name' }}, {{ study.parameters.length }} parameters.
      </p>
    }
    @if (faults().length > 0) {
      <div class="form-fault" role="alert">
        <p>This file is not a usable study:</p>
        <ul>
          @for (fault of faults(); track $index) {
            <li>
              <code>{{ fault.path }}</code> {{ fault.message }}
            </li>
          }
        </ul>
      </div>
    }
  `,
  styles: `
    ul {
      max-height: 10rem;
      margin-top: 0.375rem;
      overflow-y: auto;
      font-weight: 400;
    }
    code {
      font: inherit;
      font-weight: 600;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StudyChoice {
  readonly study = model<Study>();
  protected readonly faults = signal<readonly Fault[]>([]);

  protected read(text: string): void {
    try {
      this.study.set(readStudy(text).study);
      this.faults.set([]);
    } catch (error) {
      if (!(error instanceof StudyFaultError)) throw error;
      this.study.set(undefined);
      this.faults.set(error.faults);
    }
  }
}
