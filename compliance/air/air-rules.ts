import { checkNumber } from '../input-error';
import { met, notApplicable, undecided, unmet, WHO, type Rule } from '../rule';
import { usFederal } from '../source';
import { words } from '../words';
import { airflowDemand, meetsAirflow } from './airflow';
import { dilutionVentilation } from './dilution';
import { findLimit, inMgPerM3 } from './limits';
import { additiveMixture, type MixtureMember } from './mixture';
import { SUBSTANCES } from './substances.data';
import { shiftTwa } from './twa';

export interface AverageFacts {
  readonly substanceId: string;
  readonly jurisdictionId: string;
  readonly shiftMinutes: number;
  /** mg/m³; null where nobody stated it. */
  readonly periods: readonly { readonly concentrationMgPerM3: number | null; readonly minutes: number }[];
}

/** To four figures, for reading; decisions use the whole value. */
const round = (value: number): number => Number(value.toPrecision(4));

/**
 * 1926.55(a): no one breathes more of a substance than its limit in App. A, as an 8-hour average; the average is Σ concentration × hours ÷ 8 (1910.1000(d)(1)(i)).
 * Here: the average over the whole shift (`twa.ts`) against the place's limit in force on the day (`limits.data.ts`); exactly the limit is not above it. The worst 8 hours stand beside.
 */
export const averageWithinLimit: Rule<AverageFacts> = {
  id: 'air-average-within-limit',
  title: words('8-hour average within the limit', 'Promedio de 8 horas dentro del límite'),
  source: usFederal('1926.55', 'partly', { paragraph: '(a), App. A', note: 'That construction has its own limits was read; average by the formula of 1910.1000(d)(1)(i).' }),
  duties: ['AIR-01', 'AIR-02'],
  evaluate({ substanceId, jurisdictionId, shiftMinutes, periods }, asOf) {
    const twa = shiftTwa(shiftMinutes, periods.map(({ concentrationMgPerM3, minutes }) => ({ concentration: concentrationMgPerM3, minutes })));
    const inputs = { substance: substanceId, 'minutes of the shift': shiftMinutes };
    if (!twa.isDecided) return undecided(twa.reason, twa.whoDecides, { inputs, whatWouldChange: words('State the concentration of every minute.', 'Indique la concentración de cada minuto.') });
    // The limit of the place on that day, in mg/m³.
    const limit = findLimit(substanceId, jurisdictionId, 'twa-8h', asOf);
    const results = { 'whole shift ÷ 8 h, mg/m³': round(twa.wholeShift), 'worst 8 h, mg/m³': round(twa.worstEightHours) };
    const extra = { inputs, results, whatWouldChange: words('Better controls or less time.', 'Mejores controles o menos tiempo.') };
    if (!limit.isDecided) return undecided(limit.reason, limit.whoDecides, extra);
    const molarMass = SUBSTANCES.find((each) => each.id === substanceId)?.molarMassGPerMol ?? null;
    const limitMgPerM3 = inMgPerM3(limit.row.value!, limit.row.unit, molarMass);
    if (limitMgPerM3 === null) return undecided(words('The limit counts particles: it cannot be compared with a weight.', 'El límite cuenta partículas: no se compara con un peso.'), WHO.hygienist, extra);
    const shown = `${round(twa.wholeShift)} / ${round(limitMgPerM3)} mg/m³`;
    return twa.wholeShift > limitMgPerM3 ? unmet(words(`Above the limit: ${shown}.`, `Sobre el límite: ${shown}.`), extra) : met(words(`Not above the limit: ${shown}.`, `No supera el límite: ${shown}.`), extra);
  },
};

/** 1910.1000(d)(2)(i): for contaminants that act together, the sum of average ÷ limit over them (`additiveMixture`) is at most 1. */
export const mixtureWithinLimits: Rule<{ readonly members: readonly MixtureMember[] }> = {
  id: 'air-mixture-within-limits',
  title: words('Contaminants together within their limits', 'Contaminantes juntos dentro de sus límites'),
  source: usFederal('1910.1000', 'read', { paragraph: '(d)(2)(i)', note: 'The formula; the limits are those of construction.' }),
  duties: ['AIR-01'],
  evaluate({ members }) {
    const mixture = additiveMixture(members);
    const inputs = { contaminants: members.length };
    if (!mixture.isDecided) return undecided(mixture.reason, mixture.whoDecides, { inputs, whatWouldChange: words('A limit for each of them.', 'Un límite para cada uno.') });
    const results = { 'sum of shares': round(mixture.index) };
    const text = words(`The shares add up to ${round(mixture.index)}.`, `Las partes suman ${round(mixture.index)}.`);
    return mixture.isExceeded ? unmet(text, { inputs, results, whatWouldChange: words('Less of any of them.', 'Menos de cualquiera de ellos.') }) : met(text, { inputs, results });
  },
};

