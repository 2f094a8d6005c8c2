import type { Routes } from '@angular/router';
import { InvitationPage } from './invitation-page';

export default [{ path: '', component: InvitationPage }] satisfies Routes;
