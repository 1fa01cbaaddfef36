import type { Routes } from '@angular/router';
import { titles } from './paths';
import { administratorsOnly, demonstrationOnly, signedInOnly, strangersOnly } from './session/session-guards';

/** Each feature is a chunk of its own; revision and channel keep their routes in their folders. */
export const routes: Routes = [
  { path: '', pathMatch: 'full', redirectTo: 'boards' },
  {
    path: 'sign-in',
    title: titles.signIn,
    canActivate: [strangersOnly],
    loadComponent: () => import('./session/sign-in').then((file) => file.SignIn),
  },
  {
    path: 'forgot',
    title: titles.forgot,
    loadComponent: () => import('./session/forgot').then((file) => file.Forgot),
  },
  {
    path: 'reset/:token',
    title: titles.reset,
    loadComponent: () => import('./session/reset').then((file) => file.Reset),
  },
  {
    path: 'first/:token',
    title: titles.firstAdministrator,
    loadComponent: () => import('./session/first-administrator').then((file) => file.FirstAdministrator),
  },
  {
    path: 'boards',
    canActivate: [signedInOnly],
    loadChildren: () => import('./boards/boards.routes').then((file) => file.boardsRoutes),
  },
  {
    path: 'revisions/:revisionId/stackup',
    title: titles.stackup,
    canActivate: [signedInOnly],
    loadChildren: () => import('./stackup/stackup.routes').then((file) => file.stackupRoutes),
  },
  {
    path: 'revisions/:revisionId',
    title: titles.revision,
    canActivate: [signedInOnly],
    loadChildren: () => import('./revision/revision.routes').then((file) => file.revisionRoutes),
  },
  {
    path: 'channels/:channelId',
    title: titles.channel,
    canActivate: [signedInOnly],
    loadChildren: () => import('./channel/channel.routes').then((file) => file.channelRoutes),
  },
  {
    path: 'people',
    title: titles.people,
    canActivate: [signedInOnly, administratorsOnly],
    loadChildren: () => import('./people/people.routes').then((file) => file.peopleRoutes),
  },
  {
    path: 'account',
    title: titles.account,
    canActivate: [signedInOnly],
    loadComponent: () => import('./account/account').then((file) => file.Account),
  },
  {
    path: 'mail',
    title: titles.mail,
    canActivate: [demonstrationOnly],
    loadComponent: () => import('./mail/mail').then((file) => file.Mail),
  },
  {
    path: '**',
    title: titles.notFound,
    loadComponent: () => import('./states/not-found').then((file) => file.NotFound),
  },
];
