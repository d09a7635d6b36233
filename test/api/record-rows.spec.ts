import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import pg from 'pg';
import { type ChecklistText } from '#compliance';
import { makeOrganisation, type Organisation } from '#test/support/organisation';
import { ok } from '#test/support/call';
import { testEnvironment } from '#test/support/environment';
import { startService, type Service } from '#test/support/service';

/** F28, beyond the log itself: a database superuser changes what pages show and leaves the log alone. */
let service: Service;
let organisation: Organisation;
let superuser: pg.Client;
const check = () => ok(organisation.auditor.agent, 'checkRecord');

beforeAll(async () => {
  service = await startService();
  organisation = await makeOrganisation(service);
  superuser = new pg.Client({ connectionString: testEnvironment('TEST_SUPERUSER_DATABASE_URL') });
  await superuser.connect();
  // Triggers stand above policies and above the superuser, but not above one who turns them off.
  await superuser.query('SET session_replication_role = replica');
  const { officer, lead } = organisation;
  const crew = (await organisation.person('Marisol Tena', { language: 'es' })).id;
  const kit = await organisation.kit();
  const day = await organisation.publishedDay({ crew: [crew], kits: [kit.id] });
  const tablet = await organisation.tablet();
  const text = JSON.parse((await ok(officer.agent, 'readText', { params: { versionId: day.version.id, language: 'en' } })).toString()) as ChecklistText;
  const critical = text.morning.find((line) => line.isCritical)?.id;
  await tablet.setPin(lead.personId);
  await tablet.deliverAll([
    // Ids in capitals, an instant with an offset and half a character pair say the same as what the database gives back.
    await tablet.signed(day.version, lead.personId, { personId: lead.personId.toUpperCase(), capturedAt: '2026-12-01T05:25:00.123-06:00' }),
    tablet.couldNotSign(day.version, crew, { reason: 'other', note: 'half a pair: \ud800' }),
    await tablet.briefing(day.version, lead.personId, text.morning.map(({ id }) => ({ lineId: id, answer: id === critical ? 'no' : 'yes', note: null }))),
  ]);
  await ok(officer.agent, 'giveStartPin', { params: { personId: crew } });
  const [action] = (await ok(officer.agent, 'listActions')).items;
  await ok(officer.agent, 'resolveAction', { params: { actionId: action?.id ?? '' }, version: action?.version, body: { evidence: 'Looked at it together.' } });
  await ok(officer.agent, 'signBasis', {
    params: { shiftId: day.shift.id },
    body: { taskKind: 'shot-blasting', kind: 'air-samples', exposureMicrogramsPerM3: 38.25, conditions: 'Closed blaster with its collector.', endsOn: '2099-01-31', interimApf: null, typedName: officer.name },
  });
});
afterAll(async () => {
  await superuser.end();
  await service.stop();
});

/** Changes rows of the organisation, looks at what the check says, and puts them back. */
async function after(table: string, change: string): Promise<{ isGood: boolean; trouble: string | null }> {
  const saved = `saved_${table}`;
  await superuser.query(`DROP TABLE IF EXISTS ${saved}`);
  await superuser.query(`CREATE TEMP TABLE ${saved} AS SELECT * FROM ${table} WHERE organisation_id = '${organisation.id}'`);
  try {
    await superuser.query(change.replaceAll('OWN', `organisation_id = '${organisation.id}'`));
    return await check();
  } finally {
    await superuser.query(`DELETE FROM ${table} WHERE organisation_id = '${organisation.id}'`);
    await superuser.query(`INSERT INTO ${table} SELECT * FROM ${saved}`);
  }
}

it('finds nothing where nothing was changed', async () => {
  expect(await check()).toMatchObject({ isGood: true, trouble: null });
});

