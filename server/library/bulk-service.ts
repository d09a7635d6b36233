import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { readFile, rm } from 'node:fs/promises';
import { PassThrough, type Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import archiver from 'archiver';
import { parse } from 'csv-parse/sync';
import { and, asc, eq } from 'drizzle-orm';
import yauzl from 'yauzl';
import { v7 as newId } from 'uuid';
import { products, revisions } from '#drizzle/schema/sheets';
import { type ImportPreview, type ZipOutcome } from '#shared/library';
import type * as z from 'zod';
import { type SheetFields } from '#shared/sheets';
import { csvCell } from '../acknowledgements/history-service';
import { type Deps } from '../deps';
import { InputError, KneeboardError } from '../errors';
import { demandRole, type PersonActor } from '../http/actor';
import { type UploadedFile } from '../http/mount';
import { cleanFileName, maxUploadBytes } from '../http/uploads';
import { objectKey, type SheetsService } from '../sds/sheets-service';

export const maxZipFiles = 500;
const maxRows = 5_000;
type ZipFile = z.input<typeof import('#shared/library').ZipOutcome>['files'][number];

export function bulkService({ database, storage }: Deps, sheets: SheetsService) {
  return {
    /** Each file inside goes the way of a single upload; one that cannot is named and the others go on. */
    async uploadZip(actor: PersonActor, file: UploadedFile): Promise<z.input<typeof ZipOutcome>> {
      demandRole(actor, 'owner', 'safety-officer', 'crew-lead');
      const files: ZipFile[] = [];
      for await (const { name, refusal, open } of zipEntries(file.path)) {
        const path = `${file.path}-${newId()}`;
        try {
          if (refusal) throw new InputError(refusal);
          const byteLength = await writeCapped(await open(), path);
          const { revision, isKnown } = await sheets.upload(actor, { path, byteLength, fileName: name });
          files.push({ fileName: name, outcome: isKnown ? 'known' : 'added', because: null, revision });
        } catch (error) {
          if (!(error instanceof KneeboardError)) throw error;
          files.push({ fileName: name, outcome: 'refused', because: error.message, revision: null });
        } finally {
          await rm(path, { force: true });
        }
      }
      if (files.length === 0) throw new InputError('There is no file in this zip.', [{ path: 'file', message: 'Put the PDFs into the zip, then send it again.' }]);
      return { files };
    },

    /** Every confirmed current sheet and an index, as a zip that is made while it is sent. */
    async exportZip(actor: PersonActor): Promise<Readable> {
      const rows = await database.inOrganisation(actor.organisationId, (tx) =>
        tx
          .select({ revision: revisions, name: products.name, supplier: products.supplier })
          .from(revisions)
          .innerJoin(products, and(eq(products.organisationId, revisions.organisationId), eq(products.id, revisions.productId)))
          .where(and(eq(revisions.organisationId, tx.organisationId), eq(revisions.isCurrent, true)))
          .orderBy(asc(products.name), asc(revisions.language)),
      );
      const archive = archiver('zip', { zlib: { level: 1 } });
      const output = archive.pipe(new PassThrough());
      archive.on('error', (error) => output.destroy(error));
      void (async () => {
        try {
          const index = [['file', 'product', 'supplier', 'language', 'revised', 'SHA-256'].join(',')];
          for (const { revision, name, supplier } of rows) {
            const inZip = `${cleanFileName(`${name} ${revision.language ?? ''} ${revision.revisedOn ?? ''}`.trim())} ${revision.sha256.slice(0, 8)}.pdf`;
            archive.append(await storage.getVerified(objectKey(actor.organisationId, revision.sha256), revision.sha256), { name: inZip });
            index.push([inZip, name, supplier, revision.language, revision.revisedOn, revision.sha256].map(csvCell).join(','));
          }
          archive.append(`\ufeff${index.join('\r\n')}\r\n`, { name: 'index.csv' });
          await archive.finalize();
        } catch (error) {
          // Half a zip must not look whole: the connection ends.
          output.destroy(error instanceof Error ? error : new Error(String(error)));
        }
      })();
      return output;
    },

    async *exportCsv(actor: PersonActor): AsyncGenerator<string> {
      const rows = await database.inOrganisation(actor.organisationId, (tx) =>
        tx
          .select({ product: products, revision: revisions })
          .from(products)
          .leftJoin(revisions, and(eq(revisions.organisationId, products.organisationId), eq(revisions.productId, products.id), eq(revisions.isCurrent, true)))
          .where(eq(products.organisationId, tx.organisationId))
          .orderBy(asc(products.name), asc(products.supplier), asc(revisions.language)),
      );
      yield `\ufeffname,supplier,sheet language,sheet revised,signal word,hazard codes,CAS numbers\r\n`;
      for (const { product, revision } of rows) {
        const fields = revision?.fields as SheetFields | undefined;
        const cells = [product.name, product.supplier, revision?.language ?? null, revision?.revisedOn ?? null, fields?.signalWord?.value ?? null, fields?.hazardCodes.map((field) => field.value).join(' ') ?? null, fields?.ingredients.flatMap(({ value }) => value.cas ?? []).join(' ') ?? null];
        yield `${cells.map(csvCell).join(',')}\r\n`;
      }
    },

    /** Looks at a product list row by row; nothing is stored. Columns are found by their names, in English or Spanish. */
    async preview(actor: PersonActor, file: UploadedFile): Promise<ImportPreview> {
      demandRole(actor, 'safety-officer');
      const bytes = await readFile(file.path);
      const records = parseCsv(bytes);
      const [head = [], ...body] = records;
      const columnOf = (...names: string[]) => head.findIndex((title) => names.includes(title.trim().toLowerCase()));
      const nameAt = columnOf('name', 'product', 'product name', 'nombre', 'producto');
      const supplierAt = columnOf('supplier', 'manufacturer', 'maker', 'proveedor', 'fabricante');
      if (nameAt < 0 || supplierAt < 0) throw new InputError('The first row must name the columns.', [{ path: 'file', message: `Two columns are needed, "name" and "supplier". Found: ${head.join(', ').slice(0, 200) || 'nothing'}.` }]);
      if (body.length > maxRows) throw new InputError('The list is too long.', [{ path: 'file', message: `At most ${maxRows} rows at once; this has ${body.length}. Split it.` }]);
      const stored = await database.inOrganisation(actor.organisationId, (tx) => tx.select({ name: products.name, supplier: products.supplier }).from(products).where(eq(products.organisationId, tx.organisationId)));
      const seen = new Set(stored.map(keyOf));
      const rows = body.map((cells, at): ImportPreview['rows'][number] => {
        const [name, supplier] = [tidy(cells[nameAt]), tidy(cells[supplierAt])];
        const because = !name ? 'The name is empty.' : !supplier ? 'The supplier is empty.' : name.length > 200 || supplier.length > 200 ? 'A name is longer than 200 characters.' : /[\p{Cc}\u202a-\u202e\u2066-\u2069]/u.test(name + supplier) ? 'It holds control characters.' : null;
        const isKnown = because === null && seen.has(keyOf({ name, supplier }));
        if (because === null) seen.add(keyOf({ name, supplier }));
        return { row: at + 2, name: name.slice(0, 200), supplier: supplier.slice(0, 200), outcome: because !== null ? 'wrong' : isKnown ? 'known' : 'new', because };
      });
      const count = (outcome: string) => rows.filter((row) => row.outcome === outcome).length;
      return { sha256: createHash('sha256').update(bytes).digest('hex'), columns: head, rows, newCount: count('new'), knownCount: count('known'), wrongCount: count('wrong') };
    },

    importProducts: (actor: PersonActor, list: readonly { name: string; supplier: string }[]): Promise<{ added: number; known: number }> =>
      database.inOrganisation(actor.organisationId, async (tx) => {
        demandRole(actor, 'safety-officer');
        const added = await tx.insert(products).values(list.map((row) => ({ organisationId: tx.organisationId, id: newId(), ...row }))).onConflictDoNothing().returning({ id: products.id });
        return { added: added.length, known: list.length - added.length };
      }),
  };
}
export type BulkService = ReturnType<typeof bulkService>;

const tidy = (cell: string | undefined): string => (cell ?? '').trim().replace(/\s+/g, ' ');
const keyOf = ({ name, supplier }: { name: string; supplier: string }): string => JSON.stringify([name, supplier]);

function parseCsv(bytes: Buffer): string[][] {
  try {
    const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes).replace(/^\ufeff/, '');
    const firstLine = text.slice(0, text.search(/\r?\n|$/));
    const delimiter = [',', ';', '\t'].sort((a, b) => firstLine.split(b).length - firstLine.split(a).length)[0] ?? ',';
    return parse(text, { delimiter, relax_column_count: true, skip_empty_lines: true }) as string[][];
  } catch {
    throw new InputError('The list is not readable.', [{ path: 'file', message: 'Save it from the spreadsheet as CSV in UTF-8, then send it again.' }]);
  }
}

