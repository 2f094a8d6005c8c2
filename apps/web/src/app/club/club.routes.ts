import type { Routes } from '@angular/router';
import { ClubPage } from './club-page';
import { PeoplePage } from './people-page';
import { SquadsPage } from './squads-page';

export default [
  {
    path: '',
    component: ClubPage,
    children: [
      { path: '', pathMatch: 'full', redirectTo: 'people' },
      { path: 'people', title: 'People', component: PeoplePage },
      {
        path: 'outbox',
        title: 'Outbox',
        loadComponent: () => import('./outbox-page').then(({ OutboxPage }) => OutboxPage),
      },
      { path: 'squads', title: 'Squads', component: SquadsPage },
    ],
  },
] satisfies Routes;
