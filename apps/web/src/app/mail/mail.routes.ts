import type { Routes } from '@angular/router';
import { MailPage } from './mail-page';

export default [{ path: '', component: MailPage }] satisfies Routes;
