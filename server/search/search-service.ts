import type * as z from 'zod';
import { type SearchAnswer, type SearchQuery } from '#shared/library';
import { type Deps } from '../deps';
import { type PersonActor } from '../http/actor';
import { findRevisions, toSummary } from '../sds/sheets-store';
import { findCandidates, readTexts, type Found } from './search-store';
import { searchTerms, type SearchTerms } from './search-terms';
import { snippetOf } from './snippet';

export function searchService({ database }: Pick<Deps, 'database'>) {
  return {
    /** Names, suppliers, CAS numbers, codes and texts of the organisation's sheets, best first. */
    search: (actor: Pick<PersonActor, 'organisationId'>, { q, limit, ...filters }: z.output<typeof SearchQuery>): Promise<SearchAnswer> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const terms = searchTerms(q);
        const candidates = await findCandidates(tx, q, terms, filters, limit + 1);
        const shown = candidates.slice(0, limit);
        // Joined back under the policy: what the function names and the organisation does not have is not shown.
        const rows = new Map((await findRevisions(tx, shown.map(({ revisionId }) => revisionId))).map((row) => [row.revision.id, row]));
        const texts = await readTexts(tx, q, shown.filter(({ kind }) => kind === 'text').map(({ revisionId }) => revisionId));
        const items = shown.flatMap((found) => {
          const row = rows.get(found.revisionId);
          if (!row) return [];
          const at = texts.get(found.revisionId);
          return [{ revision: toSummary(row), matched: matchedInWords(found, terms), snippet: at ? snippetOf(at.text, at.stems) : null }];
        });
        return { items, hasMore: candidates.length > limit };
      }),
  };
}
export type SearchService = ReturnType<typeof searchService>;

function matchedInWords({ kind, closest }: Found, { casNumbers, codes }: SearchTerms): string {
  const keys = [...casNumbers.map((number) => `CAS number ${number}`), ...codes.map((code) => `code ${code.toUpperCase()}`)];
  const similar = `similar to what you typed: ${closest ?? ''}`;
  const words = { name: 'name', keys: '', 'name-start': 'name', 'name-words': 'name', supplier: 'supplier', 'name-and-supplier': 'name and supplier', 'name-part': 'part of a name', 'similar-name': similar, similar, text: 'text of the sheet' }[kind];
  const said = kind === 'text' || kind === 'name' ? words : [words, ...keys].filter(Boolean).join(', ');
  return said.charAt(0).toUpperCase() + said.slice(1);
}
