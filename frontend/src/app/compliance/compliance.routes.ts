import { type Routes } from '@angular/router';
import { Compliance } from './compliance';

export default [{ path: '', component: Compliance }] satisfies Routes;
