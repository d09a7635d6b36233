import { type RespiratorAnswer } from '../answer';
import { type PersonFacts, type PersonRespirator, type RespiratorType } from '../facts';
import { addYears, isIsoDate, type IsoDate } from '../iso-date';
import { type Words } from '../outcome';
import { QUALITATIVE_MAX_RATIO } from '../respirators/fit-test';
import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { isSilicaWork, type SilicaPerson } from '../silica/silica-context';
import { type ShiftContext } from '../shift-context';
import { type ShiftRule } from '../shift-rule';
import { commonPractice, usFederal } from '../source';
import { clock, sentences, words } from '../words';

export interface PersonOfShift extends ShiftContext {
  readonly person: PersonFacts;
}

export interface PersonInTask extends SilicaPerson {
  readonly respirator: RespiratorAnswer;
}

/** Loose-fitting: no seal on the face to test. */
const LOOSE: readonly RespiratorType[] = ['papr-loose', 'papr-hood', 'supplied-air-hood'];

const isDoneBy = (on: string | null, day: IsoDate): boolean => on !== null && isIsoDate(on) && on <= day;

/** Fit-tested within the year that ends on the day; loose-fitting hoods need no fit test. */
export function isFitted({ type, fitTestedOn }: PersonRespirator, day: IsoDate): boolean {
  return LOOSE.includes(type) || (fitTestedOn !== null && isDoneBy(fitTestedOn, day) && isIsoDate(day) && addYears(fitTestedOn, 1) >= day);
}

/** A negative-pressure full facepiece tested by taste or smell serves to a factor of 10; `null` where nobody said how it was tested ((f)(6)). */
function isTestEnough({ type, fitTestKind = null }: PersonRespirator, neededFactor: number): boolean | null {
  if (type !== 'full-facepiece' || neededFactor <= QUALITATIVE_MAX_RATIO || fitTestKind === 'quantitative') return true;
  return fitTestKind === 'qualitative' ? false : null;
}

/**
 * A required mask is (d)(3)(i)(A) strong enough, by its assigned factor; (e)(1) its wearer medically cleared before use; (f)(2) fit-tested within the year, with this very mask;
 * (f)(6) where the test went by taste or smell and the mask is drawn in by breath, asked for a factor of 10 at most.
 * Here: one of the person's own masks passes all four; the first paragraph at which none is left gives the reason. The factor asked comes from the task (`respirator.apf`).
 */
