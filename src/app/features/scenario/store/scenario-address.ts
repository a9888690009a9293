import { InjectionToken, inject, type Signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute } from '@angular/router';
import { map } from 'rxjs';

/** What the address says about which scenario is open, and which of its revisions. */
export interface ScenarioAddress {
  readonly scenarioId: Signal<string>;
  /** Null for the newest, with the draft on it. */
  readonly revision: Signal<string | null>;
}

export const SCENARIO_ADDRESS = new InjectionToken<ScenarioAddress>('the scenario of the address');

/** The address of the route that provides this. */
export function scenarioAddress(): ScenarioAddress {
  const route = inject(ActivatedRoute);
  return {
    scenarioId: toSignal(route.paramMap.pipe(map((params) => params.get('scenarioId') ?? '')), {
      requireSync: true,
    }),
    revision: toSignal(route.queryParamMap.pipe(map((query) => query.get('revision'))), {
      requireSync: true,
    }),
  };
}
