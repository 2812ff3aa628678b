import { type Routes } from '@angular/router';

export default [
  { path: '', loadComponent: () => import('./product-tree').then((file) => file.ProductTree) },
] satisfies Routes;
