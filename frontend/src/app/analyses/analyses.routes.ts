import { type Routes } from '@angular/router';

export default [
  { path: '', loadComponent: () => import('./list/analyses').then((file) => file.Analyses) },
  { path: 'methods', loadComponent: () => import('./methods/method-picker').then((file) => file.MethodPicker) },
  { path: 'new', loadComponent: () => import('./sheet/analysis-page').then((file) => file.AnalysisPage) },
  { path: ':key', loadComponent: () => import('./sheet/analysis-page').then((file) => file.AnalysisPage) },
] satisfies Routes;
