import { Injectable, inject } from '@angular/core';
import { MatSnackBar } from '@angular/material/snack-bar';
import { refusalText } from './api';

/** Short news at the foot of the page, read out by screen readers. */
@Injectable({ providedIn: 'root' })
export class Notices {
  private readonly bar = inject(MatSnackBar);

  say(text: string): void {
    this.bar.open(text, 'Close', { duration: 6000, politeness: 'polite' });
  }

  /** Does something and says so, or says why not. The answer tells which. */
  async during(act: () => Promise<void>, done?: string): Promise<boolean> {
    try {
      await act();
      if (done !== undefined) this.say(done);
      return true;
    } catch (error) {
      this.bar.open(refusalText(error), 'Close', { politeness: 'assertive' });
      return false;
    }
  }
}
