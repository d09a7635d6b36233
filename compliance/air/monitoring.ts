import { checkNumber, InputError } from '../input-error';
import { addMonths, checkIsoDate, daysBetween, type IsoDate } from '../iso-date';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { usFederal, type Source } from '../source';

/** Oregon's rule has the federal words. */
const oregon = (text: string, parallel: string): Source => usFederal('1926.1153', 'parallel-text', { paragraph: text, note: `Read in OAR 437-002-1056(3)(${parallel}).` });
export const MONITORING_SOURCES = {
  initial: oregon('(d)(2)(iii)(A)', 'a'),
  initialBelow: oregon('(d)(2)(iii)(B)', 'b'),
  atOrAboveActionLevel: oregon('(d)(2)(iii)(C)', 'c'),
  aboveLimit: oregon('(d)(2)(iii)(D)', 'd'),
  below: usFederal('1926.1153', 'partly', { paragraph: '(d)(2)(iii)(E)', note: 'Six months read in OAR 437-002-1056(3)(e); two results below the action level, seven or more days apart, in a trade article.' }),
  reassess: usFederal('1926.1153', 'partly', { paragraph: '(d)(2)(iv)', note: 'A training text that restates both limbs.' }),
} as const satisfies Record<string, Source>;

/** (C), (D), (E). */
const REPEAT_MONTHS = { atOrAboveActionLevel: 6, aboveLimit: 3, below: 6 } as const;
/** (E). */
const MIN_DAYS_BETWEEN_LOW_RESULTS = 7;

/** One day's most exposed worker of a shift, job classification and work area, as 8-hour average without respirator. */
export interface MonitoringResult {
  readonly sampledOn: IsoDate;
  readonly twaMicrogramsPerM3: number;
}

/** The place's own figures: they come from its pack, never from here. */
export interface MonitoringLimits {
  readonly actionLevelMicrogramsPerM3: number;
  readonly limitMicrogramsPerM3: number;
}

export type MonitoringStep = 'sample-first' | 'repeat' | 'may-stop';

export interface MonitoringSchedule {
  readonly step: MonitoringStep;
  /** Counted from the sampling day; null where no further sample is due. */
  readonly dueOn: IsoDate | null;
  readonly isOverdue: boolean;
  /** The notice to employees must then say what is done to bring the exposure down. */
  readonly needsCorrectiveAction: boolean;
  readonly reason: Words;
  readonly source: Source;
}

interface Day {
  readonly on: IsoDate;
  readonly value: number;
}

/** Several samples of one day count as the highest of them. */
function byDay(results: readonly MonitoringResult[]): Day[] {
  const days = new Map<IsoDate, number>();
  results.forEach(({ sampledOn, twaMicrogramsPerM3 }, i) => {
    checkIsoDate(`results[${i}].sampledOn`, sampledOn);
    checkNumber(`results[${i}].twaMicrogramsPerM3`, twaMicrogramsPerM3, { min: 0 });
    days.set(sampledOn, Math.max(days.get(sampledOn) ?? 0, twaMicrogramsPerM3));
  });
  return [...days].map(([on, value]) => ({ on, value })).sort((a, b) => (a.on < b.on ? -1 : 1));
}

/** Whether monitoring had ended by its own rule after the last of these days. */
function hasEnded(days: readonly Day[], actionLevel: number): 'initial' | 'two-below' | null {
  let ended: 'initial' | 'two-below' | null = null;
  days.forEach((day, i) => {
    const before = days[i - 1];
    if (day.value >= actionLevel) ended = null;
    else if (before === undefined) ended = 'initial';
    else if (ended === null && before.value < actionLevel && daysBetween(before.on, day.on) >= MIN_DAYS_BETWEEN_LOW_RESULTS) ended = 'two-below';
  });
  return ended;
}

