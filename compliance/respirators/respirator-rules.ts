import { contentsRule, yearlyRule, item } from '../contents';
import { type IsoDate } from '../iso-date';
import { met, notApplicable, undecided, unmet, WHO, type Rule } from '../rule';
import { usFederal } from '../source';
import { words } from '../words';
import { checkWearer, type Wearer } from './fit-test';
import { countRespiratorDays, EXAM_SOURCE, MEDICAL_TRIGGER_DAYS, MEDICAL_TRIGGER_SOURCE, silicaExamDue, type RespiratorDay } from './respirator-days';
import { selectRespirator, type RespiratorNeed } from './select';

export interface ChosenRespiratorFacts extends RespiratorNeed {
  /** Factor of the respirator planned; null where none is. */
  readonly plannedApf: number | null;
  /** Controls were put in place first, or a reason why none is feasible is on file; null where nobody said. */
  readonly areControlsFirst: boolean | null;
  /** For gas or vapor with a cartridge: a written change schedule from objective data is on file. */
  readonly hasChangeSchedule: boolean | null;
  readonly usesCartridge: boolean;
}

/**
 * 1910.134(d)(1)(iii): exposure is reasonably estimated, else the air counts as immediately dangerous; (a)(1): controls come first;
 * (d)(3)(i): the respirator's assigned factor covers exposure ÷ limit; (d)(3)(iii): against gas or vapor, supplied air or a cartridge changed by a schedule that rests on data.
 * `selectRespirator` reckons the ratio and the least factor.
 */
export const respiratorByRatio: Rule<ChosenRespiratorFacts> = {
  id: 'respirator-by-hazard-ratio',
  title: words('Respirator strong enough for what controls leave', 'Respirador suficiente para lo que dejan los controles'),
  source: usFederal('1910.134', 'partly', { paragraph: '(a)(1), (d)(1)(iii), (d)(3)(i), (d)(3)(iii)(B)(2)', note: '(d)(1)(iii) and (d)(3)(i) read; controls first and the change schedule recalled. In silica work outside Table 1 by 1926.1153(d)(3)(i) and (e).' }),
  duties: ['SIL-12', 'SIL-14', 'RES-01', 'RES-02', 'RES-03', 'RES-04'],
  evaluate(facts) {
    const choice = selectRespirator(facts);
    const inputs = { 'exposure, mg/m³': facts.exposureMgPerM3, 'limit, mg/m³': facts.limitMgPerM3, 'planned factor': facts.plannedApf };
    // (d)(1)(iii) no estimate; (d)(3)(i)(B)(2) past what is immediately dangerous; no limit or factors of the place to reckon with.
    if (choice.outcome === 'immediately-dangerous' || choice.outcome === 'undecided') {
      return undecided(choice.reason, choice.whoDecides, { inputs, whatWouldChange: words('Samples or objective data, signed.', 'Muestras o datos objetivos, firmados.') });
    }
    if (choice.outcome === 'none-required') return notApplicable(choice.reason, { inputs, results: { ratio: choice.ratio } });
    const results = { ratio: choice.ratio, 'least factor': choice.leastApf };
    // (a)(1)
    if (facts.areControlsFirst !== true) {
      const reason = words('Controls come before respirators. Which are in place, or why can none be?', 'Los controles van antes que los respiradores. ¿Cuáles hay, o por qué no puede haberlos?');
      return undecided(reason, WHO.competentPerson, { inputs, results, whatWouldChange: words('Name the controls, or the reason.', 'Nombre los controles o la razón.') });
    }
    // (d)(3)(i)(A), (B)(1): the planned factor reaches that of a respirator whose factor covers the ratio.
    if (facts.plannedApf === null || !choice.options.some((option) => option.apf <= facts.plannedApf!)) {
      return unmet(choice.reason, { inputs, results, whatWouldChange: words(`A respirator with a factor of ${choice.leastApf} or more.`, `Un respirador con factor de ${choice.leastApf} o más.`) });
    }
    // (d)(3)(iii)(B)(2)
    if (facts.form === 'gas-or-vapor' && facts.usesCartridge && facts.hasChangeSchedule !== true) {
      const reason = words('A cartridge against vapor needs a written change schedule.', 'Un cartucho contra vapor necesita un calendario escrito de cambio.');
      const extra = { inputs, results, whatWouldChange: words('Write the schedule from objective data, or supply air.', 'Escriba el calendario con datos objetivos, o dé aire con línea.') };
      return facts.hasChangeSchedule === null ? undecided(reason, WHO.hygienist, extra) : unmet(reason, extra);
    }
    return met(choice.reason, { inputs, results });
  },
};

