import { DOCUMENT, Injectable, effect, inject, signal } from '@angular/core';

export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

const KEY = 'tareline-theme';

/** Light, dark, or what the system prefers; kept in this browser. */
@Injectable({ providedIn: 'root' })
export class ThemeChoice {
  private readonly document = inject(DOCUMENT);
  private readonly chosen = signal<Theme>(stored());

  readonly theme = this.chosen.asReadonly();

  constructor() {
    effect(() => {
      const theme = this.chosen();
      const root = this.document.documentElement;
      if (theme === 'system') delete root.dataset['theme'];
      else root.dataset['theme'] = theme;
    });
  }

  choose(theme: Theme): void {
    this.chosen.set(theme);
    try {
      localStorage.setItem(KEY, theme);
    } catch {
      // A browser that keeps nothing still shows the theme until the page is closed.
    }
  }
}

function stored(): Theme {
  try {
    const kept = localStorage.getItem(KEY);
    return THEMES.find((theme) => theme === kept) ?? 'system';
  } catch {
    return 'system';
  }
}
