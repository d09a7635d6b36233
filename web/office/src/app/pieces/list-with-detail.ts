import { type UrlMatcher } from '@angular/router';

/** One route for a list and for the thing open beside it, so that opening one does not build the list anew. */
export const listWithDetail =
  (parameter: string): UrlMatcher =>
  (segments) => {
    const [first] = segments;
    if (segments.length > 1) return null;
    return { consumed: segments, posParams: first ? { [parameter]: first } : {} };
  };
