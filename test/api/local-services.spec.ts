import { afterAll, beforeAll, describe, expect, it } from '@jest/globals';
import { GetObjectCommand, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { randomBytes, randomUUID } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import pg from 'pg';

/** The stand-ins themselves: what everything else in test/api leans on. */
const environment = (name: string) => process.env[name] ?? '';

describe('the database roles', () => {
  const superuser = new pg.Client({ connectionString: environment('TEST_SUPERUSER_DATABASE_URL') });
  beforeAll(() => superuser.connect());
  afterAll(() => superuser.end());

  it.each(['kneeboard_owner', 'kneeboard_app', 'kneeboard_search', 'kneeboard_door'])('%s has no right beyond its own', async (role) => {
    const { rows } = await superuser.query('select rolsuper, rolbypassrls, rolcreaterole, rolcreatedb, rolreplication from pg_roles where rolname = $1', [role]);
    expect(rows).toEqual([{ rolsuper: false, rolbypassrls: false, rolcreaterole: false, rolcreatedb: false, rolreplication: false }]);
  });

  it('let the owner hand functions to the two that cannot sign in, and the app to nobody', async () => {
    const { rows } = await superuser.query(`select m.rolname member, array_agg(r.rolname::text order by r.rolname) roles from pg_auth_members a
      join pg_roles m on m.oid = a.member join pg_roles r on r.oid = a.roleid where m.rolname like 'kneeboard%' group by 1`);
    expect(rows).toEqual([{ member: 'kneeboard_owner', roles: ['kneeboard_door', 'kneeboard_search'] }]);
    const { rows: doors } = await superuser.query(`select rolname from pg_roles where rolname like 'kneeboard%' and not rolcanlogin order by 1`);
    expect(doors.map(({ rolname }) => rolname)).toEqual(['kneeboard_door', 'kneeboard_search']);
  });

  it('keep the app from making or owning anything', async () => {
    const { rows } = await superuser.query(`select count(*)::int owned from pg_class where relowner = 'kneeboard_app'::regrole`);
    expect(rows).toEqual([{ owned: 0 }]);
    const app = new pg.Client({ connectionString: environment('TEST_APP_DATABASE_URL') });
    await app.connect();
    try {
      // 42501 insufficient_privilege: PostgreSQL manual, appendix A.
      await expect(app.query('create table mine ()')).rejects.toMatchObject({ code: '42501' });
      await expect(app.query('create temporary table mine ()')).rejects.toMatchObject({ code: '42501' });
      await expect(app.query('set role kneeboard_door')).rejects.toMatchObject({ code: '42501' });
    } finally {
      await app.end();
    }
  });

  it('speak UTF-8 and UTC', async () => {
    const { rows } = await superuser.query(`select getdatabaseencoding() encoding, current_setting('timezone') timezone`);
    expect(rows).toEqual([{ encoding: 'UTF8', timezone: 'UTC' }]);
  });

  it('want a password', async () => {
    const url = new URL(environment('TEST_APP_DATABASE_URL'));
    url.password = 'wrong';
    // 28P01 invalid_password: PostgreSQL manual, appendix A.
    await expect(new pg.Client({ connectionString: url.href }).connect()).rejects.toMatchObject({ code: '28P01' });
  });
});

it('the bucket gives back the bytes it was given', async () => {
  const client = new S3Client({
    endpoint: environment('TEST_S3_ENDPOINT'),
    region: 'us-east-1',
    forcePathStyle: true,
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    credentials: { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' },
  });
  const [Key, bytes] = [`probe/${randomUUID()}`, randomBytes(100_000)];
  await client.send(new PutObjectCommand({ Bucket: environment('TEST_S3_BUCKET'), Key, Body: bytes, ContentLength: bytes.length }));
  const { Body } = await client.send(new GetObjectCommand({ Bucket: environment('TEST_S3_BUCKET'), Key }));
  expect(Buffer.from((await Body?.transformToByteArray()) ?? []).equals(bytes)).toBe(true);
  client.destroy();
});

it('a mail that was sent lies in the mail folder, whole', async () => {
  const subject = `Probe ${randomUUID()}`;
  const transport = createTransport(`smtp://127.0.0.1:${environment('TEST_SMTP_PORT')}`);
  await transport.sendMail({ from: 'kneeboard@marrow-slate.example', to: 'officer@marrow-slate.example', subject, text: 'Two lines\nof text.' });
  transport.close();
  const folder = environment('TEST_MAIL_FOLDER');
  const mails = readdirSync(folder).filter((name) => name.endsWith('.eml')).map((name) => readFileSync(join(folder, name), 'utf8'));
  expect(mails.filter((mail) => mail.includes(`Subject: ${subject}`) && mail.includes('of text.'))).toHaveLength(1);
});
