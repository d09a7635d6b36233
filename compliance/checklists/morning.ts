import { type ChecklistLine, type ShiftAnswer, type TaskAnswer } from '../answer';
import { type EquipmentFacts, type ShiftFacts } from '../facts';
import { hazardWords } from '../hazcom/hazard-words';
import { trainingAtNewHazard } from '../hazcom/sheet-rules';
import { type Words } from '../outcome';
import { sourced, usFederal, type Source } from '../source';
import { inside, listed, words } from '../words';

type Line = Omit<ChecklistLine, 'taskId' | 'mark' | 'isCritical'> & Partial<Pick<ChecklistLine, 'taskId' | 'mark' | 'isCritical'>>;

const line = (each: Line): ChecklistLine => ({ taskId: null, mark: null, isCritical: true, ...each, id: `morning/${each.id}` });

/** What the morning can know: it is here, it is whole, it fits. What only the start of a task can know is asked there. */
export function morningLines(facts: ShiftFacts, answer: ShiftAnswer, maskNames: readonly string[]): readonly ChecklistLine[] {
  const open = answer.tasks.filter(({ state }) => state === 'ready');
  return [...gateLines(answer), ...machineLines(facts, open), ...kitLines(facts, answer), ...materialLines(open), ...peopleLines(open, maskNames)];
}

const ASKED_GATES = ['competent-person-named', 'floor-survey', 'host-hazards-asked', 'engines-indoors', 'first-aid-named'];

/** Settled gates are asked again on the spot; open ones hold and are no question for the morning. */
function gateLines({ gates }: ShiftAnswer): readonly ChecklistLine[] {
  return ASKED_GATES.flatMap((ruleId) =>
    gates.filter((gate) => gate.ruleId === ruleId && gate.outcome === 'met').map((gate) => line({ id: ruleId, ruleId, text: ruleId === 'floor-survey' ? words('The floor is as the check says.', 'El piso está como dice la revisión.') : gate.text, why: gate.reason, source: gate.source })),
  );
}

function machinesOf(facts: ShiftFacts, tasks: readonly TaskAnswer[], pick: 'equipmentId' | 'collectorId'): readonly EquipmentFacts[] {
  const open = new Set(tasks.map(({ taskId }) => taskId));
  const ids = new Set(facts.tasks.filter(({ id }) => open.has(id)).map((task) => task[pick]));
  return facts.equipment.filter(({ id }) => ids.has(id));
}

function machineLines(facts: ShiftFacts, open: readonly TaskAnswer[]): readonly ChecklistLine[] {
  const tools = machinesOf(facts, open, 'equipmentId');
  const collectors = machinesOf(facts, open.filter(({ silicaBasis }) => silicaBasis === 'table-1'), 'collectorId');
  const names = (machines: readonly EquipmentFacts[]): Words => listed(machines.map(({ name }) => name));
  return [
    ...(collectors.length === 0
      ? []
      : [line({ id: 'collectors', ruleId: 'silica-table-1-control', text: words(`Filter in, hose whole, gauge mark set: ${names(collectors).en}.`, `Filtro puesto, manguera entera, marca lista: ${names(collectors).es}.`), why: words('A weak collector ends Table 1.', 'Un colector débil acaba con la Tabla 1.'), source: usFederal('1926.1153', 'partly', { paragraph: '(c)(1) Table 1', note: 'Each row carries its own mark.' }) })]),
    ...(tools.length === 0
      ? []
      : [line({ id: 'machines', ruleId: 'machine-manual-on-file', text: words(`Guard, cord and ground-fault plug are good: ${names(tools).en}.`, `Guarda, cable y enchufe GFCI en buen estado: ${names(tools).es}.`), why: words('A bad cord or no guard can kill.', 'Un mal cable o sin guarda puede matar.'), source: usFederal('1926.300', 'from-memory', { paragraph: 'and 1926.302, .303, .404' }) })]),
  ];
}

