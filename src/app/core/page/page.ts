import { Injectable, effect, inject, signal, untracked } from '@angular/core';
import { Title } from '@angular/platform-browser';

/** A step of the trail in the header; the last one is the page itself and leads nowhere. */
export interface Step {
  readonly label: string;
  readonly path?: string;
}

export interface PageHead {
  readonly title: string;
  readonly trail: readonly Step[];
}

/** What the frame shows of the page that is open: title of the window and trail in the header. */
@Injectable({ providedIn: 'root' })
export class Page {
  private readonly title = inject(Title);
  private readonly steps = signal<readonly Step[]>([]);

  readonly trail = this.steps.asReadonly();

  open(head: PageHead): void {
    this.title.setTitle(head.title === '' ? 'Tareline' : `${head.title} · Tareline`);
    // A step whose name is still on its way is left out.
    this.steps.set(head.trail.filter(({ label }) => label !== ''));
  }
}

/** Keeps title and trail true while a page's data come in. Must be called where `inject` may be. */
export function pageHead(head: () => PageHead): void {
  const page = inject(Page);
  effect(() => {
    const now = head();
    untracked(() => page.open(now));
  });
}
