import type { Routes } from '@angular/router';
import { onlyFor } from '../core/sign-in/guards';

export default [
  {
    path: 'use',
    title: 'Use a frame',
    canActivate: [onlyFor('coach', 'admin')],
    loadComponent: () => import('./stills/use-frame-page').then((file) => file.UseFramePage),
  },
  {
    path: ':reviewId/write',
    title: 'Write a review',
    canActivate: [onlyFor('coach', 'admin')],
    loadComponent: () => import('./writing/writing-page').then((file) => file.WritingPage),
  },
  {
    path: ':reviewId/still',
    title: 'Make a picture',
    canActivate: [onlyFor('coach', 'admin')],
    loadComponent: () => import('./stills/still-page').then((file) => file.StillPage),
  },
  {
    path: ':reviewId',
    title: 'Review',
    loadComponent: () => import('./reading/reading-page').then((file) => file.ReadingPage),
  },
] satisfies Routes;
