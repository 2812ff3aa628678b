import { type Routes } from '@angular/router';
import { Baselines } from './baselines';

export default [
  { path: '', component: Baselines },
  { path: 'new', loadComponent: () => import('./take-baseline').then((file) => file.TakeBaseline) },
] satisfies Routes;
