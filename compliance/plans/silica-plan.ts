import { contentsRule, yearlyRule, item } from '../contents';
import { sourced, usFederal } from '../source';
import { words } from '../words';

const PARALLEL = (paragraph: string, note: string) => usFederal('1926.1153', 'parallel-text', { paragraph, note });

// Each rule but the yearly one: met when every item is there, unmet when one is missing, undecided while nobody has looked (`contentsRule`).

/** (g)(1): the written exposure control plan holds (i) the tasks with exposure, (ii) controls, practices and respirators of each, (iii) housekeeping, (iv) how access is restricted. */
export const silicaPlanElements = contentsRule({
  id: 'silica-plan-elements',
  title: words('Written silica plan holds its four elements', 'El plan escrito de sílice tiene sus cuatro elementos'),
  source: PARALLEL('(g)(1)(i)-(iv)', 'WAC 296-840-140(1), (4)(a).'),
  duties: ['SIL-16'],
  items: [
    // (i), (ii), (iii), (iv)
    item('tasks', 'tasks with silica exposure', 'tareas con exposición a sílice'),
    item('controls-per-task', 'for each task: controls, work practices, respirators', 'por tarea: controles, prácticas, respiradores'),
    item('housekeeping', 'housekeeping measures', 'medidas de limpieza'),
    item('access', 'how access is limited, others’ exposures included', 'cómo se limita el acceso, también ante exposiciones de otros'),
  ],
});

/** (g)(2): the plan is reviewed at least once a year and changed as needed. Here: good through the day it falls due (`yearlyRule`). */
export const silicaPlanReview = yearlyRule({
  id: 'silica-plan-review',
  title: words('Silica plan reviewed every year', 'Plan de sílice revisado cada año'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(g)(2)', note: 'WAC 296-840-140(2).' }),
  duties: ['SIL-17'],
});

/** (g)(3): the plan is there to read and copy, on request, for each covered employee and representative; (i)(2)(ii): so is the standard, at no cost. */
export const silicaPlanAvailable = contentsRule({
  id: 'silica-plan-available',
  title: words('Silica plan and standard at hand', 'Plan y norma de sílice a la mano'),
  source: usFederal('1926.1153', 'parallel-text', { paragraph: '(g)(3), (i)(2)(ii)', note: 'The free copy of the standard in WAC 296-840-150.' }),
  duties: ['SIL-18', 'SIL-26'],
  items: [
    // (g)(3)
    item('plan-on-site', 'plan readable by each employee and representative, also offline', 'plan que cada empleado y representante puede leer, también sin red'),
    item('copy-of-plan', 'copies given on request', 'copias a quien las pida'),
    // (i)(2)(ii)
    item('copy-of-standard', 'free copy of the silica standard', 'copia gratis de la norma de sílice'),
  ],
});

/** (i)(1): silica is in the hazard communication program, with cancer, lung, immune and kidney effects; (i)(2)(i): each covered person can show knowledge of (A) to (F). No fixed interval for repeats. */
export const silicaTraining = contentsRule({
  id: 'silica-training-contents',
  title: words('Silica training: every topic, shown to be known', 'Capacitación en sílice: cada tema, y que se demuestre'),
  source: PARALLEL('(i)(1), (i)(2)', 'WAC 296-840-150(1), (3), (4).'),
  duties: ['SIL-22'],
  items: [
    // (i)(1), (i)(2)(i)(A)
    item('health-hazards', 'cancer, lung, immune and kidney effects', 'cáncer y efectos en pulmones, defensas y riñones'),
    // (i)(2)(i)(B), (C), (D), (E), (F)
    item('tasks', 'tasks here that can expose', 'tareas de aquí que exponen'),
    item('protection', 'controls, work practices and respirators in use', 'controles, prácticas y respiradores en uso'),
    item('standard', 'contents of the standard', 'contenido de la norma'),
    item('competent-person', 'who the competent person is', 'quién es la persona competente'),
    item('medical', 'purpose of medical surveillance', 'para qué es la vigilancia médica'),
    // How it is taught and shown.
    item('language', 'in a language the person understands', 'en un idioma que la persona entiende'),
    item('shown', 'knowledge shown by the person', 'la persona mostró que lo sabe'),
    item('certified', 'who certifies it: trainer or employer, by name and day', 'quién lo certifica: instructor o empleador, con nombre y día', sourced('OSHA letters of 14 Aug 1997 and 10 Apr 2000', 'read', { note: 'Standards ask for the trainer’s or employer’s certification; none asks for the employee’s signature. 1997 as quoted.' })),
  ],
});

/** (h)(4): the employer gives the clinician the standard and (i) the person's duties, (ii) exposure, (iii) protection, (iv) earlier exams. Nothing of what the clinician finds comes back here. */
export const clinicianPacket = contentsRule({
  id: 'silica-clinician-packet',
  title: words('Information for the clinician', 'Información para el clínico'),
  source: usFederal('1926.1153', 'from-memory', { paragraph: '(h)(4)' }),
  duties: ['SIL-25'],
  items: [
    item('standard', 'copy of the standard', 'copia de la norma'),
    // (i), (ii), (iii), (iv)
    item('duties', 'the person’s duties as they bear on silica', 'tareas de la persona respecto a la sílice'),
    item('exposure', 'former, present and expected exposure', 'exposición pasada, actual y prevista'),
    item('respirator', 'respirator worn, how and how long', 'respirador que usa, cómo y cuánto tiempo'),
    item('earlier-exams', 'information from earlier exams held by the employer', 'datos de exámenes anteriores que tiene el empleador'),
  ],
});
