import { computed, inject, type Signal } from '@angular/core';
import { type Language } from '#compliance/outcome';
import { type OpenedText } from '../checklists/opened-text';
import { Day, type DayJob } from '../day/day';
import { Outbox } from '../outbox/outbox';
import { Words } from '../words/words';
import { jobView, type JobView } from './job-view';

export type GoodText = Extract<OpenedText, { state: 'good' }>;

export type FoundJob =
  | { readonly state: 'loading' | 'gone' }
  | { readonly state: 'damaged' | 'unreadable'; readonly job: DayJob }
  | { readonly state: 'good'; readonly view: JobView; readonly text: GoodText; readonly texts: readonly OpenedText[] };

/** The job of a page, in the tablet's language where that text is good, else in the other. Call in an injection context. */
export function injectJob(shiftId: Signal<string>): Signal<FoundJob> {
  const day = inject(Day);
  const outbox = inject(Outbox);
  const words = inject(Words);
  return computed<FoundJob>(() => {
    const opened = day.jobs().find(({ job }) => job.shiftId === shiftId());
    const serverTime = day.day()?.serverTime;
    if (!opened || serverTime === undefined) return { state: day.isLoaded() ? 'gone' : 'loading' };
    const text = bestText(opened.texts, words.language());
    if (!text) return { state: opened.texts.some(({ state }) => state === 'damaged') ? 'damaged' : 'unreadable', job: opened.job };
    return { state: 'good', view: jobView(opened.job, text.text, outbox.posted(), serverTime, day.day()?.witnesses ?? []), text, texts: opened.texts };
  });
}

/** The good text in that language, else any good one; null when all are damaged or unreadable. */
export function bestText(texts: readonly OpenedText[], language: Language): GoodText | null {
  const good = texts.filter((text): text is GoodText => text.state === 'good');
  return good.find((text) => text.language === language) ?? good[0] ?? null;
}
