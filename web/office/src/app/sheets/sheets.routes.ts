import { type Routes } from '@angular/router';
import { type SheetReview } from './sheet-review/sheet-review';

export const routes: Routes = [
  { path: '', title: 'SDS library', loadComponent: () => import('./sheet-library/sheet-library').then((file) => file.SheetLibrary) },
  { path: 'corrections', title: 'Remembered corrections', loadComponent: () => import('./corrections/corrections-page').then((file) => file.CorrectionsPage) },
  { path: 'keeping', title: 'Keeping current', loadComponent: () => import('./keeping/keeping-page').then((file) => file.KeepingPage) },
  {
    path: ':revisionId',
    title: 'Check what was read',
    canDeactivate: [(page: SheetReview) => page.mayLeave()],
    loadComponent: () => import('./sheet-review/sheet-review').then((file) => file.SheetReview),
  },
];
