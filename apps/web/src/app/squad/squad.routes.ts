import type { Routes } from '@angular/router';
import { SquadPage } from './squad-page';

export default [{ path: '', component: SquadPage }] satisfies Routes;