describe.each<[string, string, string]>([
  ['acknowledgements', `UPDATE acknowledgements SET person_name = 'Somebody Else' WHERE OWN AND kind = 'signed'`, 'the person’s name'],
  ['acknowledgements', `UPDATE acknowledgements SET person_id = (SELECT id FROM people WHERE OWN AND name = 'Ines Halloran') WHERE OWN AND kind = 'signed'`, 'the person'],
  ['acknowledgements', `UPDATE acknowledgements SET job_name = 'Another hall' WHERE OWN`, 'the job’s name'],
  ['acknowledgements', `UPDATE acknowledgements SET shift_date = shift_date - 1 WHERE OWN`, 'the shift’s date'],
  ['acknowledgements', `UPDATE acknowledgements SET version_number = 2 WHERE OWN`, 'the version’s number'],
  ['acknowledgements', `UPDATE acknowledgements SET kind = 'paper' WHERE OWN AND kind = 'could-not-sign'`, 'the kind'],
  ['acknowledgements', `UPDATE acknowledgements SET language = 'es' WHERE OWN AND kind = 'signed'`, 'the language'],
  ['acknowledgements', `UPDATE acknowledgements SET text_sha256 = repeat('a', 64) WHERE OWN`, 'the text that was signed'],
  ['acknowledgements', `UPDATE acknowledgements SET reason = NULL WHERE OWN AND kind = 'could-not-sign'`, 'the reason'],
  ['acknowledgements', `UPDATE acknowledgements SET pin_state = 'not-set' WHERE OWN AND kind = 'signed'`, 'whether the PIN was right'],
  ['acknowledgements', `UPDATE acknowledgements SET was_superseded = true WHERE OWN`, 'whether a newer version was out'],
  ['acknowledgements', `UPDATE acknowledgements SET captured_at = captured_at - interval '1 ms' WHERE OWN`, 'the time on the tablet'],
  ['acknowledgements', `UPDATE acknowledgements SET received_at = received_at - interval '1 day' WHERE OWN`, 'the time of arrival'],
  ['acknowledgements', `UPDATE acknowledgements SET clock_offset_seconds = 900 WHERE OWN`, 'the tablet’s clock'],
  ['acknowledgements', `UPDATE acknowledgements SET tablet_name = 'Tablet 2' WHERE OWN`, 'the tablet’s name'],
  ['acknowledgements', `UPDATE acknowledgements SET strokes = replace(strokes, '5.5', '5.6') WHERE OWN AND kind = 'signed'`, 'the drawn signature'],
  ['acknowledgements', `UPDATE acknowledgements SET entry_index = entry_index + 100 WHERE OWN`, 'its number'],
  ['acknowledgements', `DELETE FROM acknowledgements WHERE OWN AND kind = 'could-not-sign'`, 'missing from the history'],
  ['acknowledgements', `INSERT INTO acknowledgements SELECT organisation_id, gen_random_uuid(), version_id, version_number, job_id, job_name, shift_id, shift_date, person_id, person_name, 'paper', language, text_sha256, reason, strokes, pin_state, was_superseded, captured_at, received_at, clock_offset_seconds, tablet_id, tablet_name, delivery_id, entry_index + 1000 FROM acknowledgements WHERE OWN AND kind = 'signed'`, 'never recorded'],
  ['recordlog_heads', `UPDATE recordlog_heads SET acknowledgement_count = 7 WHERE OWN`, 'total says 7'],
  ['deliveries', `UPDATE deliveries SET bytes = bytes || ' ' WHERE OWN`, 'what the tablet sent'],
  ['checklist_texts', `UPDATE checklist_texts SET bytes = convert_to(replace(convert_from(bytes, 'UTF8'), 'a', 'e'), 'UTF8') WHERE OWN AND language = 'es'`, 'text.es.json'],
  ['checklist_texts', `UPDATE checklist_texts SET bytes = convert_to('{}', 'UTF8'), sha256 = encode(sha256(convert_to('{}', 'UTF8')), 'hex') WHERE OWN AND language = 'en'`, 'text.en.json'],
  ['checklist_texts', `DELETE FROM checklist_texts WHERE OWN AND language = 'es'`, 'text.es.json'],
  ['checklist_versions', `UPDATE checklist_versions SET checklist = checklist || ' ' WHERE OWN`, 'checklist.json'],
  ['checklist_versions', `UPDATE checklist_versions SET facts = facts || ' ' WHERE OWN`, 'facts.json'],
  ['checklist_versions', `UPDATE checklist_versions SET published_by_name = 'Nobody' WHERE OWN`, 'publishedByName'],
  ['checklist_people', `DELETE FROM checklist_people WHERE OWN AND name = 'Marisol Tena'`, 'whom it asks to sign'],
  ['answer_sets', `UPDATE answer_sets SET answers = replace(answers, '"no"', '"yes"') WHERE OWN`, 'the answers'],
  ['answer_sets', `UPDATE answer_sets SET pin_state = 'not-set' WHERE OWN`, 'whether the PIN was right'],
  ['pin_events', `UPDATE pin_events SET by_name = 'Somebody Else' WHERE OWN AND event = 'set'`, 'who vouched for it'],
  ['pin_events', `UPDATE pin_events SET proof = 'lead' WHERE OWN AND event = 'set'`, 'who vouched for it'],
  ['pin_events', `DELETE FROM pin_events WHERE OWN AND event = 'start-pin-given'`, 'missing from the list of PINs'],
  ['pins', `UPDATE pins SET proof = 'lead' WHERE OWN`, 'The PIN of Dov Lindqvist is not the one'],
  ['pins', `UPDATE pins SET digest = repeat('a', 64) WHERE OWN`, 'The PIN of Dov Lindqvist is not the one'],
  ['pins', `UPDATE pins SET set_at = set_at - interval '1 day' WHERE OWN`, 'The PIN of Dov Lindqvist is not the one'],
  ['start_pins', `UPDATE start_pins SET expires_at = expires_at + interval '1 year' WHERE OWN`, 'The start PIN of Marisol Tena is not the one'],
  ['start_pins', `UPDATE start_pins SET given_by_name = 'Somebody Else' WHERE OWN`, 'The start PIN of Marisol Tena is not the one'],
  ['start_pins', `UPDATE start_pins SET person_id = (SELECT id FROM people WHERE OWN AND name = 'Hazel Marrow') WHERE OWN`, 'is not the one that the list of PINs records as given last'],
  ['corrective_actions', `UPDATE corrective_actions SET text = 'Nothing to see' WHERE OWN`, 'the text'],
  ['corrective_actions', `UPDATE corrective_actions SET evidence = 'A new hose was fitted.' WHERE OWN AND evidence IS NOT NULL`, 'the evidence'],
  ['corrective_actions', `UPDATE corrective_actions SET resolved_at = now(), resolved_by = 'Hazel Marrow', evidence = 'Done' WHERE OWN AND resolved_at IS NULL`, 'never recorded'],
  ['corrective_actions', `UPDATE corrective_actions SET resolved_at = NULL, resolved_by = NULL, evidence = NULL WHERE OWN`, 'the evidence'],
  ['exposure_bases', `UPDATE exposure_bases SET exposure_micrograms_per_m_3 = 24 WHERE OWN`, 'exposureMicrogramsPerM3'],
  ['revisions', `UPDATE revisions SET fields = jsonb_set(fields, '{hazardCodes}', '[]') WHERE OWN AND state = 'confirmed'`, 'the confirmed values'],
  ['revisions', `UPDATE revisions SET state = 'read' WHERE OWN AND state = 'confirmed'`, 'state'],
  ['recordlog_records', `DELETE FROM recordlog_records WHERE OWN`, 'its record is gone'],
  ['recordlog_entries', `UPDATE recordlog_entries SET subject_id = gen_random_uuid() WHERE OWN AND kind = 'acknowledgement'`, 'filed under another record'],
])('%s: %s', (table, change, named) => {
  it(`is named: ${named}`, async () => {
    expect(await after(table, change)).toMatchObject({ isGood: false, trouble: expect.stringContaining(named) });
  });
});

