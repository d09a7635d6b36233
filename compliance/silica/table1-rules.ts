import { type Words } from '../outcome';
import { cfmFromM3PerH } from '../quantities/units';
import { met, notApplicable, undecided, unmet, WHO } from '../rule';
import { type ShiftRule } from '../shift-rule';
import { usFederal } from '../source';
import { duration, sentences, words } from '../words';
import { requiredAirflow, type ControlCheck } from './table1-controls';
import { type LeftTable1 } from './decision';
import { silicaRespirator } from './respirator';
import { type SilicaPerson, type SilicaTask } from './silica-context';
import { NO_TABLE_1_TIME } from './minutes';
import { FOUR_HOURS_MINUTES, table1Place } from './table1';
import { DEMAND_WORDS } from './table1-demands.data';
import { TABLE_1, type Table1Demand, type Table1Respirator } from './table1.data';

const cfm = (m3PerH: number): number => Math.round(cfmFromM3PerH(m3PerH));
const AIRFLOW: readonly Table1Demand[] = ['airflow-makers-figure', 'airflow-25-cfm-per-inch'];

/** No fact says that the maker names this very collector: the figure and the manual are what is on file. */
const MAKERS_SYSTEM = words('A collector and the maker\'s figure for it are on file. The manual names the ones that fit.', 'Hay colector y la cifra del fabricante. El manual dice cuáles sirven.');

const LEFT: Readonly<Record<LeftTable1['because'], Words>> = {
  machine: words('No row of Table 1 fits this machine.', 'Ninguna fila de la Tabla 1 sirve para esta máquina.'),
  method: words('Table 1 has no row for this tool with this dust control.', 'La Tabla 1 no tiene fila para esta herramienta con este control de polvo.'),
  place: words('Table 1 does not cover this indoors or in closed places.', 'La Tabla 1 no cubre esto adentro ni en lugares cerrados.'),
  'not-compared': words('This row was not compared with the text of this place.', 'Esta fila no se comparó con el texto de este lugar.'),
  controls: words('One control of the row is missing, so Table 1 is lost.', 'Falta un control de la fila, así que se pierde la Tabla 1.'),
};
const RESTORES: Readonly<Record<LeftTable1['because'], Words>> = {
  machine: words('The competent person records why a row fits, or a signed basis.', 'La persona competente anota por qué sirve una fila, o una base firmada.'),
  method: words('Use the vacuum or water the row asks, or a signed basis.', 'Use la aspiradora o el agua que pide la fila, o una base firmada.'),
  place: words('Use the row\'s vacuum indoors, or a signed basis.', 'Use adentro la aspiradora de la fila, o una base firmada.'),
  'not-compared': words('Someone reads the local text, or a signed basis.', 'Alguien lee el texto local, o una base firmada.'),
  controls: words('Fix it and check it, or re-assess.', 'Arréglelo y revíselo, o evalúe otra vez.'),
};

/** A row whose every option is outdoors only has no control that would let it in. */
function whatRestores({ because, row }: LeftTable1): Words {
  const isOutdoorsOnly = because === 'place' && TABLE_1.every((option) => option.row !== row || option.indoors === null);
  return isOutdoorsOnly ? words('Do it outdoors, or a signed basis.', 'Hágalo afuera, o una base firmada.') : RESTORES[because];
}

/**
 * (c)(1): the row of Table 1 that names the equipment and task gives controls and respirator; (d): a task that no row fits, or whose row is not fully kept, is assessed instead.
 * Here: `decideTable1` (`decision.ts`) finds the row by machine, dust control and place; a task that leaves Table 1 is held until it is back or a basis is signed.
 */
export const table1RowRule: ShiftRule<SilicaTask> = {
  id: 'silica-table-1-row',
  title: words('The Table 1 row of the task', 'La fila de la Tabla 1 para la tarea'),
  source: usFederal('1926.1153', 'read', { paragraph: '(c)(1), (d)' }),
  duties: ['SIL-02', 'SIL-06'],
  topic: 'gate',
  holds: true,
  evaluate({ silica, tool, task, facts }) {
    const inputs = { tool: tool?.name ?? null, 'dust control': task.dustMethod, setting: facts.setting };
    switch (silica.kind) {
      // (c)(1) A row fits; whether its controls are whole is `silica-table-1-whole`.
      case 'table-1':
      case 'controls-unknown':
        return met(silica.option.heading, { inputs, results: { row: silica.option.row } });
      // (d) No row fits, or a control of it is missing, and no basis is signed.
      case 'lost':
        if (silica.left.because === 'not-compared') return undecided(LEFT['not-compared'], WHO.localAuthority, { inputs, results: { row: silica.left.row }, whatWouldChange: RESTORES['not-compared'] });
        return unmet(LEFT[silica.left.because], { inputs, results: { row: silica.left.row }, whatWouldChange: whatRestores(silica.left) });
      // The row hangs on a machine or dust control that nobody chose.
      case 'not-chosen':
        return silica.missing === 'machine'
          ? undecided(words('No machine is chosen, so no row can be.', 'No hay máquina elegida, así que no hay fila.'), WHO.competentPerson, { inputs, whatWouldChange: words('Choose the machine.', 'Elija la máquina.') })
          : undecided(words('Nobody said how the dust is held: vacuum or water.', 'Nadie dijo cómo se controla el polvo: aspiradora o agua.'), WHO.competentPerson, { inputs, whatWouldChange: words('Choose vacuum or water.', 'Elija aspiradora o agua.') });
      default:
        return notApplicable(words('Not a Table 1 task today.', 'Hoy no es tarea de la Tabla 1.'));
    }
  },
  line({ silica, traits }) {
    if (silica.kind === 'table-1' || silica.kind === 'controls-unknown') return words(`Table 1, row ${silica.option.row}.`, `Tabla 1, fila ${silica.option.row}.`);
    if (silica.kind === 'lost') return words(`${traits.name.en} may not start: not in Table 1 today.`, `${traits.name.es}: no puede empezar, hoy no está en la Tabla 1.`);
    return words(`${traits.name.en} may not start: machine or dust control not chosen.`, `${traits.name.es}: no puede empezar, falta elegir máquina o control de polvo.`);
  },
  sourceOf: ({ silica }) => (silica.kind === 'table-1' || silica.kind === 'controls-unknown' ? silica.option.source : table1RowRule.source),
};

