import { contentsRule, item } from '../contents';
import { usFederal } from '../source';
import { words } from '../words';

export const hazcomProgram = contentsRule({
  id: 'hazcom-program',
  title: words('Written hazard communication program', 'Programa escrito de comunicación de peligros'),
  source: usFederal('1910.1200', 'parallel-text', { paragraph: '(e)(1)', note: 'First part read; WAC 296-901-14010(1).' }),
  duties: ['HAZ-01'],
  items: [
    item('program', 'program at the workplace', 'programa en el lugar de trabajo'),
    item('list', 'list of the hazardous chemicals', 'lista de los productos peligrosos'),
    item('labels', 'how labels are kept', 'cómo se llevan las etiquetas'),
    item('sheets', 'how sheets are kept and reached', 'cómo se guardan y consultan las hojas'),
    item('training', 'how people are trained', 'cómo se capacita a la gente'),
    item('non-routine', 'how people learn of hazards in non-routine tasks', 'cómo se informa de peligros en tareas no habituales'),
  ],
});

export const multiEmployer = contentsRule({
  id: 'hazcom-multi-employer',
  title: words('Other employers on the site know our chemicals', 'Los demás empleadores conocen nuestros productos'),
  source: usFederal('1910.1200', 'parallel-text', { paragraph: '(e)(2)(i)-(iii)', note: 'WAC 296-901-14010(2).' }),
  duties: ['HAZ-02', 'GATE-06'],
  items: [
    item('access', 'how others get the sheets on site', 'cómo obtienen otros las hojas en el sitio'),
    item('precautions', 'how others learn the precautions', 'cómo conocen otros las precauciones'),
    item('labels', 'how our labels work', 'cómo funcionan nuestras etiquetas'),
  ],
});

/** A container of mixed or decanted material that leaves the hands of who filled it. */
export const containerLabel = contentsRule({
  id: 'workplace-container-label',
  title: words('Label on mixed and decanted material', 'Etiqueta en material mezclado o trasvasado'),
  source: usFederal('1910.1200', 'partly', { paragraph: '(f)(6), (f)(8)', note: 'Product identifier with words or pictures for the hazards, and the specific information at hand; the exception for who fills it and uses it at once in a university program.' }),
  duties: ['HAZ-03'],
  items: [
    item('identifier', 'product identifier, part and state', 'identificador del producto, parte y estado'),
    item('hazards', 'words or pictures of the hazards', 'palabras o dibujos de los peligros'),
    item('sheet-at-hand', 'the sheet at hand for the rest', 'la hoja a la mano para lo demás'),
  ],
});

export const sheetsAccessible = contentsRule({
  id: 'sheets-accessible',
  title: words('Sheets reachable in every shift, without barrier', 'Hojas accesibles en cada turno, sin barreras'),
  source: usFederal('1910.1200', 'read', { paragraph: '(g)(8)', note: 'OSHA letters of 13 Oct 1998 and 18 Feb 1999: immediate; a back-up for foreseeable failure.' }),
  duties: ['HAZ-05'],
  items: [
    item('opens-offline', 'every sheet of the job opens without a network', 'cada hoja del trabajo se abre sin red'),
    item('no-permission', 'nobody has to ask or sign in', 'nadie tiene que pedir permiso ni iniciar sesión'),
    item('backup', 'a stated back-up when the tablet fails', 'un respaldo indicado si falla la tableta'),
  ],
});
