import { describe, expect, it } from '@jest/globals';
import { getTableColumns, is } from 'drizzle-orm';
import { PgTable } from 'drizzle-orm/pg-core';
import * as z from 'zod';
import * as acknowledgements from '#drizzle/schema/acknowledgements';
import * as checklists from '#drizzle/schema/checklists';
import * as door from '#drizzle/schema/door';
import * as jobs from '#drizzle/schema/jobs';
import * as library from '#drizzle/schema/library';
import * as organisations from '#drizzle/schema/organisations';
import * as people from '#drizzle/schema/people';
import * as recordlog from '#drizzle/schema/recordlog';
import * as search from '#drizzle/schema/search';
import * as sheets from '#drizzle/schema/sheets';
import * as tablets from '#drizzle/schema/tablets';
import { endpoints, type Endpoint } from '#shared/endpoints';

/** Names under which a Social Security number, a birth date or what a clinician found could be asked or kept. */
const PRIVATE = /social.?sec|(^|[^a-z])ssn|birth|\bdob\b|diagnos|finding|medicalResult|medical_result|x.?ray|spirometr|lungFunction|symptom|disease|illness|healthCondition/i;

const tables = [acknowledgements, checklists, door, jobs, library, organisations, people, recordlog, search, sheets, tablets].flatMap((schema) => Object.entries(schema)).filter((entry): entry is [string, PgTable] => is(entry[1], PgTable));

/** Every name of a field in a JSON schema, at any depth. */
function fieldsOf(schema: unknown): readonly string[] {
  if (Array.isArray(schema)) return schema.flatMap(fieldsOf);
  if (typeof schema !== 'object' || schema === null) return [];
  return Object.entries(schema).flatMap(([key, value]) => [...(key === 'properties' && typeof value === 'object' && value !== null ? Object.keys(value) : []), ...fieldsOf(value)]);
}
const schemaOf = (schema: z.ZodType): unknown => z.toJSONSchema(schema, { unrepresentable: 'any', io: 'input' });

describe('[SIL-21] [SIL-23] what is never asked and never stored (84 FR 21416 of 2019 dropped the number; 1926.1153(h)(6), sample opinion read: no findings to the employer)', () => {
  it('has no column for it in any table (trap 15)', () => {
    const columns = tables.flatMap(([name, table]) => Object.keys(getTableColumns(table)).map((column) => `${name}.${column}`));
    expect(columns.length).toBeGreaterThan(100);
    expect(columns.filter((name) => PRIVATE.test(name.split('.')[1] ?? ''))).toEqual([]);
  });

  it.each(Object.entries(endpoints).map(([name, endpoint]): [string, Endpoint] => [name, endpoint]))('%s neither asks nor answers it (trap 15)', (_name, { body, query, answer }) => {
    const schemas = [body, query, answer].filter((each): each is z.ZodType => typeof each === 'object');
    expect(schemas.flatMap((schema) => fieldsOf(schemaOf(schema))).filter((field) => PRIVATE.test(field))).toEqual([]);
  });

  it('would notice one', () => {
    expect(fieldsOf(schemaOf(z.strictObject({ person: z.strictObject({ socialSecurityNumber: z.string() }) }))).filter((field) => PRIVATE.test(field))).toEqual(['socialSecurityNumber']);
    for (const name of ['ssn', 'birthDate', 'xrayFinding', 'spirometry', 'dateOfBirth']) expect(PRIVATE.test(name)).toBe(true);
  });
});
