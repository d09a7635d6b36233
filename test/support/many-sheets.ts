import { type SheetFields } from '#shared/sheets';
import { type Database } from '#server/platform/database';
import { v7 as newId } from 'uuid';

/** Invented sheets by the thousand, the same each time: for search and for lists under load. */
export interface ManySheets {
  readonly organisationId: string;
  readonly uploaderId: string;
  readonly sheets: readonly ManySheet[];
}
export interface ManySheet {
  readonly id: string;
  readonly name: string;
  readonly supplier: string;
  readonly cas: readonly string[];
  readonly text: string;
}

/** Mulberry32: the same figures each run. */
export function figures(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) % below;
  };
}

const heads = ['Quarry', 'Slate', 'Marl', 'Tarn', 'Fell', 'Gritstone', 'Harrow', 'Tollgate', 'Kiln', 'Weir', 'Cobble', 'Larch', 'Rowan', 'Sedge', 'Thicket', 'Basalt', 'Ferrule', 'Gable', 'Lintel', 'Plinth', 'Rafter', 'Trowel', 'Wharf', 'Yarrow', 'Bracken', 'Cinder', 'Dolomite', 'Ember', 'Flint', 'Granary'];
const tails = ['bond', 'seal', 'coat', 'floor', 'prime', 'fill', 'set', 'guard', 'top', 'base', 'flow', 'lock', 'grip', 'shield', 'cure', 'mend'];
const parts = ['Part A', 'Part B', 'Primer', 'Topcoat', 'Hardener', 'Thinner', 'Cleaner', 'Filler', 'Sealer', 'Gray', 'Clear', 'Fast'];
const places = ['Northlode', 'Eastmere', 'Westfold', 'Southbeck', 'Highmoor', 'Lowdale', 'Oldbridge', 'Newhaven', 'Farcliff', 'Nearwood', 'Redmarsh', 'Greyfen', 'Blackwater', 'Whitestone', 'Goldacre', 'Ironhill', 'Copperton', 'Leadgate', 'Tinwald', 'Zincfield'];
const trades = ['Resins', 'Coatings', 'Chemicals', 'Minerals', 'Polymers', 'Floors', 'Binders', 'Solvents', 'Pigments', 'Cements'];
const starts = ['Keep', 'Store', 'Handle', 'Wear', 'Avoid', 'Collect', 'Rinse', 'Remove', 'Check', 'Contain', 'Label', 'Isolate'];
const syllables = ['ben', 'cor', 'dal', 'fen', 'gor', 'hal', 'jun', 'kel', 'lom', 'mir', 'nas', 'pol', 'rud', 'sil', 'tor', 'vex', 'wal', 'zin', 'bra', 'cle', 'dro', 'fli', 'gra', 'sto'];

/** 13,824 words nobody uses, so that a word stands on few sheets. */
export const rareWord = (index: number): string => `${syllables[index % 24]}${syllables[Math.floor(index / 24) % 24]}${syllables[Math.floor(index / 576) % 24]}ol`;
/** Stands on every second sheet. */
export const commonWord = 'ventilation';

function casNumber(index: number): string {
  const digits = `${1000 + index}${10 + (index % 90)}`;
  const check = [...digits].reverse().reduce((total, digit, place) => total + Number(digit) * (place + 1), 0) % 10;
  return `${digits.slice(0, -2)}-${digits.slice(-2)}-${check}`;
}
const pick = <T>(list: readonly T[], next: (below: number) => number): T => list[next(list.length)] as T;

/** Fills an organisation of its own, as the application role, through the same triggers as the service. */
export async function makeManySheets(database: Database, count: number, seed: number): Promise<ManySheets> {
  const next = figures(seed);
  const organisationId = newId();
  const uploaderId = newId();
  const suppliers = Array.from({ length: 120 }, () => `${pick(places, next)} ${pick(trades, next)}${next(2) ? ', Inc.' : ''}`);
  const sheets: ManySheet[] = [];
  await database.inOrganisation(organisationId, async ({ client }) => {
    await client.query('INSERT INTO organisations (organisation_id, name) VALUES ($1, $2)', [organisationId, 'Marrow & Slate Floors']);
    await client.query(`INSERT INTO people (organisation_id, id, name, language) VALUES ($1, $2, 'Ines Halloran', 'en')`, [organisationId, uploaderId]);
  });
  for (let from = 0; from < count; from += 500) {
    const batch = Array.from({ length: Math.min(500, count - from) }, (_, at) => oneSheet(from + at, suppliers, next));
    sheets.push(...batch.map(({ sheet }) => sheet));
    await database.inOrganisation(organisationId, async ({ client }) => {
      await client.query(
        `INSERT INTO revisions (organisation_id, id, sha256, byte_length, file_name, state, reader_state, pages, fields, language, revised_on, uploaded_by, uploaded_at)
         SELECT $1, e.id, repeat('0', 28) || replace(e.id::text, '-', '') || '0000', 90000, e."fileName", 'read', 'read', 9, e.fields, e.language, '2024-03-18', $2, now() - make_interval(mins => e.age)
         FROM jsonb_to_recordset($3) AS e(id uuid, "fileName" text, fields jsonb, language text, age integer)`,
        [organisationId, uploaderId, JSON.stringify(batch.map(({ row }) => row))],
      );
      await client.query('SELECT index_sheet(e.id, e.text) FROM jsonb_to_recordset($1) AS e(id uuid, text text)', [JSON.stringify(batch.map(({ sheet }) => ({ id: sheet.id, text: sheet.text })))]);
    });
  }
  return { organisationId, uploaderId, sheets };
}

function oneSheet(index: number, suppliers: readonly string[], next: (below: number) => number) {
  const id = newId();
  const name = `${pick(heads, next)}${pick(tails, next)} ${10 + next(90)} ${pick(parts, next)}`;
  const supplier = pick(suppliers, next);
  const cas = Array.from({ length: 1 + next(5) }, () => casNumber(next(4000)));
  const field = <T>(value: T) => ({ value, place: { page: 1, box: { x: 72, y: 90, width: 200, height: 12 }, quote: String(value) }, confidence: 0.95, because: null, origin: 'read' as const });
  const codes = ['H315', 'H317', 'H319', 'H335', 'H226', 'H302', 'H411'].filter(() => next(3) === 0);
  const fields: SheetFields = {
    productName: field(name),
    supplier: field(supplier),
    language: field('en'),
    revisedOn: field('2024-03-18'),
    signalWord: field(next(2) ? 'warning' : 'danger'),
    hazardCodes: codes.map((code) => field(code)),
    precautionaryCodes: ['P261', 'P280'].map((code) => field(code)),
    ingredients: cas.map((number) => ({ ...field({ name: `${rareWord(next(13_824))} resin`, cas: number, concentration: '10 - 30 %' }) })),
    limits: [],
    protectionWords: [],
    sections: [],
  };
  const sentence = () => `${pick(starts, next)} ${rareWord(next(13_824))} and ${rareWord(next(13_824))} away from the ${pick(heads, next).toLowerCase()} and the ${pick(parts, next).toLowerCase()}.`;
  const text = [`${name} is sold by ${supplier}.`, ...(index % 2 === 0 ? [`Use ${commonWord} at the place of work.`] : []), ...Array.from({ length: 28 }, sentence)].join('\n');
  return { sheet: { id, name, supplier, cas, text }, row: { id, fileName: `sheet-${index}.pdf`, fields, language: 'en', age: index } };
}
