import type { Routes } from '@angular/router';
import { ClubPage } from './club-page';

export default [{ path: '', component: ClubPage }] satisfies Routes;
