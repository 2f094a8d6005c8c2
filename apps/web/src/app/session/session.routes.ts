import type { Routes } from '@angular/router';
import { SessionPage } from './session-page';
import { uploadsFinished } from './uploads-finished';

export default [{ path: '', component: SessionPage, canDeactivate: [uploadsFinished] }] satisfies Routes;
