import { DOCUMENT, DestroyRef, Injectable, inject, signal } from '@angular/core';

export interface Shortcut {
  /** Keys pressed one after another, as `KeyboardEvent.key` names them: "g p". */
  readonly keys: string;
  readonly what: string;
  readonly act: () => void;
}

const KEY = 'tareline-shortcuts';
/** How long a sequence may rest before it is forgotten. */
const PATIENCE_MILLISECONDS = 1200;

/** Shortcuts of single keys. They can be switched off, and never act while something is typed. */
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
    if (!this.enabled() || event.ctrlKey || event.metaKey || event.altKey || event.repeat) return;
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
