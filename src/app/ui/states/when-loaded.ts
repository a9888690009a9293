import {
  Directive,
  TemplateRef,
  ViewContainerRef,
  effect,
  inject,
  input,
  inputBinding,
  outputBinding,
  signal,
  untracked,
  type EmbeddedViewRef,
} from '@angular/core';
import { Failed } from './failed';
import type { Failure, Loaded } from './load-state';
import { Waiting } from './waiting';

export interface WhenLoadedContext<T> {
  $implicit: T;
  /** The value is old: a newer one is on its way. */
  renewing: boolean;
}

/**
 * Shows its content for a loaded value, and the designed states before and instead of it:
 * `*appWhenLoaded="products; let products; let renewing = renewing"`.
 */
@Directive({ selector: '[appWhenLoaded]' })
export class WhenLoaded<T> {
  readonly appWhenLoaded = input.required<Loaded<T>>();
  /** It is the page itself: where it fails, the failure is the page's heading. */
  readonly appWhenLoadedIsPage = input(false);

  private readonly template = inject<TemplateRef<WhenLoadedContext<T>>>(TemplateRef);
  private readonly container = inject(ViewContainerRef);
  private readonly failure = signal<Failure | undefined>(undefined);
  private content: EmbeddedViewRef<WhenLoadedContext<T>> | undefined;
  private instead: 'waiting' | 'failed' | undefined;

  constructor() {
    effect(() => {
      const state = this.appWhenLoaded().state();
      untracked(() => {
        switch (state.kind) {
          case 'ready':
            return this.showContent(state.value, false);
          case 'loading':
            return state.old === undefined ? this.showWaiting() : this.showContent(state.old, true);
          case 'failed':
            return this.showFailed(state.failure);
          case 'idle':
            return this.showWaiting();
        }
      });
    });
  }

  static ngTemplateContextGuard<T>(
    _directive: WhenLoaded<T>,
    context: unknown,
  ): context is WhenLoadedContext<T> {
    return context !== undefined;
  }

  private showContent(value: T, renewing: boolean): void {
    if (this.content === undefined) {
      this.clear();
      this.content = this.container.createEmbeddedView(this.template, { $implicit: value, renewing });
    } else {
      this.content.context.$implicit = value;
      this.content.context.renewing = renewing;
      this.content.markForCheck();
    }
  }

  private showWaiting(): void {
    if (this.instead === 'waiting') return;
    this.clear();
    this.container.createComponent(Waiting);
    this.instead = 'waiting';
  }

  private showFailed(failure: Failure): void {
    this.failure.set(failure);
    if (this.instead === 'failed') return;
    this.clear();
    this.container.createComponent(Failed, {
      bindings: [
        inputBinding('failure', () => this.failure() ?? failure),
        inputBinding('page', this.appWhenLoadedIsPage),
        outputBinding('again', () => this.appWhenLoaded().reload()),
      ],
    });
    this.instead = 'failed';
  }

  private clear(): void {
    this.container.clear();
    this.content = undefined;
    this.instead = undefined;
  }
}
