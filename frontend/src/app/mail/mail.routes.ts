import { type Routes } from '@angular/router';
import { Mail } from './mail';

export default [{ path: '', component: Mail }] satisfies Routes;
