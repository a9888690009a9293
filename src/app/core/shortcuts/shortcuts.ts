import { DOCUMENT, DestroyRef, Injectable, inject, signal } from '@angular/core';

export interface Shortcut {
  /**
   * Keys pressed one after another, as `KeyboardEvent.key` names them: "g p"; or keys held together: "Ctrl+Shift+Z",
   * where Ctrl also stands for the command key.
   */
  readonly keys: string;
  readonly what: string;
  readonly act: () => void;
  /** It also acts while something is typed. */
  readonly whileTyping?: boolean;
}

const KEY = 'tareline-shortcuts';
/** How long a sequence may rest before it is forgotten. */
const PATIENCE_MILLISECONDS = 1200;

/**
 * Shortcuts of the keyboard. Those of single keys can be switched off. None acts while something is typed, unless it
 * says so: there, Ctrl+Z is the field's own.
 */
@Injectable({ providedIn: 'root' })
export class Shortcuts {
  private readonly known = signal<readonly Shortcut[]>([]);
  private readonly enabled = signal(localStorage.getItem(KEY) !== 'off');
  private pressed = '';
  private pressedAt = 0;

  readonly all = this.known.asReadonly();
  readonly on = this.enabled.asReadonly();

  constructor() {
    const document = inject(DOCUMENT);
    const listen = (event: KeyboardEvent): void => this.press(event);
    document.addEventListener('keydown', listen);
    inject(DestroyRef).onDestroy(() => document.removeEventListener('keydown', listen));
  }

  /** Adds shortcuts; the answer takes them away again. */
  add(shortcuts: readonly Shortcut[]): () => void {
    this.known.update((known) => [...known, ...shortcuts]);
    return () => this.known.update((known) => known.filter((shortcut) => !shortcuts.includes(shortcut)));
  }

  switch(on: boolean): void {
    this.enabled.set(on);
    localStorage.setItem(KEY, on ? 'on' : 'off');
  }

  private press(event: KeyboardEvent): void {
    if (event.ctrlKey || event.metaKey) return this.pressTogether(event);
    if (!this.enabled() || event.altKey || event.repeat) return;
    if (isTyping(event.target) || event.key.length !== 1) return;
    const patient = event.timeStamp - this.pressedAt < PATIENCE_MILLISECONDS;
    const keys = patient && this.pressed !== '' ? `${this.pressed} ${event.key}` : event.key;
    const shortcut = this.known().find((candidate) => candidate.keys === keys);
    this.pressed = shortcut === undefined ? event.key : '';
    this.pressedAt = event.timeStamp;
    if (shortcut === undefined) return;
    event.preventDefault();
    shortcut.act();
  }

  private pressTogether(event: KeyboardEvent): void {
    if (event.altKey || event.key.length !== 1) return;
    const keys = `Ctrl+${event.shiftKey ? 'Shift+' : ''}${event.key.toUpperCase()}`;
    const shortcut = this.known().find((candidate) => candidate.keys === keys);
    if (shortcut === undefined || (isTyping(event.target) && shortcut.whileTyping !== true)) return;
    event.preventDefault();
    shortcut.act();
  }
}

/** Shortcuts of a page, for as long as it is open. Must be called where `inject` may be. */
export function pageShortcuts(shortcuts: readonly Shortcut[]): void {
  inject(DestroyRef).onDestroy(inject(Shortcuts).add(shortcuts));
}

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement &&
    (target.isContentEditable ||
      target.closest('input, textarea, select, [role="menu"], [role="dialog"]') !== null)
  );
}
