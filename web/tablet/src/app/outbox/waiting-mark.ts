const name = 'kneeboard-waiting';
const keptSeconds = 30 * 24 * 3600;

/**
 * How many envelopes wait, noted outside the storage they are in: a browser that drops a page's storage leaves its cookies.
 * A mark above what is found there is how a tablet knows that something signed is gone.
 */
export function readWaitingMark(): number {
  const found = document.cookie.split('; ').find((cookie) => cookie.startsWith(`${name}=`));
  const count = Number(found?.slice(name.length + 1));
  return Number.isInteger(count) && count > 0 ? count : 0;
}

export function writeWaitingMark(count: number): void {
  document.cookie = `${name}=${count}; path=/tablet; max-age=${keptSeconds}; samesite=strict`;
}
