import { type Routes } from '@angular/router';
import { keepUnsavedPlan } from './shift/keep-unsaved-plan';

export const routes: Routes = [
  { path: '', title: 'Jobs', loadComponent: () => import('./job-list/job-list').then((file) => file.JobList) },
  { path: 'new', title: 'New job', loadComponent: () => import('./job-form/new-job').then((file) => file.NewJob) },
  { path: ':jobId', title: 'Job', loadComponent: () => import('./job-page/job-page').then((file) => file.JobPage) },
  { path: ':jobId/site-code', title: 'Site code', loadComponent: () => import('./site-code/site-code-page').then((file) => file.SiteCodePage) },
  {
    path: ':jobId/shifts/:shiftId',
    title: 'Shift',
    canDeactivate: [keepUnsavedPlan],
    loadComponent: () => import('./shift/shift-page').then((file) => file.ShiftPage),
  },
  { path: ':jobId/shifts/:shiftId/paper/:versionId', title: 'List on paper', loadComponent: () => import('./paper/paper-page').then((file) => file.PaperPage) },
];
