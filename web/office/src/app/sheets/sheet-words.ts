import { type ReaderState, type RevisionSummary } from '#shared/sheets';
import { type StateKind } from '#ui/state';

/** Why the reader gave up, and what to do: one sentence each. */
export const readerWords: Readonly<Record<Exclude<ReaderState, 'read'>, { readonly short: string; readonly sentence: string }>> = {
  'no-text-layer': { short: 'a scan without text', sentence: 'This file is a picture of a sheet, without text to read. Enter what it says by hand, beside the page.' },
  encrypted: { short: 'locked with a password', sentence: 'This file is locked with a password. Ask the supplier for an open one, or enter what it says by hand.' },
  damaged: { short: 'damaged', sentence: 'This file is damaged and could not be read. Ask the supplier for it again, or enter what it says by hand.' },
  'not-a-pdf': { short: 'not a PDF', sentence: 'This file is not a PDF. It is kept as it came. Add the PDF, or enter what it says by hand.' },
  'too-large': { short: 'too large to read', sentence: 'This file is too large to be read by itself. Enter what it says by hand, beside the page.' },
  'too-slow': { short: 'took too long to read', sentence: 'Reading this file took too long and was stopped. Read it again, or enter what it says by hand.' },
  'too-much-memory': { short: 'too heavy to read', sentence: 'Reading this file took too much memory and was stopped. Enter what it says by hand, beside the page.' },
  unavailable: { short: 'not read yet', sentence: 'The stored file could not be reached for reading. Read it again in a while, or enter what it says by hand.' },
};

/** Why a revision could not be read; null when it was, or is on its way. */
export function readerTrouble({ readerState }: RevisionSummary): { readonly short: string; readonly sentence: string } | null {
  return readerState === null || readerState === 'read' ? null : readerWords[readerState];
}

/** State of a revision in words, for a list. */
export function revisionState(revision: RevisionSummary): { readonly kind: StateKind; readonly words: string } {
  switch (revision.state) {
    case 'waiting':
      return { kind: 'plain', words: 'being read' };
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
