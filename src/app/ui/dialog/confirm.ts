import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import type { MatDialog } from '@angular/material/dialog';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { DialogFrame } from './dialog-frame';

export interface Question {
  readonly title: string;
  readonly text: string;
  /** What the button says that does it. */
  readonly act: string;
}

@Component({
  selector: 'app-confirm',
  imports: [DialogFrame, MatDialogModule],
  template: `
    <app-dialog-frame [title]="question.title">
      <p>{{ question.text }}</p>
      <button dialogActs type="button" class="button main" [mat-dialog-close]="true">
        {{ question.act }}
      </button>
    </app-dialog-frame>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Confirm {
  protected readonly question = inject<Question>(MAT_DIALOG_DATA);
}

/** Asks before something that cannot be taken back. */
export async function confirm(dialogs: MatDialog, question: Question): Promise<boolean> {
  const dialog = dialogs.open<Confirm, Question, boolean>(Confirm, { data: question, width: '26rem' });
  return (await firstValueFrom(dialog.afterClosed())) === true;
}
