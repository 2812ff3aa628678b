import { type Routes } from '@angular/router';
import { People } from './people';

export default [{ path: '', component: People }] satisfies Routes;
