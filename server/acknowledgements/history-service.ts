import type * as z from 'zod';
import { parseChecklistText } from '#compliance/checklists/text';
import { type Acknowledgement, type HistoryExportQuery, type HistoryPage, type HistoryQuery, type Strokes } from '#shared/acknowledgements';
import { type Deps } from '../deps';
import { type PersonActor } from '../http/actor';
import { toPage } from '../paging';
import { type RecordlogService } from '../recordlog/recordlog-service';
import { countFound, findAcknowledgement, foundCap, listHistory, readHistoryAfter, totalAcknowledgements, toRow, type AcknowledgementRecord } from './history-store';

const rowsAtOnce = 2_000;
const columns: readonly [string, (row: AcknowledgementRecord) => string | number | null][] = [
  ['entry', (row) => row.entryIndex],
  ['captured (tablet)', (row) => row.capturedAt.toISOString()],
  ['received (server)', (row) => row.receivedAt.toISOString()],
  ['person', (row) => row.personName],
  ['job', (row) => row.jobName],
  ['shift', (row) => row.shiftDate],
  ['version', (row) => row.versionNumber],
  ['language', (row) => row.language],
  ['kind', (row) => row.kind],
  ['reason', (row) => row.reason],
  ['PIN', (row) => row.pinState],
  ['newer version existed', (row) => (row.wasSuperseded ? 'yes' : 'no')],
  ['tablet', (row) => row.tabletName],
  ['tablet clock off by (s)', (row) => row.clockOffsetSeconds],
  ['tablet time', (row) => (row.timeDoubt === null ? '' : row.timeDoubt === 'after-arrival' ? 'cannot be right: later than it arrived' : 'cannot be right: earlier than the checklist')],
  ['text SHA-256', (row) => row.textSha256],
];

/** RFC 4180; a cell that a spreadsheet would run as a formula is made inert with a leading apostrophe. */
export function csvCell(value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  const inert = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(inert) ? `"${inert.replace(/"/g, '""')}"` : inert;
}

export function historyService({ database }: Deps, recordlog: RecordlogService) {
  return {
    list: (actor: PersonActor, query: z.output<typeof HistoryQuery>): Promise<HistoryPage> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        const rows = await listHistory(tx, query);
        const total = await totalAcknowledgements(tx);
        const isFiltered = [query.jobId, query.personId, query.from, query.to, query.kind].some((value) => value !== undefined);
        const found = isFiltered ? await countFound(tx, query) : total;
        return { ...toPage(rows, query.limit, (row) => [row.entryIndex], toRow), total, found: isFiltered ? Math.min(found, foundCap) : found, isFoundCapped: isFiltered && found > foundCap };
      }),

    async read(actor: PersonActor, id: string): Promise<Acknowledgement> {
      const { row, text, leaf, leafHash } = await database.inOrganisation(actor.organisationId, (tx) => findAcknowledgement(tx, id));
      const proved = await recordlog.prove(actor.organisationId, row.entryIndex);
      return {
        ...toRow(row),
        textSha256: row.textSha256,
        versionId: row.versionId,
        sentence: parseChecklistText(text.toString('utf8')).sentence,
        reason: row.reason,
        strokes: JSON.parse(row.strokes) as Strokes,
        clockOffsetSeconds: row.clockOffsetSeconds,
        leaf,
        leafHash: leafHash.toString('hex'),
        proof: proved?.proof ?? null,
        checkpoint: proved?.checkpoint ?? null,
      };
    },
    entryIndexOf: async (actor: PersonActor, id: string): Promise<number> => (await database.inOrganisation(actor.organisationId, (tx) => findAcknowledgement(tx, id))).row.entryIndex,

    /** The whole filtered history as CSV, oldest first, in pieces: memory stays flat. */
    async *exportCsv(actor: PersonActor, query: z.output<typeof HistoryExportQuery>): AsyncGenerator<string> {
      // A byte order mark, so that spreadsheets read the names as UTF-8.
      yield `\ufeff${columns.map(([name]) => csvCell(name)).join(',')}\r\n`;
      for (let after = -1; ; ) {
        const rows = await database.inOrganisation(actor.organisationId, (tx) => readHistoryAfter(tx, query, after, rowsAtOnce));
        const last = rows.at(-1);
        if (!last) return;
        yield rows.map((row) => `${columns.map(([, cell]) => csvCell(cell(row))).join(',')}\r\n`).join('');
        after = last.entryIndex;
      }
    },
  };
}
export type HistoryService = ReturnType<typeof historyService>;
