import { type Words } from './outcome';
import { words } from './words';

/** Stands on every generated document, word for word. */
export const NOTICE: Words = words(
  'Law, label, safety data sheet, plan and site rules: follow the strictest. Local codes and licensed practice govern. If unsure, stop and ask the competent person.',
  'Ley, etiqueta, hoja de seguridad, plan y reglas del sitio: siga lo más estricto. Mandan los códigos locales y la práctica con licencia. Si duda, pare y pregunte a la persona competente.',
);

/** The one sentence that is signed, the same on screen, on paper and in the history. */
export function signedSentence(competentPersonName: string | null): Words {
  return words(
    `I was briefed in a language I understand. I have what is listed for my tasks. The competent person today is ${competentPersonName ?? 'not named'}. I can stop any task; no one may punish me for it.`,
    `Me explicaron el trabajo en un idioma que entiendo. Tengo lo que está en la lista para mis tareas. La persona competente de hoy es ${competentPersonName ?? 'nadie nombrado'}. Puedo parar cualquier tarea; nadie me puede castigar por eso.`,
  );
}
