/** A value that cannot be: negative minutes, NaN, more than 24 hours in a day. `field` names it, so that a form can point at it. */
export class InputError extends RangeError {
  override readonly name = 'InputError';

  constructor(
    readonly field: string,
    message: string,
  ) {
    super(`${field}: ${message}`);
  }
}

/** Minutes in a day: no shift of one person and one date is longer. */
export const MINUTES_PER_DAY = 1_440;

interface Bounds {
  readonly min?: number;
  readonly max?: number;
  /** Exclusive lower bound. */
  readonly above?: number;
}

/** Returns `value` when it is a finite number within the bounds; throws an InputError naming `field` otherwise. */
export function checkNumber(field: string, value: number, { min, max, above }: Bounds = {}): number {
  if (typeof value !== 'number' || !Number.isFinite(value)) throw new InputError(field, 'must be a finite number');
  if (min !== undefined && value < min) throw new InputError(field, `must be at least ${min}`);
  if (above !== undefined && value <= above) throw new InputError(field, `must be more than ${above}`);
  if (max !== undefined && value > max) throw new InputError(field, `must be at most ${max}`);
  return value;
}

/** Minutes of one period within a day: 0 to 1,440. */
export function checkMinutes(field: string, minutes: number): number {
  return checkNumber(field, minutes, { min: 0, max: MINUTES_PER_DAY });
}