/** What each kit can do, from its confirmed sheets: a sheet that brings a new hazard changes this line, so the crew is briefed again. */
function kitLines(facts: ShiftFacts, { kits }: ShiftAnswer): readonly ChecklistLine[] {
  return facts.kits.flatMap((kit) => {
    const said = hazardWords(kits.find(({ kitId }) => kitId === kit.id)?.hazardCodes ?? []);
    if (said.length === 0) return [];
    return [
      line({
        id: `kit/${kit.id}`,
        ruleId: trainingAtNewHazard.id,
        isCritical: false,
        text: words(`We told the crew about ${kit.name}. It ${said.map((each) => each.en).join('. It ')}.`, `Explicamos ${kit.name} al equipo. ${said.map((each) => capital(each.es)).join('. ')}.`),
        why: words('The sheets of its parts say so. A new hazard is told before work.', 'Lo dicen las hojas de sus partes. Un peligro nuevo se explica antes.'),
        source: trainingAtNewHazard.source,
      }),
    ];
  });
}
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

function materialLines(open: readonly TaskAnswer[]): readonly ChecklistLine[] {
  const findingOf = (ruleId: string) => open.flatMap(({ findings }) => findings).find((finding) => finding.ruleId === ruleId && finding.outcome === 'met');
  const eyewash = findingOf('eyewash-in-reach');
  const sheets = findingOf('sheet-for-every-product');
  return [
    ...(eyewash === undefined ? [] : [line({ id: 'eyewash', ruleId: eyewash.ruleId, text: eyewash.text, why: eyewash.reason, source: eyewash.source })]),
    ...(sheets === undefined ? [] : [line({ id: 'sheets', ruleId: sheets.ruleId, isCritical: false, text: words('The sheets open here, with no signal too.', 'Las hojas se abren aquí, también sin señal.'), why: words('In a splash you need the sheet at once.', 'Si salpica, la hoja hace falta ya.'), source: usFederal('1910.1200', 'read', { paragraph: '(g)(8)' }) })]),
  ];
}

const BEARD: Source = usFederal('1910.134', 'read', { paragraph: '(g)(1)(i)' });
const FIT: Source = sourced('29 CFR 1926.95', 'read', { paragraph: '(c)', inForceFrom: '2025-01-13', note: 'Protection must fit each construction worker.' });

function peopleLines(open: readonly TaskAnswer[], maskNames: readonly string[]): readonly ChecklistLine[] {
  const gear = [...new Map(open.flatMap(({ protection }) => protection).filter(({ mark }) => mark !== 'respirator').map(({ name }) => [name.en, inside(name)])).values()];
  const who = listed(maskNames);
  return [
    ...(maskNames.length === 0
      ? []
      : [
          line({ id: 'masks', ruleId: 'mask-cleared-and-fitted', mark: 'respirator', text: words(`Masks are here, they fit, filters are new: ${who.en}.`, `Máscaras aquí, ajustan, filtros nuevos: ${who.es}.`), why: words('Dust needs a mask that fits you.', 'El polvo pide una máscara que le ajuste.'), source: usFederal('1910.134', 'read', { paragraph: '(f)(2), (h)(3)' }) }),
          line({ id: 'clean-shaven', ruleId: 'mask-cleared-and-fitted', mark: 'respirator', text: words(`No beard where the mask seals: ${who.en}.`, `Sin barba donde sella la máscara: ${who.es}.`), why: words('Hair lets the dust in.', 'El pelo deja entrar el polvo.'), source: BEARD }),
        ]),
    ...(gear.length === 0
      ? []
      : [line({ id: 'gear', ruleId: 'protection-for-task', isCritical: false, text: words(`We have it and it fits: ${listed(gear.map(({ en }) => en)).en}.`, `Lo tenemos y nos queda: ${listed(gear.map(({ es }) => es)).es}.`), why: words('Gear that does not fit does not protect.', 'Lo que no queda bien no protege.'), source: FIT })]),
  ];
}
