import * as z from 'zod';

/** One calculation of the command line: what goes in (strict, with units in the descriptions), an example that runs, and what comes out. */
export interface Calculation {
  readonly name: string;
  readonly summary: string;
  readonly schema: z.ZodType;
  readonly example: unknown;
  run(input: unknown): unknown;
}

export function calculation<S extends z.ZodType>(definition: { name: string; summary: string; schema: S; example: z.input<S>; run: (input: z.output<S>) => unknown }): Calculation {
  return { ...definition, run: (input) => definition.run(input as z.output<S>) };
}

/** A refused field by name. */
export interface RefusedField {
  readonly field: string;
  readonly message: string;
}

export class RefusedInput extends Error {
  constructor(readonly fields: readonly RefusedField[]) {
    super(fields.map(({ field, message }) => `${field}: ${message}`).join('\n'));
  }
}

/** Parses strictly; every unknown, missing or impossible field is refused by its name. */
export function parseInput(schema: z.ZodType, input: unknown): unknown {
  const result = schema.safeParse(input);
  if (result.success) return result.data;
  throw new RefusedInput(result.error.issues.flatMap(fieldsOf));
}

function fieldsOf(issue: z.core.$ZodIssue): RefusedField[] {
  if (issue.code === 'unrecognized_keys') return issue.keys.map((key) => ({ field: pathOf([...issue.path, key]), message: 'unknown field' }));
  return [{ field: pathOf(issue.path), message: issue.message }];
}

function pathOf(path: readonly PropertyKey[]): string {
  const text = path.map((part) => (typeof part === 'number' ? `[${part}]` : `.${String(part)}`)).join('');
  return text.replace(/^\./, '') || 'input';
}

/** A calendar day that exists. */
export const day = z.iso.date();
export const minutes = z.number().min(0).max(1440).describe('minutes, 0 to 1440');
export const jurisdictionId = z.string().min(1).describe('place whose law holds, for example "us-federal", "us-california", "great-britain"');

/** null or left out: nobody has said. */
export const unsaid = <T extends z.ZodType>(schema: T) => schema.nullable().default(null as z.output<T> | null as never);
