import { signal } from '@angular/core';
import { L_PER_FT3, M2_PER_FT2, M3_PER_H_PER_CFM, MM_PER_INCH } from '#compliance/quantities/units';

/** One unit a quantity may be typed in: `perUnit` is the SI figure of one of it. */
export interface Unit {
  readonly id: string;
  readonly label: string;
  readonly perUnit: number;
}

/** Exact: one US gallon is 231 cubic inches (NIST Handbook 44, appendix C). */
const L_PER_GALLON = (231 * MM_PER_INCH ** 3) / 1e6;

/** First unit of each quantity is the trade's own; the second is SI, as stored. */
export const quantities = {
  area: [
    { id: 'ft2', label: 'ft²', perUnit: M2_PER_FT2 },
    { id: 'm2', label: 'm²', perUnit: 1 },
  ],
  thickness: [
    { id: 'in', label: 'in', perUnit: MM_PER_INCH },
    { id: 'mm', label: 'mm', perUnit: 1 },
  ],
  room: [
    { id: 'ft3', label: 'ft³', perUnit: L_PER_FT3 / 1000 },
    { id: 'm3', label: 'm³', perUnit: 1 },
  ],
  mix: [
    { id: 'gal', label: 'gal', perUnit: L_PER_GALLON },
    { id: 'l', label: 'L', perUnit: 1 },
    { id: 'ft3', label: 'ft³', perUnit: L_PER_FT3 },
  ],
  airflow: [
    { id: 'cfm', label: 'cfm', perUnit: M3_PER_H_PER_CFM },
    { id: 'm3h', label: 'm³/h', perUnit: 1 },
  ],
} as const satisfies Record<string, readonly [Unit, ...Unit[]]>;
export type Quantity = keyof typeof quantities;

/** By quantity, as the session brought them: they belong to the person, not to the machine. */
const kept = signal<Readonly<Record<string, string>>>({});
export const useUnits = (units: Readonly<Record<string, string>>): void => kept.set(units);

/** The unit this person last typed this quantity in. */
export function preferredUnit(quantity: Quantity): Unit {
  const wanted = kept()[quantity];
  return quantities[quantity].find((unit) => unit.id === wanted) ?? quantities[quantity][0];
}

/** Shown from now on; whether it changed. */
export function preferUnit(quantity: Quantity, unit: Unit): boolean {
  if (kept()[quantity] === unit.id) return false;
  kept.update((units) => ({ ...units, [quantity]: unit.id }));
  return true;
}

/** "38,000": four figures that count, so that 600 ft² stored as square metres comes back as 600. */
export function figure(value: number): string {
  const whole = Math.round(value);
  if (Math.abs(value - whole) < 1e-6 * Math.max(1, Math.abs(value))) return whole.toLocaleString('en-US', { useGrouping: true });
  return value.toLocaleString('en-US', { maximumSignificantDigits: 4 });
}

/** "1/4", "1 3/8": inches are said in eighths where they are eighths. */
function inches(value: number): string {
  const eighths = Math.round(value * 8);
  if (eighths === 0 || eighths % 8 === 0 || Math.abs(value * 8 - eighths) > 1e-3) return figure(value);
  const whole = Math.floor(eighths / 8);
  const [top, bottom] = eighths % 4 === 0 ? [1, 2] : eighths % 2 === 0 ? [(eighths % 8) / 2, 4] : [eighths % 8, 8];
  return `${whole > 0 ? `${whole} ` : ''}${top}/${bottom}`;
}

/** A stored SI figure in a unit, as it stands in a field. */
export function inUnit(si: number, unit: Unit): string {
  return unit.id === 'in' ? inches(si / unit.perUnit) : figure(si / unit.perUnit);
}

/** "38,000 ft³", "1/4 in", in the unit this person prefers. */
export function withUnit(quantity: Quantity, si: number): string {
  const unit = preferredUnit(quantity);
  return `${inUnit(si, unit)} ${unit.label}`;
}

/** What a person typed as a number: "38,000", "1/4", "1 1/4", "0.25". NaN when it is none. */
export function numberFrom(text: string): number {
  const trimmed = text.trim().replace(/,(?=\d{3}(?:\D|$))/g, '');
  const fraction = /^(?:(\d+)[ -])?(\d+)\/([1-9]\d*)$/.exec(trimmed);
  if (fraction) return Number(fraction[1] ?? 0) + Number(fraction[2]) / Number(fraction[3]);
  return /^\d*\.?\d+$|^\d+\.$/.test(trimmed) ? Number(trimmed) : NaN;
}
