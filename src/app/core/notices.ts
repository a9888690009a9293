import { Injectable, signal } from '@angular/core';
import { refusalText } from './api';

export interface Notice {
  readonly text: string;
  /** An act did not happen: read out at once, and it stays until it is closed. */
  readonly refused: boolean;
}

const SHOWN_MILLISECONDS = 6000;

/** Short news at the foot of the page, read out by screen readers. */
@Injectable({ providedIn: 'root' })
export class Notices {
  private readonly shown = signal<Notice | undefined>(undefined);
  private ending: ReturnType<typeof setTimeout> | undefined;

  readonly notice = this.shown.asReadonly();

  say(text: string): void {
    this.show({ text, refused: false });
    this.ending = setTimeout(() => this.close(), SHOWN_MILLISECONDS);
  }

  close(): void {
    clearTimeout(this.ending);
    this.shown.set(undefined);
  }

  /** Does something and says so, or says why not. The answer tells which. */
  async during(act: () => Promise<void>, done?: string): Promise<boolean> {
    try {
      await act();
      if (done !== undefined) this.say(done);
      return true;
    } catch (error) {
      this.show({ text: refusalText(error), refused: true });
      return false;
    }
  }

  private show(notice: Notice): void {
    clearTimeout(this.ending);
    this.shown.set(notice);
  }
}
