import type { Signal } from '@angular/core';

/** Why something could not be shown, in the words the page uses. */
export interface Failure {
  readonly kind: 'forbidden' | 'missing' | 'unreachable' | 'refused' | 'broken';
  readonly title: string;
  readonly detail: string;
  /** What support can find in the server's log. */
  readonly requestId?: string;
}

/** The four states of something that comes from elsewhere. While loading and after a failure the old value stays. */
export type LoadState<T> =
  | { readonly kind: 'idle' }
  | { readonly kind: 'loading'; readonly old: T | undefined }
  | { readonly kind: 'failed'; readonly old: T | undefined; readonly failure: Failure }
  | { readonly kind: 'ready'; readonly value: T };

export interface Loaded<T> {
  readonly state: Signal<LoadState<T>>;
  /** The newest value there is, old or not. */
  readonly value: Signal<T | undefined>;
  reload(): void;
  /** Puts in what an act's answer already told, without asking again. */
  replace(value: T): void;
}