interface ZipEntry {
  readonly name: string;
  readonly refusal: string | null;
  open(): Promise<Readable>;
}

/** Files of a zip, folders left out. Sizes in the directory are not trusted: writing is capped as well. */
async function* zipEntries(path: string): AsyncGenerator<ZipEntry> {
  const zip = await new Promise<yauzl.ZipFile>((resolve, reject) =>
    yauzl.open(path, { lazyEntries: true, autoClose: false, strictFileNames: false, decodeStrings: true }, (error, opened) => (error ? reject(new InputError('This is not a readable zip.', [{ path: 'file', message: error.message }])) : resolve(opened))),
  );
  try {
    if (zip.entryCount > maxZipFiles) throw new InputError('The zip holds too many files.', [{ path: 'file', message: `At most ${maxZipFiles} at once; this has ${zip.entryCount}.` }]);
    for (;;) {
      const entry = await nextEntry(zip);
      if (!entry) return;
      const name = cleanFileName(entry.fileName);
      // Folders, and what some archivers add for themselves.
      if (entry.fileName.endsWith('/') || /(?:^|\/)(?:__MACOSX\/|\.)/.test(entry.fileName)) continue;
      const refusal = !/\.pdf$/i.test(name) ? 'Only PDF files are taken out of a zip. Add this one by itself if it is a sheet.' : entry.isEncrypted() ? 'It is encrypted inside the zip.' : entry.uncompressedSize > maxUploadBytes ? `It is over ${maxUploadBytes / 1024 / 1024} MB.` : null;
      yield { name, refusal, open: () => new Promise((resolve, reject) => zip.openReadStream(entry, (error, stream) => (error ? reject(new InputError(`It cannot be unpacked: ${error.message}`)) : resolve(stream)))) };
    }
  } finally {
    zip.close();
  }
}
function nextEntry(zip: yauzl.ZipFile): Promise<yauzl.Entry | undefined> {
  return new Promise((resolve, reject) => {
    const done = () => {
      zip.removeListener('entry', found);
      zip.removeListener('end', ended);
      zip.removeListener('error', failed);
    };
    const found = (entry: yauzl.Entry) => (done(), resolve(entry));
    const ended = () => (done(), resolve(undefined));
    const failed = (error: Error) => (done(), reject(new InputError('The zip is damaged.', [{ path: 'file', message: error.message }])));
    zip.once('entry', found).once('end', ended).once('error', failed);
    zip.readEntry();
  });
}

async function writeCapped(from: Readable, path: string): Promise<number> {
  let byteLength = 0;
  try {
    await pipeline(
      from,
      async function* (pieces: AsyncIterable<Buffer>) {
        for await (const piece of pieces) {
          byteLength += piece.length;
          if (byteLength > maxUploadBytes) throw new InputError(`It unpacks to more than ${maxUploadBytes / 1024 / 1024} MB.`);
          yield piece;
        }
      },
      createWriteStream(path, { mode: 0o600 }),
    );
  } catch (error) {
    throw error instanceof KneeboardError ? error : new InputError('It is damaged inside the zip.');
  }
  return byteLength;
}
