import { type Routes } from '@angular/router';
import { type SignSheet } from './acknowledgements/sign-sheet';

export const routes: Routes = [
  { path: '', loadComponent: async () => (await import('./today/today')).Today },
  { path: 'pair', loadComponent: async () => (await import('./pairing/pair')).Pair },
  { path: 'waiting', loadComponent: async () => (await import('./outbox/waiting-list')).WaitingList },
  {
    path: 'jobs/:shiftId',
    children: [
      { path: '', loadComponent: async () => (await import('./jobs/job-home')).JobHome },
      { path: 'briefing', loadComponent: async () => (await import('./briefing/briefing')).Briefing },
      {
        path: 'sign',
        loadComponent: async () => (await import('./acknowledgements/sign-sheet')).SignSheet,
        canDeactivate: [(page: SignSheet) => page.canLeave()],
      },
      { path: 'tasks/:taskId/start', loadComponent: async () => (await import('./start-checks/start-check')).StartCheck },
      { path: 'checklist', loadComponent: async () => (await import('./checklists/whole-checklist')).WholeChecklist },
      { path: 'sheets', loadComponent: async () => (await import('./sheets/sheets')).Sheets },
      { path: 'sheets/:revisionId', loadComponent: async () => (await import('./sheets/sheet-page')).SheetPage },
    ],
  },
  { path: '**', redirectTo: '' },
];
