import { type Language } from '#compliance/outcome';

/** What the strip itself says. The words of tasks and states come with its lanes. */
export interface ShiftWords {
  readonly strip: string;
  readonly howTo: string;
  readonly table1: string;
  readonly none: string;
  readonly overFour: string;
  readonly maskRuleAt: (time: string) => string;
  readonly elsewhere: string;
  readonly fromTo: (start: string, end: string) => string;
  readonly from: string;
  readonly to: string;
  readonly earlier: (which: string) => string;
  readonly later: (which: string) => string;
  readonly close: string;
  readonly nobody: string;
}

export const SHIFT_WORDS: Readonly<Record<Language, ShiftWords>> = {
  en: {
    strip: 'Shift, one lane for each person',
    howTo: 'Left and right arrows move it by five minutes. With Shift they move its end. Enter opens its times.',
    table1: 'Table 1 time, all jobs',
    none: 'none',
    overFour: 'over 4 h',
    maskRuleAt: (time) => `mask rule changes ${time}`,
    elsewhere: 'at another job',
    fromTo: (start, end) => `${start} to ${end}`,
    from: 'From',
    to: 'to',
    earlier: (which) => `−5, ${which}: five minutes earlier`,
    later: (which) => `+5, ${which}: five minutes later`,
    close: 'Close',
    nobody: 'Nobody has a task in this shift yet.',
  },
  es: {
    strip: 'Turno, un carril por persona',
    howTo: 'Las flechas izquierda y derecha lo mueven cinco minutos. Con Mayúsculas mueven el final. Intro abre las horas.',
    table1: 'Tiempo de Tabla 1, todas las obras',
    none: 'nada',
    overFour: 'más de 4 h',
    maskRuleAt: (time) => `la regla de la mascarilla cambia a las ${time}`,
    elsewhere: 'en otra obra',
    fromTo: (start, end) => `${start} a ${end}`,
    from: 'De',
    to: 'a',
    earlier: (which) => `−5, ${which}: cinco minutos antes`,
    later: (which) => `+5, ${which}: cinco minutos después`,
    close: 'Cerrar',
    nobody: 'Nadie tiene todavía una tarea en este turno.',
  },
};
