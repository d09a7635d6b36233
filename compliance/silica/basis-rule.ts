import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { sentences, words } from '../words';
import { BASIS_KINDS, decidedReason, undecidedReason, WHAT_OPENS_IT } from './basis-words';
import { type SilicaDecision } from './decision';
import { type SilicaTask } from './silica-context';

/** Whether the decision hangs on a basis, had or missing. */
function hangsOnBasis(silica: SilicaDecision): silica is Extract<SilicaDecision, { kind: 'basis' | 'undecided' | 'no-pack' }> {
  return silica.kind === 'basis' || silica.kind === 'undecided' || silica.kind === 'no-pack';
}

/**
 * (a), (d)(2)(ii): outside Table 1 the employer first settles, from objective data or air samples, whether the rule applies and what the exposure is.
 * Here: work starts only on a basis that a named person signed and whose end date is not past (`decideSilica` finds it).
 * Undecided is held: exposure that cannot be reasonably estimated is never guessed (29 CFR 1910.134(d)(1)(iii)).
 */
export const basisRule: ShiftRule<SilicaTask> = {
  id: 'silica-signed-basis',
  title: words('Work outside Table 1 needs a signed basis', 'El trabajo fuera de la Tabla 1 necesita una base firmada'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(a), (d)(2)(ii)', note: '(a) read in a reproduction; (d)(2)(ii) in OAR 437-002-1056(2).' }),
  duties: ['SIL-01', 'SIL-07', 'RES-04'],
  topic: 'gate',
  holds: true,
  evaluate({ silica, facts, task, pack }) {
    if (!hangsOnBasis(silica)) return notApplicable(words('Not decided by a signed basis.', 'No se decide con una base firmada.'));
    // No law of this place on file: nothing to compare with.
    if (silica.kind === 'no-pack') {
      return undecided(sentences(pack.gap, pack.orientation?.words ?? null), WHO.localAuthority, {
        inputs: { place: facts.jurisdictionId },
        whatWouldChange: words('A pack for this place.', 'Reglas para este lugar.'),
      });
    }
    // No basis in force, or one that settles nothing.
    if (silica.kind === 'undecided') {
      const inputs = { task: task.kind, 'bases on file for this task': facts.bases.filter(({ taskKind }) => taskKind === task.kind).length, date: facts.date };
      return undecided(undecidedReason(silica.undecided), WHO.hygienist, { inputs, whatWouldChange: WHAT_OPENS_IT });
    }
    // Signed and in force: (a) below the action level under foreseeable conditions, or (d)(2) an exposure that is known or sampled today.
    const { basis } = silica.decision;
    return met(decidedReason(basis), {
      inputs: {
        basis: basis.kind,
        'exposure, µg/m³ as 8-hour average': basis.exposureMicrogramsPerM3,
        'limit, µg/m³ as 8-hour average': pack.silica?.limit ?? null,
        'signed by': basis.signedBy,
        'good to': basis.endsOn,
      },
      whatWouldChange: words('Other work, tools, products or place: ask again.', 'Otro trabajo, herramienta, producto o lugar: pregunte otra vez.'),
    });
  },
  line({ silica, traits }) {
    if (silica.kind === 'basis') {
      const kind = BASIS_KINDS[silica.decision.basis.kind];
      return words(`${kind.en}: signed by ${silica.decision.basis.signedBy}.`, `${kind.es}: firmó ${silica.decision.basis.signedBy}.`);
    }
    if (silica.kind === 'undecided' && silica.question === 'scope') return words('Not decided: does the silica rule apply?', 'Sin decidir: ¿aplica la regla de sílice?');
    return words(`${traits.name.en} may not start. Nobody has decided its exposure.`, `${traits.name.es}: no puede empezar. Nadie ha decidido la exposición.`);
  },
};

/** (d)(2): exposure is assessed. Here by sampling it: one shift under interim protection, for which one named person answers. */
export const samplingDayRule: ShiftRule<SilicaTask> = {
  id: 'silica-sampling-day',
  title: words('A sampling day takes samples', 'En un día de muestreo se toman muestras'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(d)(2)', note: 'Read in OAR 437-002-1056.' }),
  duties: ['SIL-08'],
  topic: 'control',
  holds: false,
  evaluate({ silica }) {
    if (silica.kind !== 'basis' || silica.decision.kind !== 'sampling-day') return notApplicable(words('No sampling day.', 'No es día de muestreo.'));
    return met(words(`${silica.decision.basis.signedBy} planned this one shift to measure the dust.`, `${silica.decision.basis.signedBy} planeó este turno para medir el polvo.`), { inputs: { 'signed by': silica.decision.basis.signedBy } });
  },
  line: () => words('Air pump on and running before the work starts.', 'Bomba de aire puesta y andando antes de empezar.'),
};

/**
 * (d)(1): the limit is an average over the 8 hours of the shift, so every part of the shift counts.
 * Here: the signed figure of one task says nothing about the same person's Table 1 minutes unless its signer counted them.
 */
export const combinedExposureRule: ShiftRule<SilicaTask> = {
  id: 'silica-combined-exposure',
  title: words('Table 1 work and other silica work in one shift', 'Trabajo de la Tabla 1 y otro trabajo con sílice en un turno'),
  source: usFederal('1926.1153', 'derived', { paragraph: '(d)', note: 'The 8-hour average needs a stated concentration for every part of the shift.' }),
  duties: ['AIR-01'],
  topic: 'gate',
  holds: true,
  evaluate({ silica, people, table1TimeByPerson, pack }) {
    // Only a figure within the limit (exposure ÷ limit at most 1) can pass it by the sum; one above it is `silica-over-limit`.
    if (silica.kind !== 'basis' || silica.decision.kind !== 'assessed' || silica.decision.ratio > 1) return notApplicable(words('No sum to make.', 'No hay suma que hacer.'));
    const { basis } = silica.decision;
    const mixed = people.filter(({ id }) => (table1TimeByPerson.get(id)?.minutes ?? 0) > 0);
    if (mixed.length === 0) return notApplicable(words('Nobody here does Table 1 work today.', 'Nadie aquí hace trabajo de la Tabla 1 hoy.'));
    const inputs = {
      'exposure, µg/m³ as 8-hour average': basis.exposureMicrogramsPerM3,
      'limit, µg/m³ as 8-hour average': pack.silica?.limit ?? null,
      'longest Table 1 time, minutes': Math.max(...mixed.map(({ id }) => table1TimeByPerson.get(id)?.minutes ?? 0)),
    };
    if (basis.includesTable1Work === true) return met(words('The signed figure counts the Table 1 work too.', 'La cifra firmada cuenta también el trabajo de la Tabla 1.'), { inputs });
    return undecided(words('The signed figure does not count the grinding of the same people.', 'La cifra firmada no cuenta lo que pulen las mismas personas.'), WHO.hygienist, {
      inputs,
      whatWouldChange: words('The signer counts the Table 1 work, or other people do this task.', 'Quien firma cuenta el trabajo de la Tabla 1, u otras personas hacen esta tarea.'),
    });
  },
  line: (_facts, { outcome }) =>
    outcome === 'met' ? words('Dust of the whole shift is counted.', 'El polvo de todo el turno está contado.') : words('Not decided: dust of the whole shift.', 'Sin decidir: el polvo de todo el turno.'),
};

/**
 * (d)(3)(i): above the limit the employer uses every feasible engineering and work practice control, down to the limit or as near to it as they reach;
 * (e)(1)(ii): where they do not reach it, respirators come on top.
 * Here: asked of a signed exposure with the controls on; the limit is the place's (`pack.silica.limit`, µg/m³ as 8-hour average).
 */
export const overLimitRule: ShiftRule<SilicaTask> = {
  id: 'silica-over-limit',
  title: words('Controls before masks above the limit', 'Controles antes que máscaras sobre el límite'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(d)(3)(i), (e)(1)', note: 'Controls first read in a training text; the rest recalled.' }),
  duties: ['SIL-12', 'SIL-14', 'RES-02'],
  topic: 'control',
  holds: false,
  evaluate({ silica, pack }) {
    // Nothing over the limit is known: exposure ÷ limit at most 1, or no signed exposure (held elsewhere: `silica-signed-basis`, the Table 1 rules).
    if (silica.kind !== 'basis' || silica.decision.kind !== 'assessed' || silica.decision.ratio <= 1) return notApplicable(words('No signed exposure is over the limit.', 'Ninguna exposición firmada pasa el límite.'));
    const { decision } = silica;
    // (d)(3)(i) more controls; (e)(1)(ii) until then a respirator whose factor covers the ratio (`apfForRatio`).
    return unmet(words('The air is over the limit even with the controls. The mask comes on top, not in their place.', 'El aire pasa el límite aun con los controles. La máscara va además, no en su lugar.'), {
      inputs: { 'exposure, µg/m³ as 8-hour average': decision.basis.exposureMicrogramsPerM3, 'limit, µg/m³ as 8-hour average': pack.silica?.limit ?? null },
      results: { 'exposure over limit': Math.round(decision.ratio * 100) / 100, 'protection factor, at least': decision.apf },
      whatWouldChange: words('Better controls and a new sample.', 'Mejores controles y otra muestra.'),
    });
  },
  line: () => words('All feasible controls on; then the mask.', 'Todos los controles puestos; luego la máscara.'),
};