export interface ControlOfTask extends SilicaTask {
  readonly check: ControlCheck;
}

/** Checks of the row that are on file, not by eye: what each found. */
export function controlChecks({ silica }: SilicaTask): readonly ControlCheck[] {
  if (silica.kind === 'table-1' || silica.kind === 'controls-unknown') return silica.checks;
  if (silica.kind === 'lost') return silica.left.checks;
  return silica.kind === 'basis' ? (silica.leftTable1?.checks ?? []) : [];
}

function airflowInputs({ silica, tool, collector }: ControlOfTask): Readonly<Record<string, string | number | null>> {
  const option = 'option' in silica ? silica.option : null;
  const required = option === null || tool === null ? (tool?.requiredAirflowM3PerH ?? null) : requiredAirflow(option, tool);
  const reading = collector?.airflow ?? null;
  return {
    'airflow asked, cfm': required === null ? null : cfm(required),
    'wheel, mm': tool?.wheelDiameterMm ?? null,
    'airflow read, cfm': reading === null ? null : cfm(reading.airflowM3PerH),
    'read with': reading?.instrument ?? null,
    'read at': reading?.place ?? null,
    filter: reading?.filterState ?? null,
    'read by': reading?.takenBy ?? null,
    'read on': reading?.takenOn ?? null,
  };
}

function otherInputs({ collector, tool }: ControlOfTask): Readonly<Record<string, string | number | boolean | null>> {
  return { tool: tool?.name ?? null, collector: collector?.name ?? null, 'filter, percent': collector?.filterEfficiencyPercent ?? null };
}

/**
 * (c)(1): every control and work practice of the row is fully and properly in place; (d): one that is not loses Table 1.
 * Here: one line a control, as `checkControls` (`table1-controls.ts`) compared it with the equipment on the truck; what only the eye can tell is asked at the start of the task.
 */
