import type { Routes } from '@angular/router';
import { SignInPage } from './sign-in-page';

export default [{ path: '', component: SignInPage }] satisfies Routes;
