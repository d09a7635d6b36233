import { type ExposureBasis } from '../facts';
import { type Words } from '../outcome';
import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { sentences, words } from '../words';
import { type BasisFault } from './basis';
import { type SilicaDecision, type Undecided } from './decision';
import { type SilicaTask } from './silica-context';

const FAULTS: Readonly<Record<BasisFault, Words>> = {
  'no-exposure': words('The signed basis names no figure.', 'La base firmada no da una cifra.'),
  'no-conditions': words('The signed basis names no conditions.', 'La base firmada no da condiciones.'),
  'not-below-action-level': words('The signed basis says "below the action level", but its figure is not.', 'La base firmada dice «bajo el nivel de acción», pero su cifra no lo está.'),
  'no-action-level': words('This place has no action level.', 'Este lugar no tiene nivel de acción.'),
  'no-interim-respirator': words('The sampling day names no mask. Its signer must write one.', 'El día de muestreo no dice qué máscara. Quien firma debe escribirla.'),
  'no-factors': words('It is over the limit, and no mask factors of this place are on file.', 'Pasa el límite, y no hay factores de máscara de este lugar.'),
  'beyond-every-respirator': words('The figure is past what any mask can stop.', 'La cifra pasa lo que detiene cualquier máscara.'),
};

const KINDS: Readonly<Record<ExposureBasis['kind'], Words>> = {
  'objective-data': words('Objective data', 'Datos objetivos'),
  'air-samples': words('Air samples', 'Muestras de aire'),
  'sampling-day': words('Sampling day', 'Día de muestreo'),
  'below-action-level': words('Below the action level', 'Bajo el nivel de acción'),
};

export const WHAT_OPENS_IT = words(
  'A qualified person signs a basis with conditions and an end date, or plans a sampling day.',
  'Una persona calificada firma una base con condiciones y fecha final, o planea un día de muestreo.',
);

function undecidedReason({ fault, ended }: Undecided): Words {
  const gap = fault !== null ? FAULTS[fault] : ended === null ? null : words(`The basis of ${ended.signedBy} ended on ${ended.endsOn}.`, `La base de ${ended.signedBy} terminó el ${ended.endsOn}.`);
  return sentences(words('No air sample or objective data for this setting.', 'No hay muestra de aire ni datos objetivos para este lugar.'), gap);
}

function decidedReason(basis: ExposureBasis): Words {
  const kind = KINDS[basis.kind];
  return words(
    `${kind.en}, signed by ${basis.signedBy} on ${basis.signedOn}, good to ${basis.endsOn}. Conditions: ${basis.conditions}`,
    `${kind.es}, firmado por ${basis.signedBy} el ${basis.signedOn}, vale hasta ${basis.endsOn}. Condiciones: ${basis.conditions}`,
  );
}

/** Whether the decision hangs on a basis, had or missing. */
function hangsOnBasis(silica: SilicaDecision): silica is Extract<SilicaDecision, { kind: 'basis' | 'undecided' | 'no-pack' }> {
  return silica.kind === 'basis' || silica.kind === 'undecided' || silica.kind === 'no-pack';
}

/**
 * Work outside Table 1 starts only on a decision that a named person signed: does the rule apply ((a)), or what is the exposure ((d)).
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
    if (silica.kind === 'no-pack') {
      return undecided(sentences(pack.gap, pack.orientation?.words ?? null), WHO.localAuthority, {
        inputs: { place: facts.jurisdictionId },
        whatWouldChange: words('A pack for this place.', 'Reglas para este lugar.'),
      });
    }
    if (silica.kind === 'undecided') {
      const inputs = { task: task.kind, 'bases on file for this task': facts.bases.filter(({ taskKind }) => taskKind === task.kind).length, date: facts.date };
      return undecided(undecidedReason(silica.undecided), WHO.hygienist, { inputs, whatWouldChange: WHAT_OPENS_IT });
    }
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
      const kind = KINDS[silica.decision.basis.kind];
      return words(`${kind.en}: signed by ${silica.decision.basis.signedBy}.`, `${kind.es}: firmó ${silica.decision.basis.signedBy}.`);
    }
    if (silica.kind === 'undecided' && silica.question === 'scope') return words('Not decided: does the silica rule apply?', 'Sin decidir: ¿aplica la regla de sílice?');
    return words(`${traits.name.en} may not start. Nobody has decided its exposure.`, `${traits.name.es}: no puede empezar. Nadie ha decidido la exposición.`);
  },
};

/** A day on which samples are taken under interim protection: one shift, one named person answers for it. */
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

/** The signed figure of one task says nothing about the same person's Table 1 minutes unless its signer counted them (8-hour average, (d)). */
export const combinedExposureRule: ShiftRule<SilicaTask> = {
  id: 'silica-combined-exposure',
  title: words('Table 1 work and other silica work in one shift', 'Trabajo de la Tabla 1 y otro trabajo con sílice en un turno'),
  source: usFederal('1926.1153', 'derived', { paragraph: '(d)', note: 'The 8-hour average needs a stated concentration for every part of the shift.' }),
  duties: ['AIR-01'],
  topic: 'gate',
  holds: true,
  evaluate({ silica, people, table1TimeByPerson, pack }) {
    if (silica.kind !== 'basis' || silica.decision.kind !== 'assessed' || silica.decision.apf !== null) return notApplicable(words('No sum to make.', 'No hay suma que hacer.'));
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

/** Exposure above the limit: controls first, then the respirator that the ratio asks ((d)(3)(i), (e)). */
export const overLimitRule: ShiftRule<SilicaTask> = {
  id: 'silica-over-limit',
  title: words('Controls before masks above the limit', 'Controles antes que máscaras sobre el límite'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(d)(3)(i), (e)(1)', note: 'Controls first read in a training text; the rest recalled.' }),
  duties: ['SIL-12', 'SIL-14', 'RES-02'],
  topic: 'control',
  holds: false,
  evaluate({ silica, pack }) {
    if (silica.kind !== 'basis' || silica.decision.kind !== 'assessed' || silica.decision.apf === null) return notApplicable(words('The limit is kept.', 'Se cumple el límite.'));
    const { decision } = silica;
    return unmet(words('The air is over the limit even with the controls. The mask comes on top, not in their place.', 'El aire pasa el límite aun con los controles. La máscara va además, no en su lugar.'), {
      inputs: { 'exposure, µg/m³ as 8-hour average': decision.basis.exposureMicrogramsPerM3, 'limit, µg/m³ as 8-hour average': pack.silica?.limit ?? null },
      results: { 'exposure over limit': Math.round(decision.ratio * 100) / 100, 'protection factor, at least': decision.apf },
      whatWouldChange: words('Better controls and a new sample.', 'Mejores controles y otra muestra.'),
    });
  },
  line: () => words('All feasible controls on; then the mask.', 'Todos los controles puestos; luego la máscara.'),
};
