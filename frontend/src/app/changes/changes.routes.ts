import { type Routes } from '@angular/router';
import { ChangePage } from './change-page';
import { Changes } from './changes';

export default [
  { path: '', component: Changes },
  { path: ':key', component: ChangePage },
] satisfies Routes;
