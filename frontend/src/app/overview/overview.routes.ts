import { type Routes } from '@angular/router';
import { Overview } from './overview';

export default [{ path: '', component: Overview }] satisfies Routes;
