import { type FloorFacts, type Survey } from '../facts';
import { type Words } from '../outcome';
import { met, notApplicable, undecided, unmet, WHO, type Verdict } from '../rule';
import { type ShiftContext, type TaskContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { sourced, usFederal, type Source } from '../source';
import { sentences, words } from '../words';

const ASBESTOS: Source = usFederal('1926.1101', 'partly', { paragraph: '(g)(8)(i), (k)', note: 'Vinyl and asphalt flooring and mastic in buildings to 1980 are presumed to hold asbestos; read through the agency\'s letters of 18 May 2005 and 1 August 1997 and its slide on rebutting the presumption, (k)(5).' });
const LEAD: Source = usFederal('1926.62', 'partly', { paragraph: '(d)(2)' });
const BOTH: Source = sourced('29 CFR 1926.1101 and 1926.62', 'partly', { paragraph: '(g)(8)(i), (k); (d)(2)', note: 'Asbestos read through a letter of the agency; lead in part.' });

const NOT_CLEARED: readonly Survey[] = ['present', 'unknown'];

function floorInputs(floor: FloorFacts): Verdict['inputs'] {
  return { covering: floor.covering, built: floor.builtYear, asbestos: floor.asbestos, lead: floor.lead, survey: floor.surveyReference };
}

function whatIsOpen(floor: FloorFacts): Words {
  const open = (survey: Survey, en: string, es: string): Words | null =>
    survey === 'unknown' ? words(`${en}: nobody knows.`, `${es}: nadie sabe.`) : survey === 'present' ? words(`${en} is in the floor.`, `Hay ${es.toLowerCase()} en el piso.`) : null;
  const covering = floor.covering === 'unknown' ? words('What lies on the floor: nobody knows.', 'Qué hay sobre el piso: nadie sabe.') : null;
  return sentences(open(floor.asbestos, 'Asbestos', 'Asbesto'), open(floor.lead, 'Lead', 'Plomo'), covering, unproven(floor));
}

/** "Absent" and "not needed" are answers of somebody: report number, or who looked and when. */
function unproven(floor: FloorFacts): Words | null {
  const isAnswered = !NOT_CLEARED.includes(floor.asbestos) || !NOT_CLEARED.includes(floor.lead);
  return isAnswered && (floor.surveyReference ?? '').trim() === '' ? words('Nobody wrote down who looked, or the report.', 'Nadie anotó quién revisó, ni el informe.') : null;
}

/** Last year in which flooring was laid that is presumed to hold asbestos ((k)(1)). */
const PRESUMED_TO_YEAR = 1980;

/** Flooring and its mastic to 1980 count as asbestos until a survey says no; that none was needed is no survey ((k)(1), (k)(5)). */
function isPresumed({ covering, builtYear, asbestos }: FloorFacts): boolean {
  return asbestos === 'not-needed' && (covering === 'tile' || covering === 'black-mastic') && (builtYear === null || builtYear <= PRESUMED_TO_YEAR);
}

/** The four answers, in this order: presumed, found, nobody knows, cleared by somebody. */
function judge(floor: FloorFacts): Verdict {
  const inputs = floorInputs(floor);
  // 1926.1101(k)(1), (k)(5): presumed until samples say no.
  if (floor.asbestos !== 'present' && floor.lead !== 'present' && isPresumed(floor)) {
    return undecided(words('Tile and mastic to 1980 count as asbestos until a survey says no.', 'Loseta y pegamento hasta 1980 cuentan como asbesto hasta que un estudio diga que no.'), WHO.competentPerson, { inputs, whatWouldChange: words('A survey with samples, or papers that it was laid later.', 'Un estudio con muestras, o papeles de que se puso después.') });
  }
  // 1926.1101(g)(8)(i), 1926.62: found, so those rules take over.
  if (floor.asbestos === 'present' || floor.lead === 'present') {
    return unmet(whatIsOpen(floor), { inputs, whatWouldChange: words('Other rules and trained people take over this floor.', 'Otras reglas y gente preparada toman este piso.') });
  }
  // 1926.1101(k), 1926.62(d)(2): until it is known, it is treated as if it were there.
  if (floor.asbestos === 'unknown' || floor.lead === 'unknown' || floor.covering === 'unknown' || unproven(floor) !== null) {
    return undecided(whatIsOpen(floor), WHO.competentPerson, { inputs, whatWouldChange: words('A survey, or who looked and when.', 'Un estudio, o quién revisó y cuándo.') });
  }
  return met(words(`Floor checked: ${floor.surveyReference ?? ''}`, `Piso revisado: ${floor.surveyReference ?? ''}`), { inputs });
}

function sourceOf(floor: FloorFacts): Source {
  const isAsbestosOpen = NOT_CLEARED.includes(floor.asbestos) || isPresumed(floor);
  const isLeadOpen = NOT_CLEARED.includes(floor.lead);
  if (isAsbestosOpen === isLeadOpen) return BOTH;
  return isAsbestosOpen ? ASBESTOS : LEAD;
}

/**
 * 1926.1101(g)(8)(i): flooring that holds asbestos is not sanded and, as a rule, not chipped; (k): whoever opens a floor finds out first, and flooring to 1980 is presumed to hold it;
 * 1926.62(d)(2): until lead is measured, work that disturbs it is protected as if the limit were passed.
 * Here: unknown means no grinding and no blasting. `judge`, above, gives the answer.
 */
export const floorRule: ShiftRule<ShiftContext> = {
  id: 'floor-survey',
  title: words('Asbestos and lead in the floor', 'Asbesto y plomo en el piso'),
  source: BOTH,
  duties: ['GATE-01'],
  topic: 'gate',
  // Holds through its tasks: work that leaves the floor alone goes on.
  holds: false,
  evaluate: ({ facts }) => judge(facts.floor),
  line: (_facts, { outcome }) =>
    outcome === 'met' ? words('Floor checked for asbestos and lead.', 'Piso revisado: asbesto y plomo.') : words('No grinding, no blasting: the floor is not cleared.', 'Sin pulir ni granallar: el piso no está libre.'),
  sourceOf: ({ facts }) => sourceOf(facts.floor),
};

/** 1926.1101(g)(8)(i), (k); 1926.62(d)(2), the same demand of one task: what opens the floor waits for the answer. */
export const floorTaskRule: ShiftRule<TaskContext> = {
  ...floorRule,
  id: 'floor-survey-of-task',
  title: words('Opening the floor needs the survey', 'Abrir el piso necesita el estudio'),
  holds: true,
  evaluate({ facts, traits }) {
    if (!traits.disturbsFloor) return notApplicable(words('Leaves the floor alone.', 'No abre el piso.'));
    const verdict = judge(facts.floor);
    // Said once for the shift; a task repeats it only when it is held by it.
    return verdict.outcome === 'met' ? notApplicable(verdict.reason) : verdict;
  },
  line: ({ traits }) => words(`${traits.name.en} may not start: asbestos or lead not settled.`, `${traits.name.es}: no puede empezar, falta aclarar asbesto o plomo.`),
};
