import { contentsRule, item } from '../contents';
import { usFederal } from '../source';
import { words } from '../words';

// Each rule: met when every item is there, unmet when one is missing, undecided while nobody has looked (`contentsRule`).

/** (e)(1): a written program at each workplace says how (f) labels, (g) sheets and (h) training are met, (i) lists the hazardous chemicals and (ii) how people learn of non-routine tasks. */
export const hazcomProgram = contentsRule({
  id: 'hazcom-program',
  title: words('Written hazard communication program', 'Programa escrito de comunicación de peligros'),
  source: usFederal('1910.1200', 'parallel-text', { paragraph: '(e)(1)', note: 'First part read; WAC 296-901-14010(1).' }),
  duties: ['HAZ-01'],
  items: [
    // (e)(1)
    item('program', 'program at the workplace', 'programa en el lugar de trabajo'),
    // (e)(1)(i)
    item('list', 'list of the hazardous chemicals', 'lista de los productos peligrosos'),
    // (e)(1) by (f), (g), (h)
    item('labels', 'how labels are kept', 'cómo se llevan las etiquetas'),
    item('sheets', 'how sheets are kept and reached', 'cómo se guardan y consultan las hojas'),
    item('training', 'how people are trained', 'cómo se capacita a la gente'),
    // (e)(1)(ii)
    item('non-routine', 'how people learn of hazards in non-routine tasks', 'cómo se informa de peligros en tareas no habituales'),
  ],
});

/** (e)(2): where other employers' people may be exposed, the program says how those employers (i) get at the sheets, (ii) learn the precautions, (iii) learn the labeling system. */
export const multiEmployer = contentsRule({
  id: 'hazcom-multi-employer',
  title: words('Other employers on the site know our chemicals', 'Los demás empleadores conocen nuestros productos'),
  source: usFederal('1910.1200', 'parallel-text', { paragraph: '(e)(2)(i)-(iii)', note: 'WAC 296-901-14010(2).' }),
  duties: ['HAZ-02', 'GATE-06'],
  items: [
    // (e)(2)(i), (ii), (iii)
    item('access', 'how others get the sheets on site', 'cómo obtienen otros las hojas en el sitio'),
    item('precautions', 'how others learn the precautions', 'cómo conocen otros las precauciones'),
    item('labels', 'how our labels work', 'cómo funcionan nuestras etiquetas'),
  ],
});

/**
 * (f)(6): a workplace container shows the product identifier and, in words or pictures, the hazards, so that with the information at hand they are known in particular;
 * (f)(8): none is asked on a portable container for immediate use by the one who filled it. Here: mixed or decanted material that leaves the hands of who filled it.
 */
export const containerLabel = contentsRule({
  id: 'workplace-container-label',
  title: words('Label on mixed and decanted material', 'Etiqueta en material mezclado o trasvasado'),
  source: usFederal('1910.1200', 'partly', { paragraph: '(f)(6), (f)(8)', note: 'Product identifier with words or pictures for the hazards, and the specific information at hand; the exception for who fills it and uses it at once in a university program.' }),
  duties: ['HAZ-03'],
  items: [
    // (f)(6)(ii)
    item('identifier', 'product identifier, part and state', 'identificador del producto, parte y estado'),
    item('hazards', 'words or pictures of the hazards', 'palabras o dibujos de los peligros'),
    item('sheet-at-hand', 'the sheet at hand for the rest', 'la hoja a la mano para lo demás'),
  ],
});

/** (g)(8): the sheets are in the workplace, readily accessible to people in their work area in each shift; electronic is allowed as long as it puts no barrier in the way. */
export const sheetsAccessible = contentsRule({
  id: 'sheets-accessible',
  title: words('Sheets reachable in every shift, without barrier', 'Hojas accesibles en cada turno, sin barreras'),
  source: usFederal('1910.1200', 'read', { paragraph: '(g)(8)', note: 'OSHA letters of 13 Oct 1998 and 18 Feb 1999: immediate; a back-up for foreseeable failure.' }),
  duties: ['HAZ-05'],
  items: [
    // (g)(8): readily accessible, in the work area, each shift.
    item('opens-offline', 'every sheet of the job opens without a network', 'cada hoja del trabajo se abre sin red'),
    // (g)(8): no barriers to immediate access.
    item('no-permission', 'nobody has to ask or sign in', 'nadie tiene que pedir permiso ni iniciar sesión'),
    // From the agency's letters, not the paragraph: a back-up for a failure that can be foreseen.
    item('backup', 'a stated back-up when the tablet fails', 'un respaldo indicado si falla la tableta'),
  ],
});
