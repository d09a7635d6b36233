import { addWorkingDays, addYears, checkDoneOn, type IsoDate } from '../iso-date';
import { met, notApplicable, undecided, unmet, WHO, type Rule } from '../rule';
import { sourced, usFederal } from '../source';
import { words } from '../words';
import { accessDueOn, ACCESS_SOURCE, rightsNoticeDueOn, RIGHTS_NOTICE_SOURCE } from './access';
import { retention, type RecordFacts } from './retention';

/** Asked before a record is let go. */
export const mayDiscardRecord: Rule<RecordFacts> = {
  id: 'record-may-go',
  title: words('Record kept its full time', 'Registro guardado todo su plazo'),
  source: usFederal('1910.1020', 'read', { paragraph: '(d)(1)', note: 'Construction through 1926.33; other periods by their own row.' }),
  duties: ['REC-01'],
  evaluate(facts, asOf) {
    const answer = retention(facts, asOf);
    const inputs = { record: facts.record, 'made on': facts.madeOn };
    if (answer.outcome === 'undecided') return undecided(answer.reason, answer.whoDecides, { inputs, whatWouldChange: words('The local period.', 'El plazo local.') });
    if (answer.outcome === 'no-period') return notApplicable(answer.reason, { inputs });
    if (answer.outcome === 'keep') return unmet(answer.reason, { inputs, whatWouldChange: words('Time, or a newer record.', 'El tiempo, o un registro más reciente.') });
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

export const accessInTime: Rule<AccessFacts> = {
  id: 'record-access-in-time',
  title: words('Own record given within 15 working days', 'Registro propio entregado en 15 días hábiles'),
  source: ACCESS_SOURCE,
  duties: ['REC-02'],
  evaluate({ requestedOn, givenOn, holidays, isDelayExplained }, asOf) {
    const { dueOn, earlierDueOn } = accessDueOn(requestedOn, (day) => holidays.includes(day));
    const extra = { inputs: { 'requested on': requestedOn, 'given on': givenOn }, dueOn, results: { 'earlier reading': earlierDueOn } };
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

export const rightsNotice: Rule<RightsNoticeFacts> = {
  id: 'record-rights-notice',
  title: words('Worker told of the right to see records', 'Se informó al trabajador de su derecho a ver registros'),
  source: RIGHTS_NOTICE_SOURCE,
  duties: ['REC-05'],
  evaluate({ employedOn, lastToldOn }, asOf) {
    if (lastToldOn !== null) checkDoneOn('lastToldOn', lastToldOn, asOf);
    const dueOn = rightsNoticeDueOn(employedOn, lastToldOn);
    const extra = { inputs: { 'employed on': employedOn, 'last told': lastToldOn }, dueOn };
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
