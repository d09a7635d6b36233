import { describe, expect, it } from '@jest/globals';
import { DrizzleQueryError } from 'drizzle-orm/errors';
import { pino } from 'pino';
import { logOptions } from './log';

function logged(error: unknown): string {
  const lines: string[] = [];
  pino({ ...logOptions, level: 'info' }, { write: (line: string) => void lines.push(line) }).error({ err: error }, 'failed');
  return lines.join('');
}

describe('an error in the log', () => {
  const database = Object.assign(new Error('value "251606162742" is out of range for type integer'), { code: '22003', table: 'pins', detail: 'Key (digest)=(5ec7e7) already exists.', where: 'unnamed portal parameter $1 = 5ec7e7' });
  const failed = new DrizzleQueryError('insert into "pins" values ($1, $2)', ['5ec7e7', 'Marisol\nTena, line two'], database);

  it('of a query says which query and why, never with what values', () => {
    const line = logged(failed);
    expect(line).toContain('insert into \\"pins\\"');
    expect(line).toContain('22003');
    expect(line).toContain('out of range for type integer');
    for (const value of ['5ec7e7', 'Marisol', 'line two', '251606162742']) expect(line).not.toContain(value);
  });
  it('keeps where it happened, and the causes behind it', () => {
    const { err } = JSON.parse(logged(new Error('could not be kept', { cause: failed }))) as { err: { message: string; stack: string; cause: { cause: { code: string } } } };
    expect(err.message).toContain('could not be kept');
    expect(err.stack).toContain('log.spec');
    expect(err.cause.cause.code).toBe('22003');
  });
  it('of another kind is as it was', () => {
    expect(logged(new TypeError('x is not a function'))).toContain('x is not a function');
    expect(logged('a word')).toContain('a word');
  });
});
