import { type ZipOutcome } from '#shared/library';

export interface UploadCount {
  readonly all: number;
  readonly done: number;
  readonly failed: number;
  /** Waiting or on its way. */
  readonly open: number;
}

export function countUploads(uploads: readonly { readonly state: 'waiting' | 'sending' | 'done' | 'failed' }[]): UploadCount {
  const of = (state: (typeof uploads)[number]['state']) => uploads.filter((upload) => upload.state === state).length;
  return { all: uploads.length, done: of('done'), failed: of('failed'), open: of('waiting') + of('sending') };
}

/** The same in few words, for the frame of every page. */
export function shortSummary({ all, done, failed, open }: UploadCount, isPaused: boolean, isWaiting: boolean): string {
  const not = failed === 0 ? '' : `${failed} ${failed === 1 ? 'sheet' : 'sheets'} not added`;
  if (open === 0) return not;
  const how = isPaused ? 'Paused' : isWaiting ? 'Waiting for the server' : 'Adding sheets';
  return [`${how}: ${done} of ${all} stored`, not].filter(Boolean).join(', ');
}

/** How the whole list stands, in one or two sentences. */
export function uploadSummary({ all, done, failed, open }: UploadCount, isPaused: boolean, waitsFor: string): string {
  const not = failed === 0 ? '' : `, ${failed} not`;
  if (open === 0) return `${done} of ${all} stored${not}.`;
  const next = isPaused ? 'Paused: what is on its way ends, nothing new starts.' : waitsFor || 'You can leave this page; they are kept in this browser until they are stored.';
  return `${done} of ${all} stored${not}. ${next}`;
}

/** "12 added, 3 were here already, 1 refused" */
export function zipWords({ files }: ZipOutcome): string {
  const of = (outcome: ZipOutcome['files'][number]['outcome']) => files.filter((file) => file.outcome === outcome).length;
  const [added, known, refused] = [of('added'), of('known'), of('refused')];
  return [added > 0 ? `${added} added` : '', known > 0 ? `${known} ${known === 1 ? 'was' : 'were'} here already` : '', refused > 0 ? `${refused} refused` : ''].filter(Boolean).join(', ');
}
