import type { Routes } from '@angular/router';
import { provideEngineClient } from '../../engine';
import { formsProviders } from '../../forms/forms-providers';
import { MapPanel } from './map/map-panel';
import { RecordPanel } from './record/record-panel';
import { ScenarioPage } from './scenario-page';

/** The working page of a scenario: one parent that holds its store, and the views beside the answers. */
export const scenarioRoutes: Routes = [
  {
    path: '',
    component: ScenarioPage,
    providers: [provideEngineClient(), ...formsProviders],
    children: [
      { path: '', pathMatch: 'full', component: MapPanel },
      { path: 'record', component: RecordPanel },
    ],
  },
];
