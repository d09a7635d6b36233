import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { Router, type Response } from 'express';
import { mount } from '../http/mount';
import { type RecordlogService } from '../recordlog/recordlog-service';
import { type DeliveriesService } from './deliveries-service';
import { type HistoryService } from './history-service';
import { type TabletDayService } from './tablet-day-service';

export function acknowledgementsRoutes(history: HistoryService, recordlog: RecordlogService, deliveries: DeliveriesService, tabletDay: TabletDayService): Router {
  const router = Router();
  mount(router, 'listHistory', ({ actor, query }) => history.list(actor, query));
  mount(router, 'readAcknowledgement', ({ actor, params }) => history.read(actor, params.acknowledgementId));
  mount(router, 'exportHistory', ({ actor, query, response }) => sendFile(response, 'acknowledgements.csv', 'text/csv; charset=utf-8', history.exportCsv(actor, query)));
  mount(router, 'checkRecord', ({ actor }) => recordlog.check(actor));
  mount(router, 'exportRecord', async ({ actor, response }) => sendFile(response, 'record-log.jsonl', 'application/jsonl; charset=utf-8', await recordlog.export(actor)));
  mount(router, 'exportEntry', async ({ actor, params, response }) => {
    const index = await history.entryIndexOf(actor, params.acknowledgementId);
    return sendFile(response, `receipt-${index}.jsonl`, 'application/jsonl; charset=utf-8', await recordlog.exportOne(actor, index));
  });
  mount(router, 'readTabletDay', ({ actor }) => tabletDay.read(actor));
  mount(router, 'checkPin', async ({ actor, body }) => {
    await deliveries.checkPin(actor, body);
    return undefined;
  });
  mount(router, 'deliver', ({ actor, body }) => deliveries.deliver(actor, body));
  mount(router, 'listKeptAside', ({ actor, query }) => deliveries.listKeptAside(actor, query));
  return router;
}

/** Streams a download. A fault on the way ends the connection, so that half a file is never taken for a whole one. */
export async function sendFile(response: Response, name: string, type: string, pieces: AsyncIterable<string>): Promise<undefined> {
  response.set({ 'Content-Type': type, 'Content-Disposition': `attachment; filename="${name}"`, 'Cache-Control': 'no-store' });
  await pipeline(Readable.from(pieces), response);
  return undefined;
}
