import { type Acknowledgement, type AcknowledgementRow, type PinState, type TimeDoubt } from '#shared/acknowledgements';
import { type StateKind } from '#ui/state';

export const kindNames: Readonly<Record<AcknowledgementRow['kind'], string>> = { signed: 'signed', 'could-not-sign': 'could not sign yet', paper: 'on paper', witnessed: 'witnessed' };
export const languageNames = { en: 'English', es: 'Español' } as const;

/** What a PIN proves, in words; '' where it proves the signature. One that does not is kept and marked, and the person is asked to sign again. */
export const pinWords: Readonly<Record<PinState, string>> = { confirmed: '', 'not-confirmed': 'PIN not confirmed', 'not-set': 'no PIN set, does not count', unwitnessed: 'PIN set without witness, does not count' };
export const timeWords: Readonly<Record<TimeDoubt, string>> = { 'after-arrival': 'tablet’s time cannot be right: later than it arrived', 'before-publishing': 'tablet’s time cannot be right: earlier than the checklist' };

/** "on Tablet 2, PIN not confirmed, an older version" */
export function howWords(row: AcknowledgementRow): string {
  const kind = row.kind === 'signed' ? '' : kindNames[row.kind];
  const where = row.tabletName ? `on ${row.tabletName}` : '';
  const pin = row.kind === 'signed' ? pinWords[row.pinState] : '';
  const time = row.timeDoubt ? timeWords[row.timeDoubt] : '';
  return [kind, where, pin, time, row.wasSuperseded ? 'a newer version was out' : ''].filter(Boolean).join(', ') || 'in the office';
}

/** Only what is not as usual gets a mark. */
export function howKind(row: AcknowledgementRow): StateKind | null {
  if (row.kind === 'could-not-sign' || row.pinState === 'not-confirmed') return 'stop';
  return row.wasSuperseded || row.timeDoubt || (row.kind === 'signed' && row.pinState !== 'confirmed') ? 'caution' : null;
}

/** "tablet 4 s slow": tablet clock minus server clock. */
export function clockWords({ clockOffsetSeconds: offset }: Acknowledgement): string {
  if (offset === null || Math.abs(offset) < 1) return '';
  const seconds = Math.round(Math.abs(offset));
  const length = seconds < 120 ? `${seconds} s` : seconds < 7200 ? `${Math.round(seconds / 60)} min` : seconds < 172_800 ? `${Math.round(seconds / 3600)} h` : `${Math.round(seconds / 86_400).toLocaleString('en-US')} days`;
  return `, tablet ${length} ${offset > 0 ? 'fast' : 'slow'}`;
}

/** "9c1f 42d0 7be8 … 5a31": enough of a hash to compare by eye. */
export function shortHash(hash: string): string {
  const groups = hash.match(/.{1,4}/g) ?? [];
  return groups.length <= 4 ? groups.join(' ') : `${groups.slice(0, 3).join(' ')} … ${groups.at(-1)}`;
}
