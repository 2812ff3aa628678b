import { type Routes } from '@angular/router';
import { Records } from './records';

export default [{ path: '', component: Records }] satisfies Routes;
