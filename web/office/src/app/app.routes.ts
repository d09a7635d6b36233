import { type LoadChildren, type Route, type Routes } from '@angular/router';
import { mayOpen, signedIn, toFirstPage } from './session/session-guards';
import { Shell } from './shell/shell';

/** One subject of the office: its folder's routes, loaded when first opened, for the roles named in shell/navigation.ts. */
export function subject(path: string, loadChildren: LoadChildren): Route {
  return { path, canMatch: [mayOpen], loadChildren };
}

/** The office's subjects, for example `subject('jobs', () => import('./jobs/jobs.routes').then((file) => file.routes))`. */
const subjects: Routes = [
  subject('today', () => import('./today/today.routes').then((file) => file.routes)),
  subject('jobs', () => import('./jobs/jobs.routes').then((file) => file.routes)),
  subject('sheets', () => import('./sheets/sheets.routes').then((file) => file.routes)),
  subject('products', () => import('./products/products.routes').then((file) => file.routes)),
  subject('people', () => import('./people/people.routes').then((file) => file.routes)),
  subject('equipment', () => import('./equipment/equipment.routes').then((file) => file.routes)),
  subject('tablets', () => import('./tablets/tablets.routes').then((file) => file.routes)),
  subject('rules', () => import('./rules/rules.routes').then((file) => file.routes)),
  subject('history', () => import('./history/history.routes').then((file) => file.routes)),
];

export const routes: Routes = [
  { path: 'sign-in', title: 'Sign in', loadComponent: () => import('./session/sign-in').then((file) => file.SignIn) },
  { path: 'site', pathMatch: 'full', redirectTo: 'site/job' },
  // A step below `/site`: the worker that keeps the page has the folder `/site/`, and its own address counts as no page.
  { path: 'site/job', title: 'Safety data sheets and plan of this job', loadComponent: () => import('./public/site/site-page').then((file) => file.SitePage) },
  { path: 'send-sheet', title: 'Send a safety data sheet', loadComponent: () => import('./public/send-sheet/send-sheet').then((file) => file.SendSheet) },
  {
    path: '',
    component: Shell,
    canActivate: [signedIn],
    children: [
      { path: '', pathMatch: 'full', redirectTo: toFirstPage },
      ...subjects,
      { path: 'account', title: 'Your account', loadComponent: () => import('./account/account').then((file) => file.Account) },
      { path: '**', title: 'No such page', loadComponent: () => import('./not-found/not-found').then((file) => file.NotFound) },
    ],
  },
];
