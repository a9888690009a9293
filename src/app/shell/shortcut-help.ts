import type { ElementRef } from '@angular/core';
import { ChangeDetectionStrategy, Component, inject, viewChild } from '@angular/core';
import { Shortcuts } from '../core/shortcuts';

/** Every shortcut of the open page, and the switch that turns them off. */
@Component({
  selector: 'app-shortcut-help',
  template: `
    <dialog #dialog aria-labelledby="shortcut-help-title">
      <h2 id="shortcut-help-title">Keyboard shortcuts</h2>
      <dl>
        @for (shortcut of shortcuts.all(); track shortcut.keys) {
          <dt>
            @for (key of shortcut.keys.split(' '); track $index) {
              <kbd>{{ key }}</kbd>
            }
          </dt>
          <dd>{{ shortcut.what }}</dd>
        }
      </dl>
      <label class="tick">
        <input type="checkbox" [checked]="shortcuts.on()" (change)="toggle()" />
        Use shortcuts of single keys
      </label>
      <form method="dialog"><button type="submit" class="button">Close</button></form>
    </dialog>
  `,
  styles: `
    dialog {
      width: 24rem;
      max-width: calc(100vw - 2rem);
      padding: 1.125rem 1.25rem;
      border: 1px solid var(--edge);
      border-radius: var(--radius);
      background: var(--raised);
      color: var(--ink);
    }
    dialog::backdrop {
      background: rgb(0 0 0 / 40%);
    }
    dl {
      display: grid;
      grid-template-columns: auto 1fr;
      gap: 0.5rem 1.25rem;
      margin: 0.875rem 0;
    }
    dt {
      display: flex;
      gap: 0.25rem;
    }
    kbd {
      min-width: 1.5rem;
      padding: 0 0.375rem;
      border: 1px solid var(--edge);
      border-radius: var(--radius);
      font: inherit;
      font-weight: 600;
      text-align: center;
    }
    form {
      margin-top: 0.875rem;
      text-align: right;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShortcutHelp {
  protected readonly shortcuts = inject(Shortcuts);
  private readonly dialog = viewChild.required<ElementRef<HTMLDialogElement>>('dialog');

  open(): void {
    const dialog = this.dialog().nativeElement;
    if (!dialog.open) dialog.showModal();
  }

  protected toggle(): void {
    this.shortcuts.switch(!this.shortcuts.on());
  }
}
