import { type Routes } from '@angular/router';
import { Studies } from './studies';

export default [{ path: '', component: Studies }] satisfies Routes;
