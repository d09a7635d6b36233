/** One value that two versions of a thing do not share. */
export interface Difference {
  readonly path: string;
  readonly mine: string;
  readonly theirs: string;
}

/** Words for a value as a person compares it. */
function words(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'nothing';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number') return value.toLocaleString('en-US', { maximumFractionDigits: 3 });
  if (Array.isArray(value)) return value.length === 0 ? 'nothing' : value.map(words).join('; ');
  if (typeof value === 'object') return Object.values(value).map(words).join(', ');
  return String(value);
}

/** "floor.asbestosReport" → "floor, asbestos report" */
const said = (path: string): string =>
  path
    .replace(/\./g, ', ')
    .replace(/([a-z0-9])([A-Z])/g, (_whole, before: string, letter: string) => `${before} ${letter.toLowerCase()}`)
    .replace(/\bis |\bhas /g, '');

const isPlain = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null && !Array.isArray(value);

/** Where two versions of a thing differ, leaf by leaf; only what the first one knows. Lists are compared as a whole. */
export function differencesOf(mine: unknown, theirs: unknown, path = ''): readonly Difference[] {
  if (isPlain(mine)) {
    const other = isPlain(theirs) ? theirs : {};
    return Object.keys(mine).flatMap((key) => differencesOf(mine[key], other[key], path ? `${path}.${key}` : key));
  }
  return words(mine) === words(theirs) ? [] : [{ path: said(path), mine: words(mine), theirs: words(theirs) }];
}
