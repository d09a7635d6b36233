import { type ReaderState, type RevisionSummary } from '#shared/sheets';
import { type StateKind } from '#ui/state';
import { dayOf, momentShort } from '../pieces/dates';

/** Languages of sheets, as the office writes them. */
export const languageNames: Readonly<Record<string, string>> = { en: 'English', es: 'Spanish', fr: 'French', de: 'German' };

/** Why the reader gave up, and what to do: one sentence each. */
export const readerWords: Readonly<Record<Exclude<ReaderState, 'read' | 'read-by-ocr'>, { readonly short: string; readonly sentence: string }>> = {
  'no-text-layer': { short: 'a scan without text', sentence: 'This file is a picture of a sheet, without text to read. Enter what it says by hand, beside the page.' },
  encrypted: { short: 'locked with a password', sentence: 'This file is locked with a password. Ask the supplier for an open one, or enter what it says by hand.' },
  damaged: { short: 'damaged', sentence: 'This file is damaged and could not be read. Ask the supplier for it again, or enter what it says by hand.' },
  'not-a-pdf': { short: 'not a PDF', sentence: 'This file is not a PDF. It is kept as it came. Add the PDF, or enter what it says by hand.' },
  'too-large': { short: 'too large to read', sentence: 'This file is too large to be read by itself. Enter what it says by hand, beside the page.' },
  'too-slow': { short: 'took too long to read', sentence: 'Reading this file took too long and was stopped. Read it again, or enter what it says by hand.' },
  'too-much-memory': { short: 'too heavy to read', sentence: 'Reading this file took too much memory and was stopped. Enter what it says by hand, beside the page.' },
  unavailable: { short: 'reading failed', sentence: 'Reading failed at every try, or the stored file could not be reached. Read it again, or enter what it says by hand.' },
};

/** Why a revision could not be read; null when it was, or is on its way. */
export function readerTrouble({ readerState }: RevisionSummary): { readonly short: string; readonly sentence: string } | null {
  return readerState === null || readerState === 'read' || readerState === 'read-by-ocr' ? null : readerWords[readerState];
}

/** Said above the values of a sheet that was a picture. */
export const picturesWords = 'Read from pictures of the pages; check every value.';

/** How far the reading is: page by page when the sheet has no text. */
export function pageUnderWay({ pages, pagesRead }: RevisionSummary): string {
  if (pagesRead === null) return 'being read';
  return pagesRead === 0 ? 'a scan, waits its turn' : `reading page ${pagesRead} of ${pages ?? pagesRead}`;
}

/** Longer than any queue is patient: nobody is reading it any more. */
const longWaitMs = 2 * 3600 * 1000;
export const isStuck = ({ state, pagesRead, uploadedAt }: RevisionSummary, now: Date): boolean => state === 'waiting' && pagesRead === null && now.getTime() - Date.parse(uploadedAt) > longWaitMs;
/** Whether reading once more may help: not where the file itself is the trouble. */
export const mayReadAgain = (revision: RevisionSummary, now: Date): boolean => isStuck(revision, now) || (revision.state === 'needs-entry' && revision.readerState !== 'not-a-pdf' && revision.readerState !== 'encrypted' && revision.readerState !== 'too-large');

/** "Spanish, of 11 May 2023": the language where it is not English, then the sheet's date or the day it came. */
export const datedWords = ({ language, revisedOn, uploadedAt }: RevisionSummary): string =>
  [language === null || language === 'en' ? '' : (languageNames[language] ?? language), revisedOn ? `of ${dayOf(revisedOn)}` : `added ${momentShort(uploadedAt)}`].filter(Boolean).join(', ');

/** State of a revision in words, for a list. */
export function revisionState(revision: RevisionSummary, now = new Date()): { readonly kind: StateKind; readonly words: string } {
  switch (revision.state) {
    case 'waiting':
      if (isStuck(revision, now)) return { kind: 'caution', words: 'waits unusually long' };
      return { kind: 'plain', words: pageUnderWay(revision) };
    case 'read':
      return revision.toLookAt === 0 ? { kind: 'caution', words: 'check and confirm' } : { kind: 'caution', words: revision.toLookAt === 1 ? '1 value wants a look' : `${revision.toLookAt} values want a look` };
    case 'needs-entry':
      return { kind: 'stop', words: readerTrouble(revision)?.short ?? 'enter by hand' };
    case 'confirmed':
      return revision.isCurrent ? { kind: 'done', words: 'in use' } : { kind: 'plain', words: 'older revision' };
    case 'set-aside':
      return { kind: 'plain', words: 'set aside' };
  }
}
