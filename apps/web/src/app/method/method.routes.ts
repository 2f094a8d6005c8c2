import type { Routes } from '@angular/router';
import { MethodPage } from './method-page';

export default [{ path: '', component: MethodPage }] satisfies Routes;
