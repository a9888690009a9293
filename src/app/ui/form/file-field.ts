import { ChangeDetectionStrategy, Component, input, output, signal } from '@angular/core';
import { nextPictureId } from '../figures/picture-id';

/** Picks one file and hands on its text. */
@Component({
  selector: 'app-file-field',
  template: `
    <label [for]="id">{{ label() }}</label>
    <input type="file" [id]="id" [accept]="accept()" (change)="read($event)" />
    @if (unreadable()) {
      <p role="alert">This file could not be read. Choose it again.</p>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 0.375rem;
      padding: 0.5rem 0;
    }
    label {
      color: var(--ink-second);
    }
    input {
      max-width: 100%;
    }
    input::file-selector-button {
      min-height: 32px;
      margin-right: 0.75rem;
      padding: 0 0.75rem;
      border: 1px solid var(--edge);
      border-radius: var(--radius);
      background: transparent;
      color: var(--ink);
      font: inherit;
      font-weight: 600;
      cursor: pointer;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FileField {
  readonly label = input.required<string>();
  readonly accept = input('');
  readonly picked = output<{ name: string; text: string }>();

  protected readonly id = nextPictureId();
  protected readonly unreadable = signal(false);

  protected async read(event: Event): Promise<void> {
    const file = event.target instanceof HTMLInputElement ? event.target.files?.item(0) : undefined;
    if (file === null || file === undefined) return;
    try {
      this.unreadable.set(false);
      this.picked.emit({ name: file.name, text: await file.text() });
    } catch {
      this.unreadable.set(true);
    }
  }
}