/**
 * (e): medically cleared; (f): fit-tested before use and every year; (g)(1): nothing (beard, glasses) between seal and face; (k): trained, every year.
 * One line each in `checkWearer` (`fit-test.ts`). Here: the first "no" decides, else the first open question.
 */
export const wearerReady: Rule<Wearer> = {
  id: 'wearer-ready',
  title: words('Cleared, fitted, shaved and trained for this mask', 'Autorizado, ajustado, afeitado y capacitado para esta máscara'),
  source: usFederal('1910.134', 'read', { paragraph: '(e)-(g), (k)' }),
  duties: ['RES-05', 'RES-06', 'RES-07', 'RES-08'],
  evaluate(wearer, asOf) {
    const checks = checkWearer(wearer, asOf);
    const inputs = Object.fromEntries(checks.map((check) => [check.id, check.outcome]));
    const fault = checks.find((check) => check.outcome === 'unmet');
    const until = checks.map((check) => check.validUntil).filter((day) => day !== null).sort()[0] ?? null;
    if (fault !== undefined) return unmet(fault.reason, { inputs, whatWouldChange: words('Put it right before the task.', 'Corríjalo antes de la tarea.') });
    const open = checks.find((check) => check.outcome === 'undecided');
    if (open !== undefined) return undecided(open.reason, WHO.competentPerson, { inputs, whatWouldChange: words('Look or ask.', 'Mire o pregunte.') });
    return met(words('May wear it.', 'Puede usarla.'), { inputs, dueOn: until });
  },
};

export interface MedicalTriggerFacts {
  readonly days: readonly RespiratorDay[];
  readonly assignedOn: IsoDate;
  readonly lastExamOn: IsoDate | null;
  readonly clinicianWantsBy: IsoDate | null;
}

/**
 * (h)(1)(i): surveillance, free and in working time, for each person whom the silica rule makes wear a respirator 30 days a year or more;
 * (h)(2): first exam within 30 days of assignment, unless one was had in the last three years; (h)(3): again every three years, or sooner if the clinician says so.
 * Days and dates: `respirator-days.ts`.
 */
export const medicalSurveillance: Rule<MedicalTriggerFacts> = {
  id: 'silica-medical-surveillance',
  title: words('Silica exam offered at 30 respirator days', 'Examen por sílice ofrecido a los 30 días de respirador'),
  source: MEDICAL_TRIGGER_SOURCE,
  duties: ['SIL-20', 'SIL-21'],
  evaluate({ days, ...person }, asOf) {
    const count = countRespiratorDays(days, asOf);
    const results = { 'days in 12 months, most': count.inAny12Months, 'days so far': count.inLast12Months, 'reached on': count.reachedOn };
    // (h)(1)(i)
    if (!count.isTriggered) {
      return notApplicable(words(`${count.inAny12Months} of ${MEDICAL_TRIGGER_DAYS} days in any 12 months.`, `${count.inAny12Months} de ${MEDICAL_TRIGGER_DAYS} días en 12 meses.`), { results, whatWouldChange: words('More days with a respirator required by the silica rule.', 'Más días con respirador exigido por la norma de sílice.') });
    }
    // (h)(2), (h)(3)
    const exam = silicaExamDue(person, asOf);
    const extra = { inputs: { 'assigned on': person.assignedOn, 'last exam': person.lastExamOn }, results, dueOn: exam.dueOn };
    if (exam.isOverdue) return unmet(words(`The exam was to be offered by ${exam.dueOn}.`, `El examen debía ofrecerse a más tardar el ${exam.dueOn}.`), { ...extra, whatWouldChange: words('Offer the exam, free and in working time.', 'Ofrezca el examen, gratis y en horas de trabajo.') });
    if (exam.kind === 'initial') return undecided(words(`No exam on file yet: offer one by ${exam.dueOn}.`, `Aún no hay examen: ofrézcalo a más tardar el ${exam.dueOn}.`), WHO.safetyOfficer, { ...extra, whatWouldChange: words('Offer the exam, free and in working time.', 'Ofrezca el examen, gratis y en horas de trabajo.') });
    return met(words(`Exam by ${exam.dueOn} (${EXAM_SOURCE.paragraph}).`, `Examen a más tardar el ${exam.dueOn} (${EXAM_SOURCE.paragraph}).`), extra);
  },
};