/** The scheduled option: when the next personal sample is due for one shift, job classification and work area. */
export function monitoringSchedule(results: readonly MonitoringResult[], limits: MonitoringLimits, asOf: IsoDate): MonitoringSchedule {
  checkIsoDate('asOf', asOf);
  const actionLevel = checkNumber('actionLevelMicrogramsPerM3', limits.actionLevelMicrogramsPerM3, { above: 0 });
  const limit = checkNumber('limitMicrogramsPerM3', limits.limitMicrogramsPerM3, { min: actionLevel });
  const days = byDay(results);
  const latest = days.at(-1);
  if (latest === undefined) {
    return { step: 'sample-first', dueOn: null, isOverdue: false, needsCorrectiveAction: false, reason: { en: 'No sample yet: the first one comes before this schedule.', es: 'Aún no hay muestra: la primera va antes de este calendario.' }, source: MONITORING_SOURCES.initial };
  }
  if (latest.on > asOf) throw new InputError('results', `the sample of ${latest.on} is later than ${asOf}`);
  const ended = hasEnded(days, actionLevel);
  if (ended !== null) {
    const source = ended === 'initial' ? MONITORING_SOURCES.initialBelow : MONITORING_SOURCES.below;
    return { step: 'may-stop', dueOn: null, isOverdue: false, needsCorrectiveAction: false, reason: endedReason(ended), source };
  }
  const kind = latest.value > limit ? 'aboveLimit' : latest.value >= actionLevel ? 'atOrAboveActionLevel' : 'below';
  const dueOn = addMonths(latest.on, REPEAT_MONTHS[kind]);
  return { step: 'repeat', dueOn, isOverdue: dueOn < asOf, needsCorrectiveAction: kind === 'aboveLimit', reason: repeatReason(kind, latest.value, dueOn), source: MONITORING_SOURCES[kind] };
}

function endedReason(ended: 'initial' | 'two-below'): Words {
  return ended === 'initial'
    ? { en: 'The first result is below the action level: sampling may stop.', es: 'El primer resultado está bajo el nivel de acción: puede dejarse de muestrear.' }
    : { en: 'Two results in a row, seven or more days apart, are below the action level: sampling may stop.', es: 'Dos resultados seguidos, con siete o más días entre ellos, están bajo el nivel de acción: puede dejarse de muestrear.' };
}

function repeatReason(kind: keyof typeof REPEAT_MONTHS, value: number, dueOn: IsoDate): Words {
  const shown = `${value} µg/m³`;
  if (kind === 'aboveLimit') return { en: `${shown} as 8-hour average is above the limit: sample again by ${dueOn}.`, es: `${shown} como promedio de 8 horas supera el límite: muestree de nuevo a más tardar el ${dueOn}.` };
  if (kind === 'atOrAboveActionLevel') return { en: `${shown} as 8-hour average is at or above the action level: sample again by ${dueOn}.`, es: `${shown} como promedio de 8 horas llega al nivel de acción o lo pasa: muestree de nuevo a más tardar el ${dueOn}.` };
  return { en: `${shown} is below the action level, but it takes two in a row, seven days apart: sample again by ${dueOn}.`, es: `${shown} está bajo el nivel de acción, pero hacen falta dos seguidos con siete días entre ellos: muestree de nuevo a más tardar el ${dueOn}.` };
}

/** A change at the work that can raise exposure. */
export interface WorkChange {
  readonly on: IsoDate;
  readonly kind: 'production' | 'process' | 'control' | 'personnel' | 'work-practice';
  /** What someone decided about it; null while nobody has. */
  readonly canRaiseExposure: boolean | null;
}

export type Reassessment =
  | { readonly outcome: 'needed'; readonly changes: readonly WorkChange[] }
  | { readonly outcome: 'not-needed'; readonly changes: readonly WorkChange[] }
  | { readonly outcome: 'undecided'; readonly changes: readonly WorkChange[]; readonly whoDecides: Words };

/** Whether changes since the last assessment call for another; a change nobody judged leaves it undecided. */
export function reassessment(lastAssessedOn: IsoDate, changes: readonly WorkChange[]): Reassessment {
  checkIsoDate('lastAssessedOn', lastAssessedOn);
  changes.forEach((change, i) => checkIsoDate(`changes[${i}].on`, change.on));
  const since = changes.filter((change) => change.on >= lastAssessedOn);
  const raising = since.filter((change) => change.canRaiseExposure === true);
  if (raising.length > 0) return { outcome: 'needed', changes: raising };
  const open = since.filter((change) => change.canRaiseExposure === null);
  if (open.length > 0) return { outcome: 'undecided', changes: open, whoDecides: WHO.competentPerson };
  return { outcome: 'not-needed', changes: [] };
}
