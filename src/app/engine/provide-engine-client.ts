import { DestroyRef, inject, type Provider } from '@angular/core';
import { EngineClient } from './engine-client';
import { WorkerEngineClient } from './worker-engine-client';

/** The engine in a web worker, which ends with the injector that this is provided in. */
export function provideEngineClient(): Provider {
  return {
    provide: EngineClient,
    useFactory: (): EngineClient => {
      const client = new WorkerEngineClient(
        () => new Worker(new URL('./worker/engine-worker', import.meta.url), { type: 'module' }),
      );
      inject(DestroyRef).onDestroy(() => client.close());
      return client;
    },
  };
}
