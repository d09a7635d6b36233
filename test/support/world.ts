import pg from 'pg';
import { testEnvironment } from './environment';
import { ok } from './call';
import { makeOrganisation, type Organisation, type PublishedDay } from './organisation';
import { type Service } from './service';
import { type TestTablet } from './tablet';

/** An organisation with one of everything, and the ids by the names the contract's addresses use. */
export interface World {
  readonly organisation: Organisation;
  readonly tablet: TestTablet;
  readonly day: PublishedDay;
  readonly ids: Readonly<Record<string, string>>;
}

export async function makeWorld(service: Service): Promise<World> {
  const organisation = await makeOrganisation(service);
  const { officer, lead, auditor } = organisation;
  const kit = await organisation.kit();
  const product = kit.parts[0]?.productId ?? '';
  const sheets = await ok(officer.agent, 'listSheets');
  const crew = await organisation.person('Marisol Tena', { language: 'es' });
  const day = await organisation.publishedDay({ crew: [crew.id], kits: [kit.id] });
  const tablet = await organisation.tablet();
  const { receipts } = await tablet.deliverAll([await tablet.signed(day.version, lead.personId), tablet.couldNotSign(day.version, crew.id)]);
  const actions = await ok(officer.agent, 'listActions');
  const request = await ok(officer.agent, 'askSupplier', { body: { productId: product, email: 'sheets@northlode.example', message: 'Please send the current sheet.', language: 'en' } });
  // A checkpoint, so that there is a receipt to take.
  await ok(auditor.agent, 'checkRecord');
  return {
    organisation,
    tablet,
    day,
    ids: {
      personId: crew.id,
      leadId: lead.personId,
      tabletId: tablet.id,
      equipmentId: day.grinder.id,
      collectorId: day.collector.id,
      revisionId: sheets.items[0]?.id ?? '',
      productId: product,
      kitId: kit.id,
      jobId: day.job.id,
      shiftId: day.shift.id,
      versionId: day.version.id,
      actionId: actions.items[0]?.id ?? '',
      requestId: request.id,
      acknowledgementId: receipts[0]?.acknowledgementId ?? '',
      language: 'en',
    },
  };
}

/** What is stored for these organisations, table by table, as a superuser sees it: to show that a refusal left no trace. */
export function storedRows(): { of(organisationIds: readonly string[]): Promise<Record<string, string>>; end(): Promise<void> } {
  const pool = new pg.Pool({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL'), max: 2 });
  let statement: Promise<string> | undefined;
  const build = async (): Promise<string> => {
    const { rows } = await pool.query<{ name: string }>(`SELECT table_name AS name FROM information_schema.columns WHERE table_schema = 'public' AND column_name = 'organisation_id' ORDER BY 1`);
    return rows
      // That a tablet was heard is no change.
      .map(({ name }) => `SELECT '${name}' AS name, count(*) || ' ' || coalesce(md5(string_agg(row, '' ORDER BY row)), '') AS rows FROM (SELECT (to_jsonb(t) - 'last_heard_at')::text AS row FROM public.${name} t WHERE organisation_id = ANY($1::uuid[])) r`)
      .join(' UNION ALL ');
  };
  return {
    async of(organisationIds) {
      const { rows } = await pool.query<{ name: string; rows: string }>(await (statement ??= build()), [organisationIds]);
      return Object.fromEntries(rows.map(({ name, rows: found }) => [name, found]));
    },
    end: () => pool.end(),
  };
}
