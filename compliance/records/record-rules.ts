import { addWorkingDays, addYears, checkDoneOn, type IsoDate } from '../iso-date';
import { met, notApplicable, undecided, unmet, WHO, type Rule } from '../rule';
import { sourced, usFederal } from '../source';
import { words } from '../words';
import { accessDueOn, ACCESS_SOURCE, rightsNoticeDueOn, RIGHTS_NOTICE_SOURCE } from './access';
import { retention, type RecordFacts } from './retention';

/**
 * (d)(1), asked before a record is let go: (i) medical records stay for employment and 30 years more; (ii) exposure records 30 years, where
 * (A) laboratory background papers may go after one year once results, method and summary stay 30, and
 * (B) a sheet needs no set time while a register of what it was, where and when it was used stays 30.
 * A kind of record and its years: one row each in `retention.data.ts`, with the row's own source; how a row is read: `retention.ts`. (iii) analyses made from such records have no row yet.
 */
export const mayDiscardRecord: Rule<RecordFacts> = {
  id: 'record-may-go',
  title: words('Record kept its full time', 'Registro guardado todo su plazo'),
  source: usFederal('1910.1020', 'read', { paragraph: '(d)(1)', note: 'Construction through 1926.33; other periods by their own row.' }),
  duties: ['REC-01'],
  evaluate(facts, asOf) {
    const answer = retention(facts, asOf);
    const inputs = { record: facts.record, 'made on': facts.madeOn };
    // A kind of record or a place without a row: kept.
    if (answer.outcome === 'undecided') return undecided(answer.reason, answer.whoDecides, { inputs, whatWouldChange: words('The local period.', 'El plazo local.') });
    // (ii)(B) with its register, a record whose place a newer one has taken, or a row for which the law names no time.
    if (answer.outcome === 'no-period') return notApplicable(answer.reason, { inputs });
    // (i) while employed, or nothing newer yet.
    if (answer.outcome === 'keep') return unmet(answer.reason, { inputs, whatWouldChange: words('Time, or a newer record.', 'El tiempo, o un registro más reciente.') });
    // (i), (ii), (ii)(A): the last day counts; it may go the day after.
    const text = words(`Keep through ${answer.lastDay}.`, `Guardar hasta el ${answer.lastDay} inclusive.`);
    return answer.mayDiscard ? met(text, { inputs, dueOn: answer.lastDay }) : unmet(text, { inputs, dueOn: answer.lastDay, whatWouldChange: words('Time.', 'El tiempo.') });
  },
};

export interface AccessFacts {
  /** The day the employer received the request: the 15 days begin there. */
  readonly requestedOn: IsoDate;
  readonly givenOn: IsoDate | null;
  readonly holidays: readonly IsoDate[];
  /** Within the 15 working days the person was told why it takes longer and the earliest date. */
  readonly isDelayExplained: boolean;
}

/** (e)(1)(i): a person gets their own record in a reasonable time; if not within 15 working days (`access.ts`), they are told within them why and the earliest date. */
export const accessInTime: Rule<AccessFacts> = {
  id: 'record-access-in-time',
  title: words('Own record given within 15 working days', 'Registro propio entregado en 15 días hábiles'),
  source: ACCESS_SOURCE,
  duties: ['REC-02'],
  evaluate({ requestedOn, givenOn, holidays, isDelayExplained }, asOf) {
    const { dueOn, earlierDueOn } = accessDueOn(requestedOn, (day) => holidays.includes(day));
    const extra = { inputs: { 'requested on': requestedOn, 'given on': givenOn }, dueOn, results: { 'earlier reading': earlierDueOn } };
    // Given within the 15 days; then past them and not explained, past them and explained, and still open.
    if (givenOn !== null && checkDoneOn('givenOn', givenOn, asOf) <= dueOn) return met(words(`Given on ${givenOn}.`, `Entregado el ${givenOn}.`), extra);
    if ((givenOn ?? asOf) > dueOn && !isDelayExplained) return unmet(words(`Was due by ${dueOn}.`, `Debía entregarse a más tardar el ${dueOn}.`), { ...extra, whatWouldChange: words('Give it now, and say why it took longer.', 'Entréguelo ya y diga por qué tardó más.') });
    if (givenOn !== null) return met(words('Given later; the reason and date were told in time.', 'Entregado después; la razón y la fecha se dijeron a tiempo.'), extra);
    return undecided(words(`Not given yet: by ${earlierDueOn} at the safest.`, `Aún sin entregar: lo más seguro, a más tardar el ${earlierDueOn}.`), WHO.safetyOfficer, { ...extra, whatWouldChange: words('Hand over the export.', 'Entregue la exportación.') });
  },
};

