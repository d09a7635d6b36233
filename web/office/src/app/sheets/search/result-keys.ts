/** Up and down walk from the search box through what was found; Escape goes back to the box. Other keys stay as they are. */
export function walkResults(page: HTMLElement, event: KeyboardEvent): void {
  const step = { ArrowDown: 1, ArrowUp: -1, Escape: -Infinity }[event.key];
  if (step === undefined || event.altKey || event.ctrlKey || event.metaKey) return;
  const stops = [...page.querySelectorAll<HTMLElement>('input[type=search], a.kb-found')];
  const at = stops.indexOf(event.target as HTMLElement);
  const next = stops[Math.max(0, at + step)];
  // Escape in the box empties it, as browsers do.
  if (at < 0 || !next || (at === 0 && step < 0)) return;
  event.preventDefault();
  next.focus();
}
