import type { Routes } from '@angular/router';
import { administrator, anybody, signedIn, signedOut } from './core/session';

const forbidden = () => import('./shell/forbidden').then((page) => page.Forbidden);

export const routes: Routes = [
  {
    path: 'sign-in',
    canActivate: [signedOut],
    loadComponent: () => import('./features/account/sign-in').then((page) => page.SignInPage),
  },
  {
    path: 'invitation/:token',
    loadComponent: () => import('./features/account/accept-invitation').then((page) => page.AcceptInvitation),
  },
  {
    path: '',
    canActivate: [signedIn],
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'products' },
      {
        path: 'products',
        loadComponent: () => import('./features/products/product-list').then((page) => page.ProductList),
      },
      {
        path: 'products/:productId',
        loadComponent: () => import('./features/products/product-page').then((page) => page.ProductPage),
      },
      {
        path: 'variants/:variantId',
        loadComponent: () => import('./features/products/variant-page').then((page) => page.VariantPage),
      },
      {
        path: 'scenarios/:scenarioId',
        loadChildren: () => import('./features/scenario/scenario.routes').then((part) => part.scenarioRoutes),
      },
      {
        path: 'account',
        loadComponent: () => import('./features/account/account-page').then((page) => page.AccountPage),
      },
      {
        path: 'people',
        canMatch: [administrator],
        loadComponent: () => import('./features/people/people-frame').then((page) => page.PeopleFrame),
        children: [
          {
            path: '',
            pathMatch: 'full',
            loadComponent: () => import('./features/people/people-list').then((page) => page.PeopleList),
          },
          {
            path: 'audit',
            loadComponent: () => import('./features/people/audit-log').then((page) => page.AuditLog),
          },
          {
            path: 'mail',
            loadComponent: () =>
              import('./features/people/outgoing-mail').then((page) => page.OutgoingMailPage),
          },
        ],
      },
      { path: 'people', loadComponent: forbidden },
      { path: 'people/:part', loadComponent: forbidden },
    ],
  },
  {
    path: '**',
    canActivate: [anybody],
    loadComponent: () => import('./shell/not-found').then((page) => page.NotFound),
  },
];
