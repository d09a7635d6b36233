import { type FormArray, type FormGroup, type NonNullableFormBuilder } from '@angular/forms';
import { neededMessage, neededToConfirm, SheetEdit, type SheetFields } from '#shared/sheets';

type Values = ReturnType<typeof valuesOf>;
export type IngredientValue = SheetEdit['ingredients'][number];
export type LimitValue = SheetEdit['limits'][number];
export type ProtectionValue = SheetEdit['protectionWords'][number];

/** Codes as a person types them: in one line, with commas or spaces between. Suffixes (H350i, H360Fd) keep their own spelling. */
export const splitCodes = (text: string): string[] =>
  text
    .split(/[\s,;]+/)
    .filter(Boolean)
    .map((code) => code.replace(/(^|\+)(euh|h|p)(?=\d)/gi, (prefix) => prefix.toUpperCase()));

function valuesOf(fields: SheetFields) {
  return {
    productName: fields.productName?.value ?? null,
    supplier: fields.supplier?.value ?? null,
    language: (fields.language?.value ?? null) as SheetEdit['language'],
    revisedOn: fields.revisedOn?.value ?? null,
    signalWord: fields.signalWord?.value ?? null,
    hazardCodes: fields.hazardCodes.map(({ value }) => value).join(', '),
    precautionaryCodes: fields.precautionaryCodes.map(({ value }) => value).join(', '),
    ingredients: fields.ingredients.map(({ value }) => value),
    limits: fields.limits.map(({ value }) => value),
    protectionWords: fields.protectionWords.map(({ value }) => value),
  };
}

export const ingredientGroup = (builder: NonNullableFormBuilder, { name, cas, concentration }: IngredientValue) =>
  builder.group({ name: builder.control(name), cas: builder.control<string | null>(cas), concentration: builder.control<string | null>(concentration) });
export const limitGroup = (builder: NonNullableFormBuilder, { substance, kind, value, unit }: LimitValue) => builder.group({ substance, kind, value, unit });
export const protectionGroup = (builder: NonNullableFormBuilder, { topic, text }: ProtectionValue) => builder.group({ topic: builder.control(topic), text });

/** The form of one sheet: everything a person can confirm or enter. */
export function sheetForm(builder: NonNullableFormBuilder, fields: SheetFields) {
  const values: Values = valuesOf(fields);
  return builder.group({
    productName: builder.control(values.productName),
    supplier: builder.control(values.supplier),
    language: builder.control(values.language),
    revisedOn: builder.control(values.revisedOn),
    signalWord: builder.control(values.signalWord),
    hazardCodes: builder.control(values.hazardCodes),
    precautionaryCodes: builder.control(values.precautionaryCodes),
    ingredients: builder.array(values.ingredients.map((value) => ingredientGroup(builder, value))),
    limits: builder.array(values.limits.map((value) => limitGroup(builder, value))),
    protectionWords: builder.array(values.protectionWords.map((value) => protectionGroup(builder, value))),
  });
}
export type SheetForm = ReturnType<typeof sheetForm>;

const withCodes = (form: SheetForm) => {
  const value = form.getRawValue();
  return { ...value, hazardCodes: splitCodes(value.hazardCodes), precautionaryCodes: splitCodes(value.precautionaryCodes) };
};

/** What the form holds, checked by the contract; null after putting each message on its control. */
export function checkedEdit(form: SheetForm): SheetEdit | null {
  const parsed = SheetEdit.safeParse(withCodes(form));
  if (parsed.success) return parsed.data;
  for (const issue of parsed.error.issues) {
    const path = issue.path.map(String);
    placeMessage(form, path, issue.message, 'schema');
  }
  return null;
}

/** Marks what is still empty though no sheet can be confirmed without it; whether nothing is. */
export function hasAllNeeded(form: SheetForm): boolean {
  const missing = neededToConfirm.filter((name) => form.controls[name].value === null);
  for (const name of missing) placeMessage(form, [name], neededMessage, 'schema');
  return missing.length === 0;
}

/** Puts a message on the control a path names, or on the row it belongs to; whether one was found. */
export function placeMessage(form: FormGroup | FormArray, path: readonly string[], message: string, kind: 'schema' | 'server'): boolean {
  const steps = path[0] === 'fields' ? path.slice(1) : path;
  for (let length = steps.length; length > 0; length -= 1) {
    const control = form.get(steps.slice(0, length));
    if (!control) continue;
    control.setErrors({ [kind]: message });
    control.markAsTouched();
    return true;
  }
  return false;
}