// The rules below but the last: met when every item is there, unmet when one is missing, undecided while nobody has looked (`contentsRule`).

/** (c)(2): a respirator worn by choice, where none is required, (i) makes no hazard itself and comes with the text of Appendix D; (ii) its wearer is fit for it and it is cared for, except filtering facepieces. */
export const voluntaryUse = contentsRule({
  id: 'respirator-voluntary-use',
  title: words('Voluntary use kept apart and informed', 'Uso voluntario aparte e informado'),
  source: usFederal('1910.134', 'read', { paragraph: '(c)(2)', note: 'Quotation by a university; for anything but a filtering facepiece the last two as well.' }),
  duties: ['RES-09'],
  items: [
    // (c)(2)(i)
    item('no-hazard', 'the respirator makes no hazard itself', 'el respirador no crea un peligro'),
    item('information', 'Appendix D information given', 'información del apéndice D entregada'),
    // (c)(2)(ii)
    item('fitness', 'medically fit (not for filtering facepieces)', 'apto médicamente (no para mascarillas desechables)'),
    item('care', 'cleaned, stored and kept under the written program (not for filtering facepieces)', 'limpio, guardado y cuidado según el programa (no para mascarillas desechables)'),
  ],
});

/** (m)(2)(i): the record of a fit test holds (A) name or identification, (B) type of test, (C) make, model, style and size, (D) date, (E) the result. How long it is kept, (m)(2)(ii): `record-may-go`. */
export const fitTestRecord = contentsRule({
  id: 'fit-test-record',
  title: words('Fit test record is whole', 'El registro de la prueba de ajuste está completo'),
  source: usFederal('1910.134', 'read', { paragraph: '(m)(2)' }),
  duties: ['RES-10'],
  items: [
    // (A) to (E)
    item('person', 'name', 'nombre'),
    item('type', 'type of test', 'tipo de prueba'),
    item('mask', 'make, model, style and size', 'marca, modelo, estilo y talla'),
    item('date', 'date', 'fecha'),
    item('result', 'passed or not, or the fit factor with its recording', 'aprobada o no, o el factor de ajuste con su registro'),
  ],
});

/** (c)(1): a written program with worksite procedures, as far as they apply: (i) to (ix) below; (c)(3): run by a trained administrator. */
export const respiratorProgram = contentsRule({
  id: 'respirator-program',
  title: words('Written respirator program', 'Programa escrito de respiradores'),
  source: usFederal('1910.134', 'from-memory', { paragraph: '(c)(1)(i)-(ix), (c)(3)', note: 'The nine elements, and the administrator, (c)(3).' }),
  duties: ['RES-11', 'RES-08'],
  items: [
    // (c)(3)
    item('administrator', 'a program administrator named', 'un administrador del programa'),
    // (c)(1)(i), (ii), (iii), (iv)
    item('selection', 'how respirators are chosen', 'cómo se eligen los respiradores'),
    item('medical', 'medical evaluations', 'evaluaciones médicas'),
    item('fit', 'fit testing', 'pruebas de ajuste'),
    item('use', 'proper use, routine and emergency', 'uso correcto, habitual y de emergencia'),
    // (c)(1)(vi)
    item('air', 'breathing air checked, where air is supplied (or: none is)', 'aire respirable revisado, donde se da aire (o: no se da)'),
    // (c)(1)(v)
    item('care', 'cleaning, storing, inspecting, repairing', 'limpieza, guardado, revisión, reparación'),
    // (c)(1)(vii), (viii)
    item('training', 'training', 'capacitación'),
    // (c)(1)(ix)
    item('evaluation', 'evaluation of the program', 'evaluación del programa'),
  ],
});

/** (l): the workplace is evaluated as necessary to see that the program works. Here: every year, good through the day it falls due (`yearlyRule`). */
export const respiratorProgramEvaluation = yearlyRule({
  id: 'respirator-program-evaluation',
  title: words('Respirator program evaluated', 'Programa de respiradores evaluado'),
  source: usFederal('1910.134', 'from-memory', { paragraph: '(l)', note: 'The rule says "as necessary"; yearly is the habit of the trade.' }),
  duties: ['RES-11'],
});
