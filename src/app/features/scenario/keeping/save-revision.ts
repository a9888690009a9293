import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import {
  saveScenarioSchema,
  scenarioRevisionSchema,
  type ScenarioRevision,
} from '../../../../../shared/contracts/api';
import { Api } from '../../../core/api';
import { submission, validBy } from '../../../core/form';
import { DialogFrame } from '../../../ui/dialog';
import { TextField } from '../../../ui/form';
import { ChangeList } from './change-list';
import { newerRevision, SavedMeanwhile } from './saved-meanwhile';

export interface SaveRevisionData {
  /** Of the scenario, on the server. */
  readonly path: string;
  /** What the draft began from. */
  readonly base: { readonly number: number; readonly study: unknown };
  readonly study: unknown;
}

/** Saves the draft as the next revision, with a note on what changed. */
@Component({
  selector: 'app-save-revision',
  imports: [ChangeList, DialogFrame, ReactiveFormsModule, SavedMeanwhile, TextField],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="save()" novalidate>
      <app-dialog-frame title="Save and run">
        @if (submission.fault(); as fault) {
          <p class="form-fault" role="alert">{{ fault }}</p>
        }
        <app-text-field label="Note" hint="What changed, and why" [control]="form.controls.note" />
        @if (newer(); as newer) {
          <app-saved-meanwhile [newer]="newer" [started]="data.base.study" [own]="data.study" />
        } @else {
          <p class="second changes">Changes since revision {{ data.base.number }}:</p>
          <app-change-list [before]="data.base.study" [after]="data.study" />
        }
        <button dialogActs type="submit" class="button main" [attr.aria-disabled]="submission.sending()">
          Save as revision {{ base() + 1 }}
        </button>
      </app-dialog-frame>
    </form>
  `,
  styles: `
    .changes {
      margin-top: 0.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SaveRevision {
  private readonly api = inject(Api);
  private readonly dialog = inject<MatDialogRef<SaveRevision, ScenarioRevision>>(MatDialogRef);

  protected readonly data = inject<SaveRevisionData>(MAT_DIALOG_DATA);
  protected readonly newer = signal<ScenarioRevision | undefined>(undefined);
  protected readonly base = computed(() => this.newer()?.number ?? this.data.base.number);
  protected readonly form = new FormGroup({
    note: new FormControl('', { nonNullable: true, validators: validBy(saveScenarioSchema.shape.note) }),
  });
  protected readonly submission = submission(this.form);

  protected async save(): Promise<void> {
    await this.submission.send(async () => {
      const body = {
        baseRevision: this.base(),
        study: this.data.study,
        note: this.form.getRawValue().note,
      };
      try {
        const path = `${this.data.path}/revisions`;
        this.dialog.close(await this.api.send('POST', path, scenarioRevisionSchema, body));
      } catch (error) {
        const newer = newerRevision(error);
        if (newer === undefined) throw error;
        this.newer.set(newer);
      }
    });
  }
}
