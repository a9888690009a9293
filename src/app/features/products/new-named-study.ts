import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import type { Study } from '../../../../shared/contracts';
import { scenarioSchema, titleSchema } from '../../../../shared/contracts/api';
import { Api } from '../../core/api';
import { submission, validBy } from '../../core/form';
import { StudyChoice } from '../../forms/study-choice';
import { DialogFrame } from '../../ui/dialog';
import { ChoiceField, TextField, type Choice } from '../../ui/form';

export interface NewNamedStudyData {
  readonly title: string;
  readonly nameLabel: string;
  readonly act: string;
  /** Scenarios whose study may be taken over; without any, the study comes from a file. */
  readonly scenarios: readonly { readonly id: string; readonly name: string }[];
  /** Sends what was entered; what it throws is shown in the dialog. */
  readonly save: (name: string, study: unknown) => Promise<void>;
}

const FROM_FILE = 'file';

/** A name and a study to start from: a new variant, or a new scenario of one. */
@Component({
  selector: 'app-new-named-study',
  imports: [ChoiceField, DialogFrame, ReactiveFormsModule, StudyChoice, TextField],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="save()" novalidate>
      <app-dialog-frame [title]="data.title">
        @if (submission.fault(); as fault) {
          <p class="form-fault" role="alert">{{ fault }}</p>
        }
        <app-text-field [label]="data.nameLabel" [control]="form.controls.name" />
        @if (data.scenarios.length > 0) {
          <app-choice-field label="Start from" [choices]="starts" [control]="form.controls.start" />
        }
        @if (form.controls.start.value === fromFile) {
          <app-study-choice [(study)]="study" />
        }
        <button dialogActs type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
          {{ data.act }}
        </button>
      </app-dialog-frame>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewNamedStudy {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<NewNamedStudy, true>>(MatDialogRef);

  protected readonly data = inject<NewNamedStudyData>(MAT_DIALOG_DATA);
  protected readonly fromFile = FROM_FILE;
  protected readonly starts: readonly Choice[] = [
    ...this.data.scenarios.map(({ id, name }) => ({ value: id, label: `Copy of ${name}` })),
    { value: FROM_FILE, label: 'A study file' },
  ];
  protected readonly form = new FormGroup({
    name: new FormControl('', { nonNullable: true, validators: validBy(titleSchema) }),
    start: new FormControl(this.starts[0].value, { nonNullable: true }),
  });
  protected readonly study = signal<Study | undefined>(undefined);
  protected readonly submission = submission(this.form);

  protected async save(): Promise<void> {
    await this.submission.send(async () => {
      const { name, start } = this.form.getRawValue();
      const study = start === FROM_FILE ? this.study() : await this.studyOf(start);
      if (study === undefined) {
        this.submission.say('Choose a study file that can be read.');
        return;
      }
      await this.data.save(name, study);
      this.dialog.close(true);
    });
  }

  private async studyOf(scenarioId: string): Promise<unknown> {
    const { head } = await this.api.send('GET', `/api/scenarios/${scenarioId}`, scenarioSchema);
    return head.study;
  }
}
