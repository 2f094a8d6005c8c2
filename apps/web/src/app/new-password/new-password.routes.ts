import type { Routes } from '@angular/router';
import { NewPasswordPage } from './new-password-page';

export default [{ path: '', component: NewPasswordPage }] satisfies Routes;
