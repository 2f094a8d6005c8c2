import type { Routes } from '@angular/router';

/** Every page area is loaded when it is first opened; each area's own file says what pages it has. */
export const routes: Routes = [
  { path: 'squad', loadChildren: () => import('./squad/squad.routes') },
  { path: 'athletes/:athleteId/trend', loadChildren: () => import('./trend/trend.routes') },
  { path: 'athletes/:athleteId', loadChildren: () => import('./athlete/athlete.routes') },
  { path: 'sessions/:sessionId/compare', loadChildren: () => import('./compare/compare.routes') },
  { path: 'sessions/:sessionId', loadChildren: () => import('./session/session.routes') },
  { path: 'clips/:clipId', loadChildren: () => import('./desk/desk.routes') },
  { path: 'club', loadChildren: () => import('./club/club.routes') },
];
