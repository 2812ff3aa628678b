import { type Routes } from '@angular/router';
import { administrator, signedIn } from './core/session/guards';

export const routes: Routes = [
  { path: '', pathMatch: 'full', canActivate: [signedIn], loadChildren: () => import('./studies/studies.routes') },
  { path: 'sign-in', loadComponent: () => import('./people/sign-in').then((file) => file.SignIn) },
  {
    path: 'invitation',
    loadComponent: () => import('./people/accept-invitation').then((file) => file.AcceptInvitation),
  },
  {
    path: 'first-administrator',
    data: { asksWho: true },
    loadComponent: () => import('./people/accept-invitation').then((file) => file.AcceptInvitation),
  },
  { path: 'password-reset', loadComponent: () => import('./people/password-reset').then((file) => file.PasswordReset) },
  { path: 'people', canActivate: [signedIn, administrator], loadChildren: () => import('./people/people.routes') },
  { path: 'mail', canActivate: [signedIn], loadChildren: () => import('./mail/mail.routes') },
  {
    path: 'studies/:study',
    canActivate: [signedIn],
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'overview' },
      { path: 'overview', loadChildren: () => import('./overview/overview.routes') },
      { path: 'requirements', loadChildren: () => import('./requirements/requirements.routes') },
      { path: 'product-tree', loadChildren: () => import('./product-tree/product-tree.routes') },
      { path: 'quantities', loadChildren: () => import('./quantities/quantities.routes') },
      { path: 'analyses', loadChildren: () => import('./analyses/analyses.routes') },
      { path: 'compliance', loadChildren: () => import('./compliance/compliance.routes') },
      { path: 'changes', loadChildren: () => import('./changes/changes.routes') },
      { path: 'baselines', loadChildren: () => import('./baselines/baselines.routes') },
      { path: 'records', loadChildren: () => import('./records/records.routes') },
    ],
  },
  { path: '**', loadComponent: () => import('./core/shell/not-found').then((file) => file.NotFound) },
];
