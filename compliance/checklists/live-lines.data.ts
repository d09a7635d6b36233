import { type Mark } from '../answer';
import { type TaskKind } from '../facts';
import { type Words } from '../outcome';
import { commonPractice, usFederal, type Source } from '../source';
import { words } from '../words';

/** A line that is asked each time a task starts. */
export interface LiveLine {
  readonly id: string;
  readonly ruleId: string;
  readonly kinds: readonly TaskKind[];
  /** Only where the task's dust control is this; null for any. */
  readonly method: 'vacuum' | 'water' | null;
  readonly isIndoorsOnly: boolean;
  readonly mark: Mark | null;
  readonly isCritical: boolean;
  readonly text: Words;
  readonly why: Words;
  readonly source: Source;
}

const TABLE_1 = usFederal('1926.1153', 'partly', { paragraph: '(c)(1) Table 1', note: 'Each row carries its own mark.' });
const HOUSEKEEPING = usFederal('1926.1153', 'read', { paragraph: '(f)' });
const base = { method: null, isIndoorsOnly: false, mark: null, isCritical: true } as const;

const CUTTING: readonly TaskKind[] = ['floor-grinding', 'edge-grinding', 'scarifying', 'crack-chasing', 'mortar-removal', 'chipping', 'drilling', 'joint-sawing', 'handheld-sawing'];
const RESIN: readonly TaskKind[] = ['liquid-mixing', 'priming', 'spreading', 'tool-washing'];
const DUSTY: readonly TaskKind[] = [...CUTTING, 'shot-blasting', 'powder-mixing', 'quartz-broadcast', 'quartz-pick-up', 'shot-pick-up', 'collector-emptying', 'sanding-coating'];