export const maskReadyRule: ShiftRule<PersonInTask> = {
  id: 'mask-cleared-and-fitted',
  title: words('Cleared, fitted and their own', 'Con permiso, prueba y propia'),
  source: usFederal('1910.134', 'read', { paragraph: '(d)(3)(i)(A), (e)(1), (f)(2), (f)(6)' }),
  duties: ['RES-01', 'RES-05', 'RES-06'],
  topic: 'people',
  holds: true,
  evaluate({ respirator, person, pack, facts }, day) {
    if (respirator.outcome !== 'required') return notApplicable(words('No mask is required.', 'No se exige máscara.'));
    const needed = respirator.apf ?? 0;
    const factorOf = ({ type }: PersonRespirator): number | null => pack.silica?.factors?.apf[type] ?? null;
    // (d)(3)(i)(A). A sheet's respirator has no factor: the person's own serves, whatever it is rated.
    const strong = person.respirators.filter((mask) => respirator.apf === null || (factorOf(mask) ?? 0) >= needed);
    // (e)(1)
    const cleared = strong.filter(({ clearedOn }) => isDoneBy(clearedOn, day));
    // (f)(2)
    const fitted = cleared.filter((mask) => isFitted(mask, day));
    // (f)(6)
    const ready = fitted.find((mask) => isTestEnough(mask, needed) === true);
    const best = ready ?? fitted[0] ?? cleared[0] ?? strong[0] ?? person.respirators[0] ?? null;
    const inputs = {
      'protection factor, at least': respirator.apf,
      mask: best?.label ?? null,
      'cleared on': best?.clearedOn ?? null,
      'fit test on': best?.fitTestedOn ?? null,
      'kind of fit test': best?.fitTestKind ?? null,
      date: facts.date,
    };
    // Masks whose factor the law of the place does not give.
    const unrated = strong.length === 0 && person.respirators.some((mask) => factorOf(mask) === null);
    if (unrated) return undecided(words(`The factor of ${person.name}'s mask is not on file here.`, `No está anotado aquí el factor de la máscara de ${person.name}.`), WHO.safetyOfficer, { inputs, whatWouldChange: words('Look up its class and factor.', 'Busque su clase y factor.') });
    if (ready !== undefined) return met(words(`${person.name}: ${ready.label}, cleared and fitted.`, `${person.name}: ${ready.label}, con permiso y prueba.`), { inputs });
    if (fitted.some((mask) => isTestEnough(mask, needed) === null)) return undecided(words(`${person.name}'s full mask: by smell, or counted? By smell it serves to a factor of 10.`, `Máscara completa de ${person.name}: ¿por olor o medida? Por olor sirve hasta un factor de 10.`), WHO.safetyOfficer, { inputs, whatWouldChange: words('Look at the fit test record.', 'Mire el registro de la prueba.') });
    // In the order of the paragraphs: (d)(3)(i)(A), (e)(1), (f)(2), (f)(6).
    const gap =
      strong.length === 0
        ? words(`${person.name} has no mask that is strong enough.`, `${person.name} no tiene máscara bastante fuerte.`)
        : cleared.length === 0
          ? words(`${person.name} is not cleared for this mask.`, `${person.name} no tiene permiso médico para esta máscara.`)
          : fitted.length === 0
            ? words(`${person.name} has no fit test within a year.`, `${person.name} no tiene prueba de ajuste de este año.`)
            : words(`${person.name}'s full mask was tested by smell: good to a factor of 10 only.`, `La máscara completa de ${person.name} se probó por olor: solo hasta un factor de 10.`);
    return unmet(gap, { inputs, whatWouldChange: words('Clear and fit the person, or put a ready one.', 'Consiga permiso y prueba, o ponga a otro listo.') });
  },
  line: ({ person }, { outcome }) => (outcome === 'met' ? words(`${person.name}: mask ready.`, `${person.name}: máscara lista.`) : words(`${person.name} may not do this task: mask not ready.`, `${person.name} no puede hacer esta tarea: falta su máscara.`)),
};

/** The date is the duty; who certified it stands beside it, or its absence is said. */
function trainedWords(name: string, on: string | null, by: string | null | undefined): Words {
  const certified = by === null || by === undefined || by.trim() === '' ? words('Nobody is named who certifies it.', 'No dice quién lo certifica.') : words(`${by} certifies it.`, `Lo certifica ${by}.`);
  return sentences(words(`${name} was trained on ${on}.`, `${name} tomó el curso el ${on}.`), certified);
}

