import type { Routes } from '@angular/router';
import { SignInPage } from './sign-in-page';

export default [
  { path: '', component: SignInPage },
  {
    path: 'forgot',
    title: 'A new password',
    loadComponent: () => import('./forgot-page').then(({ ForgotPage }) => ForgotPage),
  },
] satisfies Routes;