export interface AirflowFacts {
  readonly isHandheldGrinder: boolean;
  readonly wheelDiameterMm: number | null;
  readonly makerAirflowM3PerH: number | null;
  /** Measured at the shroud in real use; null where nobody measured. */
  readonly measuredM3PerH: number | null;
}

/**
 * (c)(1) Table 1 rows (xi), (xii): a handheld grinder's collector moves 25 cfm for each inch of wheel, or more (`CFM_PER_INCH_OF_WHEEL`, `airflow.ts`); row (xiii): a walk-behind machine's, what its maker recommends.
 * Here: against the flow measured at the shroud; too little loses Table 1.
 */
export const collectorAirflow: Rule<AirflowFacts> = {
  id: 'collector-airflow',
  title: words('Collector moves enough air', 'El colector mueve suficiente aire'),
  source: usFederal('1926.1153', 'read', { paragraph: '(c)(1) Table 1 rows (xi) to (xiii)' }),
  duties: ['AIR-03', 'SIL-06'],
  evaluate(facts) {
    const demand = airflowDemand(facts);
    const inputs = { 'measured, m³/h': facts.measuredM3PerH, 'wheel, mm': facts.wheelDiameterMm };
    if (!demand.isDecided) return undecided(demand.reason, demand.whoDecides, { inputs, whatWouldChange: words('Put the figure on file.', 'Registre la cifra.') });
    const results = { 'required, m³/h': round(demand.requiredM3PerH) };
    if (facts.measuredM3PerH === null) return undecided(words('Nobody has measured the airflow.', 'Nadie ha medido el caudal de aire.'), WHO.competentPerson, { inputs, results, whatWouldChange: words('Measure at the shroud, tool running.', 'Mida en la campana, con la herramienta en marcha.') });
    return meetsAirflow(checkNumber('measuredM3PerH', facts.measuredM3PerH, { min: 0 }), demand.requiredM3PerH)
      ? met(demand.reason, { inputs, results })
      : unmet(words(`Too little air, so Table 1 is lost. ${demand.reason.en}`, `Poco aire: se pierde la Tabla 1. ${demand.reason.es}`), { inputs, results, whatWouldChange: words('Clean or change the filter, shorten the hose, or take a larger collector.', 'Limpie o cambie el filtro, acorte la manguera o use un colector mayor.') });
  },
};

export type DilutionFacts = Parameters<typeof dilutionVentilation>[0] & { readonly suppliedM3PerH: number | null };

/**
 * (a): where ventilation is the control, it keeps the air within the limits; (d): it runs through the whole operation and after it.
 * Here: the fans move the fresh air that the formula of `dilution.ts` asks; dust and sensitizers are refused, since dilution is no control for them.
 */
export const dilutionEnough: Rule<DilutionFacts> = {
  id: 'dilution-ventilation',
  title: words('Fresh air where fresh air can do it', 'Aire fresco donde el aire fresco basta'),
  source: usFederal('1926.57', 'read', { paragraph: '(a), (d)', note: '(a) keeps the air within the limits, (d) lets ventilation run during the whole operation and after it; (b) is local exhaust. The amount by the industrial ventilation formula.' }),
  duties: ['AIR-04'],
  evaluate({ suppliedM3PerH, ...contaminant }) {
    const answer = dilutionVentilation(contaminant);
    const inputs = { form: contaminant.form, 'supplied, m³/h': suppliedM3PerH };
    if (!answer.isAllowed) return unmet(answer.reason, { inputs, whatWouldChange: words('Extraction at the source.', 'Extracción en el origen.') });
    if (answer.requiredM3PerH === 0) return notApplicable(words('Nothing evaporates.', 'Nada se evapora.'), { inputs });
    const results = { 'required, m³/h': round(answer.requiredM3PerH) };
    const text = words(`${round(answer.requiredM3PerH)} m³/h needed.`, `Se necesitan ${round(answer.requiredM3PerH)} m³/h.`);
    if (suppliedM3PerH === null) return undecided(text, WHO.competentPerson, { inputs, results, whatWouldChange: words('Say what the fans move.', 'Diga cuánto mueven los ventiladores.') });
    return checkNumber('suppliedM3PerH', suppliedM3PerH, { min: 0 }) >= answer.requiredM3PerH ? met(text, { inputs, results }) : unmet(text, { inputs, results, whatWouldChange: words('More fresh air.', 'Más aire fresco.') });
  },
};