export const table1ControlRule: ShiftRule<ControlOfTask> = {
  id: 'silica-table-1-control',
  title: words('The controls of the Table 1 row', 'Los controles de la fila de la Tabla 1'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(c)(1) Table 1', note: 'Each row carries its own mark.' }),
  duties: ['SIL-02', 'SIL-06', 'AIR-03'],
  topic: 'control',
  holds: false,
  evaluate(facts) {
    const { check } = facts;
    const inputs = AIRFLOW.includes(check.demand) ? airflowInputs(facts) : otherInputs(facts);
    switch (check.state) {
      case 'met':
        return met(check.demand === 'dust-collection-makers-system' ? MAKERS_SYSTEM : words('The row asks it, and it is on file.', 'La fila lo pide y está anotado.'), { inputs });
      case 'unmet':
        return unmet(LEFT.controls, { inputs, whatWouldChange: RESTORES.controls });
      case 'unknown':
        return undecided(words('The row asks it, and nobody wrote it down.', 'La fila lo pide y nadie lo anotó.'), WHO.competentPerson, { inputs, whatWouldChange: words('Measure it or look it up, and write it down.', 'Mídalo o búsquelo, y anótelo.') });
      default:
        return notApplicable(words('Seen on the floor, at the start of the task.', 'Se ve en el piso, al empezar la tarea.'));
    }
  },
  line(facts) {
    const { check } = facts;
    if (!AIRFLOW.includes(check.demand)) return DEMAND_WORDS[check.demand];
    const { 'airflow asked, cfm': asked, 'airflow read, cfm': read } = airflowInputs(facts);
    const maker = check.demand === 'airflow-makers-figure';
    const ask = asked === null || asked === undefined ? null : maker ? words(`Maker asks ${asked}.`, `El fabricante pide ${asked}.`) : words(`${asked} asked.`, `Se piden ${asked}.`);
    return sentences(read === null || read === undefined ? DEMAND_WORDS[check.demand] : words(`Collector ${read} cfm.`, `Colector ${read} cfm.`), ask);
  },
  sourceOf: ({ silica }) => ('option' in silica ? silica.option.source : table1ControlRule.source),
};

/**
 * (c)(1): the controls are in place fully, not in part; (d): else the task is not in Table 1.
 * Here: a control that failed today, or that nobody wrote down, holds the task; kept apart from the lines of the single controls so that the hold is said once.
 */
export const table1WholeRule: ShiftRule<SilicaTask> = {
  id: 'silica-table-1-whole',
  title: words('Table 1 is all or nothing', 'La Tabla 1 es todo o nada'),
  source: usFederal('1926.1153', 'read', { paragraph: '(c)(1), (d)' }),
  duties: ['SIL-06'],
  topic: 'gate',
  holds: true,
  evaluate({ silica, task }) {
    // (d) A control failed on the day.
    if (silica.kind === 'control-failed') {
      return unmet(words(`Stopped: ${silica.control}`, `Detenido: ${silica.control}`), { inputs: { 'failed control': task.failedControl }, whatWouldChange: RESTORES.controls });
    }
    // (c)(1) A control of the row is not on file.
    if (silica.kind !== 'controls-unknown') return notApplicable(words('Nothing is open.', 'No falta nada.'));
    const open = silica.checks.filter(({ state }) => state === 'unknown').map(({ demand }) => DEMAND_WORDS[demand]);
    return undecided(sentences(words('Not on file:', 'Sin anotar:'), ...open), WHO.competentPerson, {
      inputs: { row: silica.option.row, 'controls not on file': open.length },
      whatWouldChange: words('Write down what is missing.', 'Anote lo que falta.'),
    });
  },
  line: ({ traits, silica }) =>
    silica.kind === 'control-failed'
      ? words(`${traits.name.en} stopped. Fix it, or re-assess.`, `${traits.name.es}: detenido. Arréglelo, o evalúe otra vez.`)
      : words(`${traits.name.en} may not start: a control is not on file.`, `${traits.name.es}: no puede empezar, falta anotar un control.`),
};

/** Where both columns ask the same, no minutes turn the answer. */
function whatMinutesChange(respirator: Table1Respirator | null, minutes: number): Words | null {
  if (respirator === null || respirator.upTo4Hours === respirator.over4Hours) return null;
  return minutes > FOUR_HOURS_MINUTES ? words('4 h or less in all.', '4 h o menos en total.') : words('More than 4 h in all.', 'Más de 4 h en total.');
}

/**
 * (c)(3): a person whose Table 1 tasks of the shift add up to more than four hours (240 minutes; exactly four is not more) takes, in each of them, the respirator of the column "> 4 hours", else that of "≤ 4 hours".
 * The sum over all jobs: `table1Time` (`minutes.ts`); the row's two columns: `table1.data.ts`; which one: `table1Apf` (`table1.ts`).
 */
export const table1RespiratorRule: ShiftRule<SilicaPerson> = {
  id: 'silica-table-1-respirator',
  title: words('The Table 1 mask by minutes and place', 'La máscara de la Tabla 1 por minutos y lugar'),
  source: usFederal('1926.1153', 'partly', { paragraph: '(c)(3)', note: 'Read in WAC 296-840-110(3) and OAR 437-002-1057(4), first half; second half recalled.' }),
  duties: ['SIL-03', 'SIL-04'],
  topic: 'protection',
  holds: false,
  evaluate({ silica, person, table1TimeByPerson, facts, pack }) {
    if (silica.kind !== 'table-1') return notApplicable(words('Not a Table 1 task.', 'No es tarea de la Tabla 1.'));
    const time = table1TimeByPerson.get(person.id) ?? NO_TABLE_1_TIME;
    const answer = silicaRespirator(silica, table1Place(facts.setting), time.minutes, pack.silica?.factors ?? null);
    return met(
      words(`${person.name}: ${duration(time.minutes)} of Table 1 work today, all jobs.`, `${person.name}: ${duration(time.minutes)} de trabajo de la Tabla 1 hoy, en todas las obras.`),
      {
        inputs: { 'Table 1 time, minutes': time.minutes, 'of it on other jobs, minutes': time.minutesElsewhere, 'of it logged past the plan, minutes': time.minutesLoggedBeyondPlan, setting: facts.setting, row: silica.option.row },
        results: { 'protection factor, at least': answer.apf, ...(answer.apf === null ? {} : { 'particle filter by law': 'N, R or P, 95 or more' }) },
        whatWouldChange: whatMinutesChange(silica.option[table1Place(facts.setting)], time.minutes),
      },
    );
  },
  line({ silica, person, table1TimeByPerson, facts, pack }) {
    const { label } = silicaRespirator(silica, table1Place(facts.setting), table1TimeByPerson.get(person.id)?.minutes ?? 0, pack.silica?.factors ?? null);
    return words(`${person.name}: ${label.en}.`, `${person.name}: ${label.es}.`);
  },
  sourceOf: ({ silica }) => (silica.kind === 'table-1' ? silica.option.source : table1RespiratorRule.source),
};