export interface RightsNoticeFacts {
  readonly employedOn: IsoDate;
  readonly lastToldOn: IsoDate | null;
}

/** (g)(1): on first entering employment and at least once a year after it, people are told (i) that the records are there and where, (ii) who keeps them, (iii) their right to see them. */
export const rightsNotice: Rule<RightsNoticeFacts> = {
  id: 'record-rights-notice',
  title: words('Worker told of the right to see records', 'Se informó al trabajador de su derecho a ver registros'),
  source: RIGHTS_NOTICE_SOURCE,
  duties: ['REC-05'],
  evaluate({ employedOn, lastToldOn }, asOf) {
    if (lastToldOn !== null) checkDoneOn('lastToldOn', lastToldOn, asOf);
    const dueOn = rightsNoticeDueOn(employedOn, lastToldOn);
    const extra = { inputs: { 'employed on': employedOn, 'last told': lastToldOn }, dueOn };
    // Told in this employment, a year ago at most; what was told in an earlier one does not count.
    const wasToldHere = lastToldOn !== null && lastToldOn >= employedOn;
    if (wasToldHere && asOf <= addYears(lastToldOn, 1)) return met(words(`Told; again by ${dueOn}.`, `Informado; de nuevo a más tardar el ${dueOn}.`), extra);
    return unmet(words(`Due on ${dueOn}.`, `Debía hacerse el ${dueOn}.`), { ...extra, whatWouldChange: words('Tell the worker, and record the day.', 'Informe al trabajador y anote el día.') });
  },
};

export interface MeetingFacts {
  /** Working days between meetings that the place's pack asks for; null where it asks for none. */
  readonly everyWorkingDays: number | null;
  readonly lastHeldOn: IsoDate | null;
  readonly holidays: readonly IsoDate[];
}

/** Where the law of the place sets an interval (California: every ten working days), a safety meeting is held within it; federal law sets none. */
export const safetyMeetings: Rule<MeetingFacts> = {
  id: 'safety-meeting-cadence',
  title: words('Safety meetings held in time', 'Reuniones de seguridad a tiempo'),
  source: sourced('the place’s pack', 'partly', { note: 'California: 8 CCR 1509, every ten working days, read; that federal law sets no interval is recalled.' }),
  duties: ['GATE-09'],
  evaluate({ everyWorkingDays, lastHeldOn, holidays }, asOf) {
    if (everyWorkingDays === null) return notApplicable(words('The law here sets no interval.', 'La ley de aquí no fija un intervalo.'));
    const inputs = { 'every, working days': everyWorkingDays, 'last held': lastHeldOn };
    if (lastHeldOn === null) return unmet(words('None held yet.', 'Aún no se ha hecho ninguna.'), { inputs, dueOn: asOf, whatWouldChange: words('Hold one.', 'Haga una.') });
    const dueOn = addWorkingDays(checkDoneOn('lastHeldOn', lastHeldOn, asOf), everyWorkingDays, (day) => holidays.includes(day));
    return asOf <= dueOn ? met(words(`Next by ${dueOn}.`, `La próxima a más tardar el ${dueOn}.`), { inputs, dueOn }) : unmet(words(`Was due by ${dueOn}.`, `Debía hacerse a más tardar el ${dueOn}.`), { inputs, dueOn, whatWouldChange: words('Hold one.', 'Haga una.') });
  },
};