it('names a PIN that was reset and is there again', async () => {
  const lead = organisation.lead.personId;
  const saved = `CREATE TEMP TABLE pin_before AS SELECT * FROM pins WHERE person_id = '${lead}'`;
  await superuser.query(saved);
  await ok(organisation.officer.agent, 'resetPin', { params: { personId: lead } });
  expect(await check()).toMatchObject({ isGood: true });
  await superuser.query('INSERT INTO pins SELECT * FROM pin_before');
  expect(await check()).toMatchObject({ isGood: false, trouble: expect.stringContaining('The PIN of Dov Lindqvist') });
  await superuser.query(`DELETE FROM pins WHERE person_id = '${lead}'`);
});

it('is in order again when all was put back', async () => {
  expect(await check()).toMatchObject({ isGood: true, trouble: null });
});

describe('a log that was written anew, with checkpoints to fit', () => {
  it('is held against the checkpoint that left the database', async () => {
    const { checkpoint } = await check();
    const key = `${organisation.id}/checkpoints/${String(checkpoint?.size).padStart(12, '0')}-kept.txt`;
    await service.deps.storage.putText(key, checkpoint?.note ?? '');
    expect(await check()).toMatchObject({ isGood: true });
    const tables = ['recordlog_entries', 'recordlog_records', 'recordlog_checkpoints', 'recordlog_heads'];
    for (const table of tables) await superuser.query(`CREATE TEMP TABLE kept_${table} AS SELECT * FROM ${table} WHERE organisation_id = '${organisation.id}'`);
    const clear = async () => {
      for (const table of tables) await superuser.query(`DELETE FROM ${table} WHERE organisation_id = '${organisation.id}'`);
    };
    await clear();
    expect(await check()).toMatchObject({ isGood: false, trouble: expect.stringContaining('kept outside the database') });
    // All but the last entry, and no checkpoint: the service signs a new one of what it finds.
    await superuser.query(`INSERT INTO recordlog_entries SELECT * FROM kept_recordlog_entries WHERE index < (SELECT max(index) FROM kept_recordlog_entries)`);
    await superuser.query(`INSERT INTO recordlog_records SELECT * FROM kept_recordlog_records WHERE index < (SELECT max(index) FROM kept_recordlog_entries)`);
    await superuser.query(`INSERT INTO recordlog_heads SELECT organisation_id, size - 1, last_recorded_at, acknowledgement_count FROM kept_recordlog_heads`);
    expect(await check()).toMatchObject({ isGood: false, trouble: expect.stringMatching(/covers \d+ entries, this log only \d+/) });
    await clear();
    for (const table of tables) await superuser.query(`INSERT INTO ${table} SELECT * FROM kept_${table}`);
    expect(await check()).toMatchObject({ isGood: true });
  });
});
