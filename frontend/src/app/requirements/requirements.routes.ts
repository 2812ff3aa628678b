import { type Routes } from '@angular/router';

export default [
  { path: '', loadComponent: () => import('./flow-down/flow-down').then((file) => file.FlowDown) },
  { path: 'new', loadComponent: () => import('./form/new-requirement').then((file) => file.NewRequirement) },
  { path: ':key', loadComponent: () => import('./sheet/requirement-page').then((file) => file.RequirementPage) },
  {
    path: ':key/edit',
    loadComponent: () => import('./form/edit-requirement').then((file) => file.EditRequirement),
  },
] satisfies Routes;
