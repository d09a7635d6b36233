import { type CanDeactivateFn } from '@angular/router';
import { type ShiftPage } from './shift-page';

/** Leaving a shift sends what is not saved yet first; if that fails, the person decides. */
export const keepUnsavedPlan: CanDeactivateFn<ShiftPage> = (page) => page.mayLeave();
