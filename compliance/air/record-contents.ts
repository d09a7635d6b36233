import { contentsRule, item } from '../contents';
import { WHO } from '../rule';
import { usFederal } from '../source';
import { words } from '../words';

// Each rule: met when every item is there, unmet when one is missing, undecided while nobody has looked (`contentsRule`).

/** (j)(1)(ii): the record of air samples holds (A) date, (B) task, (C) methods, (D) number, duration, results, (E) laboratory, (F) protection worn, (G) who was measured and whom that stands for. A Social Security number has no place in it: the federal rule dropped it in 2019. */
export const airRecordContents = contentsRule({
  id: 'air-record-contents',
  title: words('Record of air samples is whole', 'El registro de muestras de aire está completo'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(j)(1)', note: 'WAC 296-840-155(1); 84 FR 21416 of 14 May 2019 removed the Social Security number, wording recalled.' }),
  duties: ['SIL-23'],
  items: [
    // (A) to (G)
    item('date', 'date of each sample', 'fecha de cada muestra'),
    item('task', 'task monitored', 'tarea medida'),
    item('methods', 'sampling and analytical methods', 'métodos de muestreo y análisis'),
    item('results', 'number, duration and results', 'número, duración y resultados'),
    item('laboratory', 'laboratory', 'laboratorio'),
    item('protection', 'type of protection worn', 'tipo de protección usada'),
    item('people', 'names and jobs of all represented, and who was measured', 'nombres y puestos de los representados, y a quién se midió'),
  ],
});

/** (j)(2)(ii): the record of objective data relied on holds the material, source, testing protocol and results, the work it supports and other relevant data; (b): its conditions resemble the work closely or are worse. */
export const objectiveDataContents = contentsRule({
  id: 'objective-data-contents',
  title: words('Objective data record is whole', 'El registro de datos objetivos está completo'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(j)(2)', note: 'WAC 296-840-155(2); that conditions must closely resemble the work or be worse, from (b).' }),
  duties: ['SIL-07', 'SIL-23'],
  whoDecides: WHO.hygienist,
  items: [
    item('material', 'the silica-containing material', 'el material con sílice'),
    item('source', 'source of the data', 'fuente de los datos'),
    item('protocol', 'testing protocol and results', 'protocolo y resultados de las pruebas'),
    item('work', 'process, task or activity described', 'proceso, tarea o actividad descritos'),
    item('other', 'other relevant data', 'otros datos pertinentes'),
    // (b); then our own: data do not hold for ever.
    item('resembles', 'conditions closely like ours, or worse', 'condiciones muy parecidas a las nuestras, o peores'),
    item('until', 'until when and for what it is taken as valid', 'hasta cuándo y para qué se da por válido'),
  ],
});

/** (d)(2)(v): samples go to a laboratory that works by App. A: accredited, one of its methods, traceable standards, quality control. */
export const laboratoryContents = contentsRule({
  id: 'silica-laboratory',
  title: words('Laboratory fits the rule', 'El laboratorio cumple la norma'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(d)(2)(v), App. A', note: 'That Appendix A holds was read; its contents recalled. OSHA ID-142 is no longer supported by OSHA’s own laboratory.' }),
  duties: ['SIL-10'],
  whoDecides: WHO.hygienist,
  items: [
    item('accreditation', 'accredited to ISO/IEC 17025', 'acreditado según ISO/IEC 17025'),
    item('method', 'one of the listed methods', 'uno de los métodos de la lista'),
    item('standards', 'traceable standards', 'patrones trazables'),
    item('quality', 'internal quality control', 'control de calidad interno'),
  ],
});

/** (d)(2)(vii): (A) affected people or their representatives may watch the sampling; (B) who watches where protection is asked gets it at no cost. */
export const observationOffered = contentsRule({
  id: 'monitoring-observation',
  title: words('Observation of sampling offered', 'Se ofreció observar el muestreo'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(d)(2)(vii)', note: 'Training text.' }),
  duties: ['SIL-24'],
  items: [
    item('offered', 'affected people or their representatives were offered to watch', 'se ofreció observar a los afectados o sus representantes'),
    item('protected', 'protection for the observer at no cost', 'protección gratuita para quien observa'),
  ],
});
