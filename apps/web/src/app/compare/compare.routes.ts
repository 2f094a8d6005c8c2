import type { Routes } from '@angular/router';
import { ComparePage } from './compare-page';

export default [{ path: '', component: ComparePage }] satisfies Routes;
