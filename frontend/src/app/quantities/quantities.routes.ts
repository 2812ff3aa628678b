import { type Routes } from '@angular/router';

export default [
  { path: '', loadComponent: () => import('./quantities').then((file) => file.Quantities) },
  { path: 'new', loadComponent: () => import('./sheet/quantity-page').then((file) => file.QuantityPage) },
  { path: ':key', loadComponent: () => import('./sheet/quantity-page').then((file) => file.QuantityPage) },
] satisfies Routes;
