import type { Routes } from '@angular/router';
import { AthletePage } from './athlete-page';

export default [{ path: '', component: AthletePage }] satisfies Routes;
