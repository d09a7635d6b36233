import { addWorkingDays, addYears, checkIsoDate, type IsoDate } from '../iso-date';
import { usFederal } from '../source';

export const ACCESS_SOURCE = usFederal('1910.1020', 'partly', { paragraph: '(e)(1)', note: 'Abstract of OSHA 3110; the delay rule, and that the days begin when the request is received, in the OSHA letter of 27 March 2002.' });
export const RIGHTS_NOTICE_SOURCE = usFederal('1910.1020', 'read', { paragraph: '(g)(1)-(2)' });

const ACCESS_WORKING_DAYS = 15;

/** By when a person gets their own record, free of charge; if it takes longer, say why and name the earliest date. */
export function accessDueOn(requestedOn: IsoDate, isHoliday: (day: IsoDate) => boolean): { readonly dueOn: IsoDate; readonly earlierDueOn: IsoDate } {
  checkIsoDate('requestedOn', requestedOn);
  return { dueOn: addWorkingDays(requestedOn, ACCESS_WORKING_DAYS, isHoliday), earlierDueOn: addWorkingDays(requestedOn, ACCESS_WORKING_DAYS, () => false) };
}

/** When a worker must next be told that the records exist, where, who keeps them and the right to see them: on entering employment, then every year. */
export function rightsNoticeDueOn(employedOn: IsoDate, lastToldOn: IsoDate | null): IsoDate {
  checkIsoDate('employedOn', employedOn);
  return lastToldOn === null || checkIsoDate('lastToldOn', lastToldOn) < employedOn ? employedOn : addYears(lastToldOn, 1);
}
