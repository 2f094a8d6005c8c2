import type { Routes } from '@angular/router';
import { NotForYouPage } from './core/errors/not-for-you-page';
import { NotFoundPage } from './core/errors/not-found-page';
import { NothingYetPage } from './core/errors/nothing-yet-page';
import { onlyFor, signedIn, toHome } from './core/sign-in/guards';

/** Every page area is loaded when it is first opened; each area's own file says what pages it has. */
export const routes: Routes = [
  { path: '', pathMatch: 'full', redirectTo: toHome },
  { path: 'sign-in', title: 'Sign in', loadChildren: () => import('./sign-in/sign-in.routes') },
  {
    path: 'invitation/:token',
    title: 'Your invitation',
    loadChildren: () => import('./invitation/invitation.routes'),
  },
  {
    path: 'new-password/:token',
    title: 'Your new password',
    loadChildren: () => import('./new-password/new-password.routes'),
  },
  { path: 'mail', title: 'Mail', canActivate: [signedIn], loadChildren: () => import('./mail/mail.routes') },
  {
    path: 'squad',
    title: 'Squad',
    canActivate: [onlyFor('coach', 'admin')],
    loadChildren: () => import('./squad/squad.routes'),
  },
  {
    path: 'athletes/:athleteId/trend',
    title: 'Trend',
    canActivate: [signedIn],
    loadChildren: () => import('./trend/trend.routes'),
  },
  {
    path: 'athletes/:athleteId',
    title: 'Athlete',
    canActivate: [signedIn],
    loadChildren: () => import('./athlete/athlete.routes'),
  },
  {
    path: 'sessions/:sessionId/compare',
    title: 'Compare',
    canActivate: [signedIn],
    loadChildren: () => import('./compare/compare.routes'),
  },
  {
    path: 'sessions/:sessionId',
    title: 'Session',
    canActivate: [signedIn],
    loadChildren: () => import('./session/session.routes'),
  },
  {
    path: 'clips/:clipId/mark-again',
    title: 'Mark again',
    canActivate: [onlyFor('coach', 'admin')],
    loadComponent: () => import('./mark-again/start-page').then(({ StartPage }) => StartPage),
  },
  {
    path: 'marking-rounds/:roundId',
    title: 'Mark again',
    canActivate: [onlyFor('coach', 'admin')],
    data: { fullPage: true },
    loadComponent: () => import('./mark-again/round-page').then(({ RoundPage }) => RoundPage),
  },
  {
    path: 'marking',
    title: 'Your marking',
    canActivate: [onlyFor('coach', 'admin')],
    loadComponent: () => import('./mark-again/marking-page').then(({ MarkingPage }) => MarkingPage),
  },
  {
    path: 'clips/:clipId',
    title: 'Desk',
    canActivate: [signedIn],
    data: { fullPage: true },
    loadChildren: () => import('./desk/desk.routes'),
  },
  {
    path: 'reviews',
    title: 'Review',
    canActivate: [signedIn],
    loadChildren: () => import('./review/review.routes'),
  },
  {
    path: 'club',
    title: 'Club',
    canActivate: [onlyFor('admin')],
    loadChildren: () => import('./club/club.routes'),
  },
  {
    path: 'method',
    title: 'Method',
    canActivate: [signedIn],
    loadChildren: () => import('./method/method.routes'),
  },
  {
    path: 'data-dictionary',
    title: 'Data dictionary',
    canActivate: [signedIn],
    loadChildren: () => import('./take-along/data-dictionary.routes'),
  },
  { path: 'nothing-yet', title: 'Nothing yet', canActivate: [signedIn], component: NothingYetPage },
  { path: 'not-for-you', title: 'Not for you', component: NotForYouPage },
  { path: '**', title: 'No such page', component: NotFoundPage },
];
