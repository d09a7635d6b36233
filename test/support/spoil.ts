/** A place in a JSON value, as the contract's problems name it: `parts.0.productId`. */
export interface Place {
  readonly path: string;
  readonly value: unknown;
  /** The whole value with another one at this place. */
  with(other: unknown): unknown;
}

/** Every place in a JSON value, the value itself (path '') first. */
export function placesIn(whole: unknown, path = '', build: (other: unknown) => unknown = (other) => other): Place[] {
  const below = (key: string, replace: (other: unknown) => unknown): Place[] => placesIn((whole as Record<string, unknown>)[key], path ? `${path}.${key}` : key, (other) => build(replace(other)));
  const here: Place = { path, value: whole, with: build };
  if (Array.isArray(whole)) return [here, ...whole.flatMap((_, at) => below(String(at), (other) => whole.map((each: unknown, index) => (index === at ? other : each))))];
  if (typeof whole === 'object' && whole !== null) return [here, ...Object.keys(whole).flatMap((key) => below(key, (other) => ({ ...whole, [key]: other })))];
  return [here];
}

/** Whether a problem names a place: the place itself, one above or one below it. */
export const names = (errors: readonly { path: string }[], place: string): boolean => errors.some(({ path }) => path === place || place.startsWith(`${path}.`) || path.startsWith(`${place}.`));