/** (i)(2): each person covered by the silica rule can show knowledge of its hazards, tasks, controls and contents. Here: a training day on record before silica work; the paragraph asks no yearly repeat. */
export const silicaTrainingRule: ShiftRule<PersonInTask> = {
  id: 'silica-training-on-record',
  title: words('Silica training on record', 'Curso de sílice anotado'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(i)(2)', note: 'Read in WAC 296-840-150.' }),
  duties: ['SIL-22'],
  topic: 'people',
  holds: true,
  evaluate(context, day) {
    const { person, silica } = context;
    // A signed basis below the action level takes the work out of the whole rule, its training too ((a)).
    if (silica.kind === 'basis' && silica.decision.kind === 'outside-scope') return notApplicable(words('The silica rule does not apply to this work.', 'La regla de sílice no aplica a este trabajo.'));
    // Any work that makes or moves silica dust, decided or not, is covered.
    if (!isSilicaWork(context)) return notApplicable(words('No silica work.', 'Sin trabajo con sílice.'));
    const inputs = { 'silica training on': person.silicaTrainedOn, 'certified by': person.silicaTrainedBy ?? null };
    return isDoneBy(person.silicaTrainedOn, day)
      ? met(trainedWords(person.name, person.silicaTrainedOn, person.silicaTrainedBy), { inputs })
      : unmet(words(`No silica training of ${person.name} is on record.`, `No está anotado el curso de sílice de ${person.name}.`), { inputs, whatWouldChange: words('Train the person, or put a trained one.', 'Dé el curso, o ponga a alguien con curso.') });
  },
  line: ({ person }, { outcome }) => (outcome === 'met' ? words(`${person.name}: silica training done.`, `${person.name}: curso de sílice hecho.`) : words(`${person.name} may not do this task: no silica training.`, `${person.name} no puede hacer esta tarea: falta el curso de sílice.`)),
};

/** (h)(1): information and training on the hazardous chemicals of the work area at first assignment. Here: a training day on record before a task that handles a kit. */
export const hazardTrainingRule: ShiftRule<PersonInTask> = {
  id: 'hazard-training-on-record',
  title: words('Chemical hazard training on record', 'Curso de químicos anotado'),
  source: usFederal('1910.1200', 'read', { paragraph: '(h)(1)' }),
  duties: ['HAZ-09'],
  topic: 'people',
  holds: true,
  evaluate({ traits, person }, day) {
    if (!traits.touchesKit) return notApplicable(words('No kit in this task.', 'Sin kit en esta tarea.'));
    const inputs = { 'hazard training on': person.hazcomTrainedOn, 'certified by': person.hazcomTrainedBy ?? null };
    return isDoneBy(person.hazcomTrainedOn, day)
      ? met(trainedWords(person.name, person.hazcomTrainedOn, person.hazcomTrainedBy), { inputs })
      : unmet(words(`No chemical training of ${person.name} is on record.`, `No está anotado el curso de químicos de ${person.name}.`), { inputs, whatWouldChange: words('Train the person, or put a trained one.', 'Dé el curso, o ponga a alguien con curso.') });
  },
  line: ({ person }, { outcome }) => (outcome === 'met' ? words(`${person.name}: chemical training done.`, `${person.name}: curso de químicos hecho.`) : words(`${person.name} may not do this task: no chemical training.`, `${person.name} no puede hacer esta tarea: falta el curso de químicos.`)),
};

/** (e)(6)(i): the clinician's recommendation names limits, and no more. Here: the limit "no isocyanate" keeps its person off kits that hold it; the finding behind it is never stored. */
export const keptFromIsocyanatesRule: ShiftRule<PersonInTask> = {
  id: 'kept-from-isocyanates',
  title: words('Kept off this kit', 'Fuera de este kit'),
  source: usFederal('1910.134', 'read', { paragraph: '(e)(6)(i)', note: 'A recommendation holds limits only. Keeping sensitised people from isocyanates is occupational-health practice.' }),
  duties: ['ISO-01'],
  topic: 'people',
  holds: true,
  evaluate({ person, traits, kitHazards, kit }) {
    if (!person.isKeptFromIsocyanates || !traits.touchesKit) return notApplicable(words('No limit bears on this.', 'Ningún límite toca esto.'));
    // A kit that is not chosen, or whose sheets are missing, may hold isocyanate: the limit holds until it is known.
    const isKnownFree = kitHazards !== null && kitHazards.isocyanateParts.length === 0 && kitHazards.partsWithoutSheet.length === 0;
    if (isKnownFree) return notApplicable(words('No isocyanate in this kit.', 'Este kit no tiene isocianato.'));
    return unmet(words(`${person.name} is kept off this kit.`, `${person.name} no trabaja con este kit.`), {
      inputs: { kit: kit?.name ?? null, 'isocyanate or sensitizer': kitHazards?.isocyanateParts.map(({ productName }) => productName).join(', ') || null },
      whatWouldChange: words('Put someone else on this task.', 'Ponga a otra persona en esta tarea.'),
    });
  },
  line: ({ person }) => words(`${person.name} may not do this task.`, `${person.name} no puede hacer esta tarea.`),
};

/** No law cited: the officer confirms that the person is over eighteen, without a birth date. */
export const adultRule: ShiftRule<PersonInTask> = {
  id: 'adult-confirmed',
  title: words('Over 18, confirmed', 'Mayor de 18, confirmado'),
  source: commonPractice('Over 18 confirmed for machines and chemicals; no birth date is stored.'),
  duties: [],
  topic: 'people',
  holds: true,
  evaluate: ({ person, traits }) =>
    !traits.isWork || person.isAdultConfirmed
      ? notApplicable(words('Confirmed.', 'Confirmado.'))
      : unmet(words(`Nobody confirmed that ${person.name} is over 18.`, `Nadie confirmó que ${person.name} es mayor de 18.`), { inputs: { 'over 18 confirmed': false }, whatWouldChange: words('The officer confirms it.', 'El responsable lo confirma.') }),
  line: ({ person }) => words(`${person.name} may not work yet: age not confirmed.`, `${person.name} aún no puede trabajar: falta confirmar su edad.`),
};

/** No law cited: whose employee each person is, own, agency's or a subcontractor's, is named. */
export const employerRule: ShiftRule<PersonOfShift> = {
  id: 'employer-named',
  title: words('Whose employee', 'De quién es empleado'),
  source: commonPractice('Own, agency or subcontractor: an inspector asks first.'),
  duties: [],
  topic: 'people',
  holds: false,
  evaluate({ person }) {
    const inputs = { employer: person.employer };
    return person.employer !== null && person.employer.trim() !== ''
      ? met(words(`${person.name} works for ${person.employer}.`, `${person.name} trabaja para ${person.employer}.`), { inputs })
      : undecided(words(`Nobody said who employs ${person.name}.`, `Nadie dijo quién emplea a ${person.name}.`), WHO.safetyOfficer, { inputs, whatWouldChange: words('Name the employer.', 'Nombre al empleador.') });
  },
  line: ({ person }, { outcome }) => (outcome === 'met' ? words(`${person.name}: ${person.employer}.`, `${person.name}: ${person.employer}.`) : words(`${person.name}: employer not named.`, `${person.name}: falta el empleador.`)),
};

export interface BookedTwice extends PersonOfShift {
  /** A time that two entries of the plan share, from `doubleBookings` (`silica/minutes.ts`); minutes from midnight. */
  readonly booking: { readonly startMinute: number; readonly endMinute: number; readonly withName: string };
}

/**
 * No law cited: one person cannot be in two places of the plan at once, breaks and inspections aside.
 * Asked only of a time that two entries share, so it is always unmet. It holds nothing, and the silica sum counts the shared minutes once (`table1Time`).
 */
export const doubleBookingRule: ShiftRule<BookedTwice> = {
  id: 'double-booking',
  title: words('Booked twice', 'En dos lugares'),
  source: commonPractice('Nobody works in two places at once.'),
  duties: ['SIL-04'],
  topic: 'people',
  holds: false,
  evaluate({ person, booking }) {
    const span = `${clock(booking.startMinute)}–${clock(booking.endMinute)}`;
    return unmet(words(`${person.name} stands twice in the plan from ${span}.`, `${person.name} está dos veces en el plan de ${span}.`), {
      inputs: { from: clock(booking.startMinute), to: clock(booking.endMinute), with: booking.withName },
      whatWouldChange: words('Move one of the two.', 'Mueva uno de los dos.'),
    });
  },
  line: ({ person, booking }) => sentences(words(`${person.name}: booked twice, also ${booking.withName}.`, `${person.name}: en dos lugares, también ${booking.withName}.`)),
};
