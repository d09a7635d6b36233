import { type Mark } from '../answer';
import { type TaskKind } from '../facts';
import { type Words } from '../outcome';
import { commonPractice, sourced, usFederal, type Source } from '../source';
import { words } from '../words';

/** Protection by what the body meets. A higher rank replaces a lower one of the same mark. */
export interface ProtectionRow {
  readonly id: string;
  readonly mark: Mark;
  readonly rank: number;
  readonly name: Words;
  /** Statement codes on the kit's confirmed sheets; empty where the work itself asks it. */
  readonly codes: readonly string[];
  /** Work that asks it whatever the material. */
  readonly kinds: readonly TaskKind[] | 'any-work' | 'dusty' | 'loud' | 'none';
  /** Only in these kinds of kit work, where the code's harm can happen; null for all. */
  readonly onlyIn: readonly TaskKind[] | null;
  readonly asksWetCement: boolean;
  readonly reason: Words;
  readonly source: Source;
}

const EYES = usFederal('1926.102', 'from-memory', { paragraph: '(a)(1); 1926.95(a), (c)' });
const SHEET = sourced('Confirmed safety data sheets of this job', 'read', { paragraph: 'section 2', note: 'Which statement asks which protection: UN GHS Annex 3, P280 and response statements, partly read.' });
const BLASTING = usFederal('1926.57', 'parallel-text', { paragraph: '(f)(6)', note: 'Read in WAC 296-818-20010: gloves and aprons of heavy canvas or leather, or equivalent protection, against the impact of abrasive. The closed machine stands for the apron (judgement); an open nozzle needs one.' });
const NOISE = usFederal('1926.52', 'read', { paragraph: '(b); 1926.101', note: 'Handheld grinding 95 to 99 dBA measured (NIOSHTIC 20043139); no published figure for walk-behind machines and blasters: measure, or take the maker\'s.' });
const BOOTS = usFederal('1926.96', 'from-memory');
const WET_CEMENT = sourced('Statements of Portland cement on supplier sheets', 'from-memory', { note: 'Cement is alkaline when wet; OSHA memorandum of 16 Apr 2007 names protective equipment and sanitation for it.' });

const base = { codes: [], kinds: 'none', onlyIn: null, asksWetCement: false } as const;
const SKIN = ['H310', 'H311', 'H312', 'H315', 'H317'];
const POURING: readonly TaskKind[] = ['powder-mixing', 'liquid-mixing', 'tool-washing'];

export const PROTECTION: readonly ProtectionRow[] = [
  { ...base, id: 'safety-glasses', mark: 'eyes', rank: 1, name: words('Safety glasses', 'Lentes de seguridad'), kinds: 'dusty', reason: words('Chips and dust fly.', 'Saltan polvo y pedazos.'), source: EYES },
  { ...base, id: 'safety-glasses-clean-up', mark: 'eyes', rank: 1, name: words('Safety glasses', 'Lentes de seguridad'), kinds: ['clean-up', 'slurry-handling', 'mastic-scraping', 'tool-washing'], reason: words('Splash and dust.', 'Salpica y hay polvo.'), source: EYES },
  { ...base, id: 'goggles', mark: 'eyes', rank: 2, name: words('Goggles', 'Gafas cerradas'), codes: ['H314', 'H318', 'H319'], reason: words('It harms eyes', 'Daña los ojos'), source: SHEET },
  { ...base, id: 'goggles-wet-cement', mark: 'eyes', rank: 2, name: words('Goggles', 'Gafas cerradas'), asksWetCement: true, reason: words('Wet cement burns eyes.', 'El cemento mojado quema los ojos.'), source: WET_CEMENT },
  { ...base, id: 'face-shield', mark: 'face', rank: 1, name: words('Face shield over the goggles', 'Careta sobre las gafas'), codes: ['H314'], onlyIn: POURING, reason: words('It burns, and it can splash', 'Quema, y puede salpicar'), source: SHEET },
  { ...base, id: 'face-shield-blasting', mark: 'face', rank: 1, name: words('Face shield', 'Careta'), kinds: ['shot-blasting'], reason: words('Shot can fly.', 'Salta granalla.'), source: BLASTING },
  { ...base, id: 'ear-muffs', mark: 'ears', rank: 1, name: words('Ear muffs', 'Orejeras'), kinds: 'loud', reason: words('The machine is loud.', 'La máquina hace mucho ruido.'), source: NOISE },
  { ...base, id: 'work-gloves', mark: 'hands', rank: 1, name: words('Work gloves', 'Guantes de trabajo'), kinds: ['shot-pick-up', 'collector-emptying', 'clean-up', 'quartz-pick-up', 'mastic-scraping', 'chipping', 'joint-sawing', 'handheld-sawing', 'crack-chasing', 'mortar-removal', 'drilling'], reason: words('Sharp edges and heavy loads.', 'Filos y cargas.'), source: commonPractice('Work gloves for sharp edges and loads.') },
  { ...base, id: 'leather-gloves', mark: 'hands', rank: 2, name: words('Leather gloves', 'Guantes de cuero'), kinds: ['shot-blasting'], reason: words('Shot and blast parts wear skin.', 'La granalla gasta la piel.'), source: BLASTING },
  { ...base, id: 'waterproof-gloves', mark: 'hands', rank: 3, name: words('Waterproof gloves', 'Guantes impermeables'), kinds: ['slurry-handling'], reason: words('Slurry is alkaline.', 'El lodo es alcalino.'), source: WET_CEMENT },
  { ...base, id: 'chemical-gloves', mark: 'hands', rank: 4, name: words('Chemical-proof gloves', 'Guantes para químicos'), codes: [...SKIN, 'H314'], reason: words('It harms skin', 'Daña la piel'), source: SHEET },
  { ...base, id: 'alkali-gloves', mark: 'hands', rank: 5, name: words('Alkali-proof gloves', 'Guantes contra álcali'), asksWetCement: true, reason: words('Wet cement burns skin. Change them when wet inside.', 'El cemento mojado quema la piel. Cámbielos si se mojan por dentro.'), source: WET_CEMENT },
  { ...base, id: 'coverall', mark: 'clothing', rank: 1, name: words('Coverall with long sleeves', 'Overol de manga larga'), codes: [...SKIN, 'H314'], reason: words('It harms skin', 'Daña la piel'), source: SHEET },
  { ...base, id: 'coverall-wet-cement', mark: 'clothing', rank: 1, name: words('Coverall with long sleeves', 'Overol de manga larga'), asksWetCement: true, reason: words('Wet cement burns skin.', 'El cemento mojado quema la piel.'), source: WET_CEMENT },
  { ...base, id: 'safety-boots', mark: 'boots', rank: 1, name: words('Safety boots', 'Botas de seguridad'), kinds: 'any-work', reason: words('Heavy things fall and roll.', 'Caen y ruedan cosas pesadas.'), source: BOOTS },
];
