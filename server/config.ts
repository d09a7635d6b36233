import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import * as z from 'zod';

const Environment = z.object({
  DATABASE_URL: z.url(),
  S3_ENDPOINT: z.url().optional(),
  S3_REGION: z.string().default('us-east-1'),
  S3_BUCKET: z.string().default('kneeboard'),
  S3_ACCESS_KEY_ID: z.string().optional(),
  S3_SECRET_ACCESS_KEY: z.string().optional(),
  SMTP_URL: z.url().optional(),
  MAIL_FROM: z.string().default('Kneeboard <kneeboard@localhost>'),
  PORT: z.coerce.number().int().min(0).max(65535).default(4380),
  HOST: z.string().default('127.0.0.1'),
  PUBLIC_URL: z.url().optional(),
  TRUST_PROXY: z.string().optional(),
  KNEEBOARD_ROLE: z.enum(['web', 'worker', 'both']).default('both'),
  KNEEBOARD_KEYS: z.string(),
  WEB_ROOT: z.string().default('dist/web'),
  SHEET_READER_ENTRY: z.string().default('dist/server/sheet-reader.mjs'),
  VERIFIER: z.string().default('server/recordlog/verify.mjs'),
  /** Longest time for reading one sheet; a killed worker's sheet is taken again after half as long again. */
  SHEET_READ_SECONDS: z.coerce.number().int().min(1).max(600).default(40),
  /** The same for a sheet read from pictures of its pages. */
  SHEET_OCR_SECONDS: z.coerce.number().int().min(1).max(3600).default(600),
  UPLOAD_FOLDER: z.string().optional(),
  /** How long a mail waits before it is tried again while the mail server is away. */
  MAIL_RETRY_SECONDS: z.coerce.number().int().min(1).max(3600).default(30),
  CHECKPOINT_SECONDS: z.coerce.number().positive().default(60),
  LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info'),
});

/** Secrets are files of one folder outside the database, so that a copy of the database alone signs nothing and tests no PIN. */
export interface Keys {
  readonly sessionSecret: string;
  readonly pinPepper: string;
  /** Ed25519, PKCS#8 PEM: signs checkpoints. */
  readonly logSigningKey: string;
  /** P-256, PKCS#8 PEM: opens sealed PINs. */
  readonly pinSealingKey: string;
}
export type Config = z.infer<typeof Environment> & { keys: Keys; publicUrl: string };

/** Reads the whole configuration from the environment; a missing or wrong variable is named. */
export function readConfig(environment: NodeJS.ProcessEnv): Config {
  const parsed = Environment.safeParse(environment);
  if (!parsed.success) throw new Error(`The environment is not complete: ${parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`).join('; ')}`);
  const key = (name: string) => readFileSync(join(parsed.data.KNEEBOARD_KEYS, name), 'utf8').trim();
  return {
    ...parsed.data,
    publicUrl: parsed.data.PUBLIC_URL ?? `http://${parsed.data.HOST}:${parsed.data.PORT}`,
    keys: { sessionSecret: key('session-secret'), pinPepper: key('pin-pepper'), logSigningKey: key('log-signing-key.pem'), pinSealingKey: key('pin-sealing-key.pem') },
  };
}
