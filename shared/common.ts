import * as z from 'zod';

// A strict CSP forbids compiled parsers: zod must not probe for `Function`.
z.config({ jitless: true });

/** Written small: two spellings of one id would slip past every comparison outside the database. */
export const Id = z.uuid().toLowerCase();
// Years before this are slips of the keyboard, and the database has no year 0.
const firstYear = '1700';
/** Local calendar date, ISO. */
export const LocalDate = z.iso.date().refine((date) => date >= firstYear, 'Check the year.');
/** Instant, ISO with offset. */
export const Instant = z.iso.datetime({ offset: true }).refine((instant) => instant >= firstYear, 'Check the year.');
export const Sha256 = z.string().regex(/^[0-9a-f]{64}$/);
/** A mark, not only what nobody sees: a zero-width space states nothing, and names nobody. */
const somethingVisible = /(?![\u115f\u1160\u2800\u3164\uffa0])[\p{L}\p{N}\p{P}\p{S}]/u;
/** One line a person types: trimmed, no control characters, no halves of a character pair (the database refuses those). */
export const Line = (max: number) =>
  z
    .string()
    .trim()
    .max(max, `Use at most ${max} characters.`)
    .regex(somethingVisible, 'Fill this in.')
    .regex(/^[^\p{Cc}\p{Cs}\p{Zl}\p{Zp}\u202a-\u202e\u2066-\u2069]*$/u, 'Remove control characters.');
/** Several lines; line breaks and tabs may stay. */
export const Paragraph = (max: number) =>
  z
    .string()
    .trim()
    .max(max, `Use at most ${max} characters.`)
    .regex(/^(?:[^\p{Cc}\p{Cs}\u202a-\u202e\u2066-\u2069]|[\n\r\t])*$/u, 'Remove control characters.')
    .refine((text) => text === '' || somethingVisible.test(text), 'Fill this in.');
/** What a person looks for. */
export const SearchText = z.string().max(100).regex(/^[^\p{Cc}\p{Cs}]*$/u, 'Remove control characters.');

export const Language = z.enum(['en', 'es']);
export const Role = z.enum(['owner', 'safety-officer', 'crew-lead', 'auditor']);
export type Role = z.infer<typeof Role>;
export const roles = Role.options;
/** Role in words, as pages show it. */
export const roleNames: Record<Role, string> = {
  owner: 'Owner',
  'safety-officer': 'Safety officer',
  'crew-lead': 'Crew lead',
  auditor: 'Auditor',
};

/** Keyset paging: pass `next` back as `after`. */
export const PageQuery = z.strictObject({
  // A cursor holds sort keys, among them names of 200 characters.
  after: z.string().max(2000).optional(),
  limit: z.coerce.number().int().min(1, 'Ask for at least 1.').max(100, 'Ask for at most 100.').default(50),
});
export const pageOf = <T extends z.ZodType>(item: T) => z.object({ items: z.array(item), next: z.string().nullable() });
export interface Page<T> {
  readonly items: T[];
  readonly next: string | null;
}

/** Every editable thing carries the version it was read at; edits send it back as If-Match. */
export const Version = z.number().int().min(1);

/** RFC 9457 problem details. */
export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string().optional(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  retryAfterSeconds: z.number().optional(),
  /** With a conflict: what is stored now. */
  current: z.unknown().optional(),
});
export type Problem = z.infer<typeof Problem>;
