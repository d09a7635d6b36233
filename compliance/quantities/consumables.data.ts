import { type ConsumableKind, type TaskKind } from '../facts';
import { type Words } from '../outcome';
import { WHO } from '../rule';
import { commonPractice, type Source } from '../source';
import { words } from '../words';

/** What work uses up. No rate stands here: rates are stated by a person, never by the program. */
export interface ConsumableRow {
  readonly id: ConsumableKind;
  readonly name: Words;
  /** Work that uses it; 'collected' is any work with a collector or vacuum, 'vapor-mask' work whose sheet asks a mask. */
  readonly usedBy: readonly TaskKind[] | 'collected' | 'vapor-mask';
  /** Who can state its rate. */
  readonly whoSays: Words;
  readonly source: Source;
}

const trade = (note: string): Source => commonPractice(note);

export const CONSUMABLES: readonly ConsumableRow[] = [
  { id: 'shot', name: words('Steel shot', 'Granalla'), usedBy: ['shot-blasting'], whoSays: WHO.maker, source: trade('Shot wears and is lost; how fast depends on blaster, shot and floor.') },
  { id: 'diamonds', name: words('Diamond tools', 'Herramientas de diamante'), usedBy: ['floor-grinding', 'edge-grinding', 'mortar-removal', 'crack-chasing'], whoSays: WHO.maker, source: trade('Diamonds wear with the hardness of the floor; the maker states the area of a set.') },
  { id: 'blades', name: words('Saw blades', 'Discos de sierra'), usedBy: ['joint-sawing', 'handheld-sawing'], whoSays: WHO.maker, source: trade('A blade’s life is stated by its maker.') },
  { id: 'collector-bags', name: words('Collector bags', 'Bolsas del colector'), usedBy: 'collected', whoSays: WHO.competentPerson, source: trade('Dust fills bags by how much the floor gives; counted on the job.') },
  { id: 'hepa-filters', name: words('HEPA filters', 'Filtros HEPA'), usedBy: 'collected', whoSays: WHO.maker, source: trade('Changed by the gauge or by the maker’s hours.') },
  { id: 'cartridges', name: words('Mask cartridges', 'Cartuchos de máscara'), usedBy: 'vapor-mask', whoSays: WHO.safetyOfficer, source: trade('From the written change schedule.') },
  { id: 'tape', name: words('Masking tape', 'Cinta'), usedBy: ['priming', 'spreading'], whoSays: words('the crew lead', 'el líder'), source: trade('Edges are measured on the job.') },
];
