import { type Words } from '../outcome';
import { words } from '../words';
import { type Table1Demand } from './table1.data';

/** Each demand of a Table 1 row as a crew reads it. Paraphrased from the rows; the row carries the source. */
export const DEMAND_WORDS: Readonly<Record<Table1Demand, Words>> = {
  'makers-manual': words('Run it as the maker\'s manual says, to keep dust low.', 'Úsela como dice el manual, con poco polvo.'),
  'run-to-keep-dust-low': words('Run it and keep it so that dust stays low.', 'Úsela y manténgala con poco polvo.'),
  'built-in-water-feed': words('Water feed built in, and on all the time.', 'Agua de la máquina, siempre abierta.'),
  'water-at-impact-point': words('Water on the point of impact, all the time.', 'Agua en la punta, todo el tiempo.'),
  'water-sprays': words('Water sprays on.', 'Rocío de agua abierto.'),
  'water-with-surfactant': words('Soap agent in the water.', 'Agua con agente mojante.'),
  'water-at-dust-points': words('Water or mist where the stone breaks and drops.', 'Agua o niebla donde rompe y cae la piedra.'),
  'water-or-suppressant-as-needed': words('Wet the ground as needed.', 'Moje el suelo cuando haga falta.'),
  'water-or-suppressant-when-others-near': words('Wet the ground when others are near.', 'Moje el suelo si hay gente cerca.'),
  'water-on-bit': words('Water on the bit.', 'Agua en la broca.'),
  'low-flow-water-at-collector': words('A little water where the collector drops its dust.', 'Un poco de agua donde el colector suelta el polvo.'),
  shroud: words('Factory-made shroud on, whole, tight to the floor.', 'Cubierta de fábrica puesta, entera, pegada al piso.'),
  'close-capture-hood': words('Hood or shroud close around the bit.', 'Campana o cubierta pegada a la broca.'),
  'dust-collection-commercial': words('Dust collector fitted to the tool.', 'Colector de polvo en la herramienta.'),
  'dust-collection-makers-system': words('The collector the maker names for this machine.', 'El colector que pide el fabricante.'),
  'airflow-makers-figure': words('Collector moves the air the maker asks.', 'El colector mueve el aire que pide el fabricante.'),
  'airflow-25-cfm-per-inch': words('Collector moves 25 cfm for each inch of wheel.', 'El colector mueve 25 cfm por pulgada de disco.'),
  'filter-99-percent': words('Filter stops 99 percent or more.', 'El filtro detiene el 99 por ciento o más.'),
  'filter-cleaning': words('The filter can be cleaned by the machine.', 'La máquina limpia su filtro.'),
  'cyclone-or-filter-cleaning': words('A cyclone, or a filter the machine cleans.', 'Un ciclón, o un filtro que la máquina limpia.'),
  'hepa-vacuum-for-holes': words('HEPA vacuum to clean the holes.', 'Aspiradora HEPA para los hoyos.'),
  'hepa-vacuum-between-passes-indoors': words('HEPA vacuum between passes.', 'Aspiradora HEPA entre pasadas.'),
  'drum-exhaust': words('Exhaust on the drum.', 'Extracción en el tambor.'),
  'booth-or-remote-control': words('Run it from the closed booth or from far off.', 'Manéjela desde la cabina o de lejos.'),
  'enclosed-cab': words('Cab closed, clean, with filtered air.', 'Cabina cerrada, limpia, con aire filtrado.'),
  'asphalt-only': words('Asphalt only.', 'Solo asfalto.'),
  'cut-at-most-4-inches': words('Cut no deeper than 4 inches.', 'Corte de 4 pulgadas o menos.'),
  'blade-at-most-8-inches': words('Blade of 8 inches or less.', 'Disco de 8 pulgadas o menos.'),
  'less-than-half-lane': words('Narrower than half a lane.', 'Menos de medio carril.'),
  'half-lane-or-wider': words('Half a lane or wider.', 'Medio carril o más.'),
  'operator-alone': words('No one but the driver works there.', 'Solo trabaja allí el operador.'),
  'no-abrading-or-demolition': words('No breaking and no scraping of concrete.', 'Sin romper ni raspar concreto.'),
};
