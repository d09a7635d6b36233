import { contentsRule, item } from '../contents';
import { WHO } from '../rule';
import { commonPractice, usFederal } from '../source';
import { words } from '../words';

/** Slurry, dust and resin waste. What counts as hazardous waste is for the place's own law. */
export const wasteHandling = contentsRule({
  id: 'waste-handling',
  title: words('Slurry, dust and resin waste', 'Lodo, polvo y residuos de resina'),
  source: commonPractice('Slurry from concrete is strongly alkaline; it never goes down the host’s drain. Local waste law decides the rest.'),
  duties: ['WST-01'],
  whoDecides: WHO.localAuthority,
  items: [
    item('container', 'a closed, marked container for each kind', 'un recipiente cerrado y marcado para cada tipo'),
    item('acidity', 'pH of slurry read before it leaves', 'pH del lodo medido antes de que salga'),
    item('no-drain', 'nothing into the host’s drains', 'nada a los desagües del anfitrión'),
    item('hardened', 'mixed resin hardened before it is thrown out', 'resina mezclada endurecida antes de tirarla'),
    item('taker', 'who takes it, and when', 'quién se lo lleva y cuándo'),
  ],
});

/** Each machine before use; seen on the floor, with evidence. */
export const machinePreUse = contentsRule({
  id: 'machine-pre-use-check',
  title: words('Machine checked before use', 'Máquina revisada antes de usarla'),
  source: usFederal('1926.300', 'from-memory', { paragraph: 'to 1926.303; 1926.404(b)(1); 1926.417', note: 'Guards, ground-fault protection, isolation.' }),
  duties: ['GATE-04'],
  whoDecides: WHO.competentPerson,
  items: [
    item('guard', 'guard on and whole', 'guarda puesta y entera'),
    item('cord', 'cord and plug whole', 'cable y enchufe enteros'),
    item('ground-fault', 'ground-fault protection tested', 'protección de falla a tierra probada'),
    item('isolation', 'unplugged before the tool is touched', 'desenchufada antes de tocar la herramienta'),
    item('manual', 'maker’s manual open in one tap', 'manual del fabricante a un toque'),
  ],
});
