import type { Routes } from '@angular/router';
import { TrendPage } from './trend-page';

export default [{ path: '', component: TrendPage }] satisfies Routes;
