import { type SheetCorrection } from '#shared/corrections';
import { dayOf, localDateOf } from '../../pieces/dates';

export const fieldNames: Readonly<Record<SheetCorrection['field'], string>> = { productName: 'Product', supplier: 'Supplier', revisedOn: 'Revised' };
const subjects: Readonly<Record<SheetCorrection['field'], string>> = { productName: 'the product’s name', supplier: 'the supplier’s name', revisedOn: 'the revision date' };

/** The rule as a sentence: what anyone can check on the page. */
export function ruleWords({ field, rule }: Pick<SheetCorrection, 'field' | 'rule'>): string {
  if (rule.kind === 'spelling') return `What is read as “${rule.readValue}” is written “${rule.value}”.`;
  const place = rule.where === 'same-line' ? 'after' : 'in the line below';
  const order = rule.isDayFirst === null ? '' : rule.isDayFirst ? ', with the day first' : ', with the month first';
  return `${capital(subjects[field])} stands ${place} “${rule.label}”${order}.`;
}

/** "your correction of 3 Dec 2026 on part-c.pdf" */
export const sourceWords = ({ isYours, correctedBy, correctedAt, fileName }: SheetCorrection): string => `${isYours ? 'your' : `${correctedBy}’s`} correction of ${dayOf(localDateOf(correctedAt))} on ${fileName}`;

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
