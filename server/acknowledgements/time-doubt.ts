import { type TimeDoubt } from '#shared/acknowledgements';

/** Clocks drift, and publishing may come between two looks at them. */
const toleranceMs = 10 * 60_000;

/** Why the time a tablet wrote down cannot be right: later than it arrived here, or earlier than what it is about existed. Null where it can be. */
export function timeDoubt(capturedAt: Date, receivedAt: Date, publishedAt: Date | null): TimeDoubt | null {
  if (capturedAt.getTime() > receivedAt.getTime() + toleranceMs) return 'after-arrival';
  return publishedAt !== null && capturedAt.getTime() < publishedAt.getTime() - toleranceMs ? 'before-publishing' : null;
}