/** In the order asked: engineering controls, housekeeping, access. Protection follows, made from the task's own list. */
export const LIVE_LINES: readonly LiveLine[] = [
  { ...base, id: 'collector-on', ruleId: 'silica-table-1-control', kinds: [...CUTTING, 'sanding-coating'], method: 'vacuum', text: words('Collector on. Gauge above its mark. Shroud down.', 'Colector prendido. Aguja sobre la marca. Cubierta abajo.'), why: words('The dust is caught before you breathe it.', 'El polvo se atrapa antes de que lo respire.'), source: TABLE_1 },
  { ...base, id: 'water-on', ruleId: 'silica-water-flow', kinds: CUTTING, method: 'water', text: words('Water on full. No dust you can see.', 'Agua bien abierta. Sin polvo a la vista.'), why: words('Wet dust does not fly.', 'El polvo mojado no vuela.'), source: usFederal('1926.1153', 'parallel-text', { paragraph: '(c)(2)(ii)', note: 'Read in WAC 296-840-110(2)(b).' }) },
  { ...base, id: 'exhaust-out', ruleId: 'silica-exhaust-indoors', kinds: CUTTING, isIndoorsOnly: true, text: words('Exhaust blows outside. HEPA vacuum ready between passes.', 'El aire sucio sale afuera. Aspiradora HEPA lista entre pasadas.'), why: words('Dust that stays in the room builds up.', 'El polvo que queda adentro se junta.'), source: usFederal('1926.1153', 'parallel-text', { paragraph: '(c)(2)(i), (c)(1) Table 1', note: 'Read in WAC 296-840-110(2)(a).' }) },
  { ...base, id: 'blaster-sealed', ruleId: 'shot-blasting-safeguards', kinds: ['shot-blasting'], text: words('Seals whole. Collector on before the wheel turns.', 'Sellos enteros. Colector prendido antes de girar la rueda.'), why: words('The blaster keeps its dust in, as long as it is closed.', 'La máquina guarda su polvo si está bien cerrada.'), source: usFederal('1926.57', 'parallel-text', { paragraph: '(f)(3)-(4)', note: 'Read in Michigan R 325.50255 and WAC 296-818-30010.' }) },
  { ...base, id: 'shot-by-magnet', ruleId: 'shot-blasting-safeguards', kinds: ['shot-pick-up'], text: words('Pick up shot by magnet, dust by HEPA vacuum.', 'Granalla con imán, polvo con aspiradora HEPA.'), why: words('Shot underfoot is a fall. Swept dust flies.', 'Pisar granalla es caerse. El polvo barrido vuela.'), source: usFederal('1926.57', 'partly', { paragraph: '(f)(8); 1926.1153(f)' }) },
  { ...base, id: 'bucket-extraction-on', ruleId: 'powder-dust-at-bucket', kinds: ['powder-mixing'], text: words('Extraction on at the bucket. Cut bags low and fold them in.', 'Extracción prendida en el balde. Bolsa: corte bajo y doblada.'), why: words('The dust is worst when the bag drops.', 'Lo peor del polvo es al vaciar la bolsa.'), source: commonPractice('Extraction at the mixing bucket; bags cut low and folded in.') },
  { ...base, id: 'air-before-lid', ruleId: 'vapor-apart-from-dust', kinds: RESIN, text: words('Doors open, fan to outside. Then the lid comes off.', 'Puertas abiertas, aire para afuera. Luego se abre la tapa.'), why: words('Vapor must leave before you breathe it.', 'El vapor debe salir antes de que lo respire.'), source: usFederal('1910.134', 'partly', { paragraph: '(a)(1); (d)(3)(iii)', note: '(a)(1), controls before respirators, recalled.' }) },
  { ...base, id: 'no-flame', ruleId: 'flammable-vapor-and-sparks', kinds: RESIN, text: words('No flame, no smoke, no grinder within 50 feet.', 'Sin llama, sin cigarro, sin pulidora a 50 pies.'), why: words('One spark can light the vapor.', 'Una chispa prende el vapor.'), source: usFederal('1926.152', 'parallel-text', { paragraph: '(f)(3)', note: 'Read in 8 CCR 1935(c).' }) },
  { ...base, id: 'throw-low', ruleId: 'silica-signed-basis', kinds: ['quartz-broadcast'], text: words('Throw the quartz low. Keep others out of the dust.', 'Riegue el cuarzo bajo. Los demás lejos del polvo.'), why: words('Quartz dust scars lungs.', 'El polvo de cuarzo daña los pulmones.'), source: commonPractice('Quartz is broadcast low, with the crew upwind.') },
  { ...base, id: 'machine-off', ruleId: 'machine-manual-on-file', kinds: ['collector-emptying'], text: words('Machine off and unplugged. Tie the bag before you lift it.', 'Máquina apagada y sin cable. Amarre la bolsa antes de alzarla.'), why: words('A full bag that opens puts all its dust in the air.', 'Una bolsa llena que se abre echa todo el polvo al aire.'), source: usFederal('1926.417', 'from-memory') },
  { ...base, id: 'floor-cleared', ruleId: 'floor-survey', kinds: ['mastic-scraping'], text: words('The report says no asbestos here.', 'El informe dice que aquí no hay asbesto.'), why: words('Old mastic can hold asbestos.', 'El pegamento viejo puede tener asbesto.'), source: usFederal('1926.1101', 'partly', { paragraph: '(g)(8)(i), (k)' }) },
  { ...base, id: 'slurry-in-drum', ruleId: 'silica-housekeeping', kinds: ['slurry-handling'], text: words('Slurry goes in its drum. None goes down a drain.', 'El lodo va en su tambor. Nada al desagüe.'), why: words('Dry slurry is dust again, and it harms drains.', 'El lodo seco es polvo otra vez, y daña el desagüe.'), source: commonPractice('Slurry is kept, tested and taken away; never the host\'s drain.') },
  { ...base, id: 'no-dry-sweeping', ruleId: 'silica-housekeeping', kinds: ['clean-up', 'quartz-pick-up', 'collector-emptying', 'sanding-coating'], text: words('HEPA vacuum or wet. No dry sweeping. No blown air.', 'Aspiradora HEPA o mojado. Sin barrer en seco. Sin soplar.'), why: words('Sweeping and blowing put the dust back in the air.', 'Barrer y soplar levanta el polvo otra vez.'), source: HOUSEKEEPING },
  { ...base, id: 'others-out', ruleId: 'silica-access', kinds: DUSTY, isCritical: false, text: words('Door closed, sign up, neighbors told.', 'Puerta cerrada, aviso puesto, vecinos avisados.'), why: words('Others must not breathe our dust.', 'Los demás no deben respirar nuestro polvo.'), source: usFederal('1926.1153', 'parallel-text', { paragraph: '(g)(1)(iv)', note: 'Read in WAC 296-840-140(4)(a).' }) },
];
