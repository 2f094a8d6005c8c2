import type { Routes } from '@angular/router';
import { SessionPage } from './session-page';

export default [{ path: '', component: SessionPage }] satisfies Routes;
