import { InputError } from './input-error';
import { addYears, checkDoneOn, type IsoDate } from './iso-date';
import { type Words } from './outcome';
import { met, undecided, unmet, WHO, type Rule, type Verdict } from './rule';
import { type Source } from './source';
import { eachLanguage, words } from './words';

/** One thing that a record, paper or training must hold. */
export interface ContentItem {
  readonly id: string;
  readonly name: Words;
  /** Where it differs from the rule's own source. */
  readonly source?: Source;
}

/** An item by its id, with its name in both languages and its source where that is not the rule's. */
export const item = (id: string, en: string, es: string, source?: Source): ContentItem => ({ id, name: words(en, es), ...(source === undefined ? {} : { source }) });

/** Whether each item is there; null or absent where nobody has looked. */
export interface ContentFacts {
  readonly present: Readonly<Record<string, boolean | null>>;
}

interface Described {
  readonly id: string;
  readonly title: Words;
  readonly source: Source;
  readonly duties: readonly string[];
}

/** A duty to hold certain contents. Lists what is missing by name; what nobody looked for is asked, not assumed. */
export interface ContentsRule extends Rule<ContentFacts> {
  readonly items: readonly ContentItem[];
}

/** Met when every item is there, unmet when one is missing, undecided while one was not looked for. */
export function contentsRule({ whoDecides = WHO.safetyOfficer, items, ...described }: Described & { readonly items: readonly ContentItem[]; readonly whoDecides?: Words }): ContentsRule {
  return { ...described, items, evaluate: ({ present }) => judgeContents(items, present, whoDecides) };
}

function judgeContents(items: readonly ContentItem[], present: ContentFacts['present'], whoDecides: Words): Verdict {
  const strange = Object.keys(present).find((id) => !items.some((item) => item.id === id));
  if (strange !== undefined) throw new InputError(`present.${strange}`, 'is not an item of this rule');
  const inputs = Object.fromEntries(items.map((item) => [item.name.en, present[item.id] ?? null]));
  const missing = items.filter((item) => present[item.id] === false);
  if (missing.length > 0) {
    const names = namesOf(missing);
    return unmet(words(`Missing: ${names.en}.`, `Falta: ${names.es}.`), { inputs, whatWouldChange: words(`Add: ${names.en}.`, `Añada: ${names.es}.`) });
  }
  const open = items.filter((item) => (present[item.id] ?? null) === null);
  if (open.length > 0) {
    const names = namesOf(open);
    return undecided(words(`Nobody has looked for: ${names.en}.`, `Nadie ha revisado: ${names.es}.`), whoDecides, { inputs, whatWouldChange: words('Look, and say yes or no.', 'Revise y diga sí o no.') });
  }
  return met(words('All of it is there.', 'Está todo.'), { inputs });
}

function namesOf(items: readonly ContentItem[]): Words {
  return eachLanguage((language) => items.map((item) => item.name[language]).join('; '));
}

export interface YearlyFacts {
  /** null where it was never done. */
  readonly lastDoneOn: IsoDate | null;
}

/** A duty that comes round every year: good on the day it falls due, unmet the day after. */
export function yearlyRule({ everyYears = 1, ...described }: Described & { readonly everyYears?: number }): Rule<YearlyFacts> {
  return {
    ...described,
    evaluate({ lastDoneOn }, asOf) {
      if (lastDoneOn === null) return unmet(words('Not done yet.', 'Aún no se ha hecho.'), { inputs: { 'last done': null }, whatWouldChange: words('Do it and record the day.', 'Hágalo y anote el día.'), dueOn: asOf });
      const dueOn = addYears(checkDoneOn('lastDoneOn', lastDoneOn, asOf), everyYears);
      const extra = { inputs: { 'last done': lastDoneOn }, dueOn };
      return asOf <= dueOn ? met(words(`Done; next by ${dueOn}.`, `Hecho; la próxima a más tardar el ${dueOn}.`), extra) : unmet(words(`Was due by ${dueOn}.`, `Debía hacerse a más tardar el ${dueOn}.`), { ...extra, whatWouldChange: words('Do it and record the day.', 'Hágalo y anote el día.') });
    },
  };
}
