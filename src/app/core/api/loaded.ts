import { httpResource } from '@angular/common/http';
import { computed, linkedSignal } from '@angular/core';
import type { Failure, Loaded, LoadState } from '../../ui/states';
import { failureOf } from './failure';
import type { Schema } from './schema';

interface Snapshot<T> {
  readonly path: string | undefined;
  readonly status: string;
  readonly value: T | undefined;
  readonly failure: Failure | undefined;
}

/**
 * What the server has under a path, as the four states that pages are designed for. The path is read as a signal:
 * another path loads anew, without the old value; the same path again keeps it. Must be called where `inject` may be.
 *
 * @param what names the thing in sentences: "this product"
 */
export function loaded<T>(path: () => string | undefined, schema: Schema<T>, what: string): Loaded<T> {
  const resource = httpResource<T>(() => path(), { parse: (body) => schema.parse(body) });

  const state = linkedSignal<Snapshot<T>, LoadState<T>>({
    source: () => {
      const error = resource.error();
      return {
        path: path(),
        status: resource.status(),
        value: resource.hasValue() ? resource.value() : undefined,
        failure: error === undefined ? undefined : failureOf(causeOf(error), what),
      };
    },
    computation: (now, previous) => {
      const old = previous?.source.path === now.path ? newest(previous?.value) : undefined;
      if (now.path === undefined) return { kind: 'idle' };
      if (now.failure !== undefined) return { kind: 'failed', old, failure: now.failure };
      if (now.value === undefined) return { kind: 'loading', old };
      return now.status === 'reloading'
        ? { kind: 'loading', old: now.value }
        : { kind: 'ready', value: now.value };
    },
  });

  return {
    state: state.asReadonly(),
    value: computed(() => newest(state())),
    reload: () => void resource.reload(),
    replace: (value) => resource.set(value),
  };
}

function newest<T>(state: LoadState<T> | undefined): T | undefined {
  switch (state?.kind) {
    case 'ready':
      return state.value;
    case 'loading':
    case 'failed':
      return state.old;
    case 'idle':
    case undefined:
      return undefined;
  }
}

/** The resource wraps what is not an Error; what was thrown is what can be explained. */
function causeOf(error: Error): unknown {
  return error.cause ?? error;
}
