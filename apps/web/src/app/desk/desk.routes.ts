import type { Routes } from '@angular/router';
import { DeskPage } from './desk-page';

export default [{ path: '', component: DeskPage }] satisfies Routes;
