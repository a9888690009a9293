import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import type { Study } from '../../../../../shared/contracts';
import {
  saveScenarioSchema,
  scenarioRevisionSchema,
  type ScenarioRevision,
} from '../../../../../shared/contracts/api';
import { Api } from '../../../core/api';
import { submission, validBy } from '../../../core/form';
import { StudyChoice } from '../../../forms/study-choice';
import { DialogFrame } from '../../../ui/dialog';
import { TextField } from '../../../ui/form';
import { newerRevision, SavedMeanwhile } from './saved-meanwhile';

export interface ImportStudyData {
  readonly scenarioId: string;
  readonly base: ScenarioRevision;
}

/** Saves a study file as the next revision. Where somebody saved meanwhile, shows what they changed first. */
@Component({
  selector: 'app-import-study',
  imports: [DialogFrame, ReactiveFormsModule, SavedMeanwhile, StudyChoice, TextField],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="save()" novalidate>
      <app-dialog-frame title="Import a study">
        @if (submission.fault(); as fault) {
          <p class="form-fault" role="alert">{{ fault }}</p>
        }
        <app-study-choice [(study)]="study" />
        <app-text-field label="Note" hint="What changed, and why" [control]="form.controls.note" />
        @if (newer(); as newer) {
          <app-saved-meanwhile [newer]="newer" [started]="started" [own]="study()" />
        }
        <button dialogActs type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
          Save as revision {{ base().number + 1 }}
        </button>
      </app-dialog-frame>
    </form>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ImportStudy {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<ImportStudy, ScenarioRevision>>(MatDialogRef);
  private readonly data = inject<ImportStudyData>(MAT_DIALOG_DATA);

  /** What both sides began from. */
  protected readonly started = this.data.base.study;
  protected readonly study = signal<Study | undefined>(undefined);
  protected readonly newer = signal<ScenarioRevision | undefined>(undefined);
  protected readonly base = computed(() => this.newer() ?? this.data.base);
  protected readonly form = new FormGroup({
    note: new FormControl('', { nonNullable: true, validators: validBy(saveScenarioSchema.shape.note) }),
  });
  protected readonly submission = submission(this.form);

  protected async save(): Promise<void> {
    await this.submission.send(async () => {
      const study = this.study();
      if (study === undefined) {
        this.submission.say('Choose a study file that can be read.');
        return;
      }
      const body = { baseRevision: this.base().number, study, note: this.form.getRawValue().note };
      try {
        const path = `/api/scenarios/${this.data.scenarioId}/revisions`;
        this.dialog.close(await this.api.send('POST', path, scenarioRevisionSchema, body));
      } catch (error) {
        const newer = newerRevision(error);
        if (newer === undefined) throw error;
        this.newer.set(newer);
      }
    });
  }
}
