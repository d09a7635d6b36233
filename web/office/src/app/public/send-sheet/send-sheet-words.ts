import { type Language } from '#compliance/outcome';

const en = {
  heading: 'Send a safety data sheet',
  asks: (organisation: string) => `${organisation} asks you for the current safety data sheet of`,
  until: (day: string) => `This link works once, until ${day}. No account is needed.`,
  drop: 'Drop the PDF here',
  choose: 'Choose the PDF',
  sending: (percent: number) => `${percent} % sent. Keep this page open.`,
  storing: 'Sent. Being stored …',
  sent: 'The sheet has arrived. Thank you.',
  sentNext: 'A person checks it before it is used. This link is used up; you can close the page.',
  refused: 'The file was not taken.',
  refusedNext: 'Nothing was sent, and the link still works. Choose the PDF again.',
  loading: 'Opening the request …',
  dead: 'This link does not open any more.',
  deadNext: 'It was used, withdrawn, or its date has passed. If a sheet is still wanted, ask whoever sent you the link for a new one.',
  bare: 'Open this page from the link in the e-mail.',
  bareNext: 'The link holds a key that is read once and not kept. After a reload, open it from the e-mail again.',
  offline: 'Kneeboard cannot be reached.',
  offlineNext: 'Check the network, then try again. Nothing was sent.',
  failed: 'That did not work.',
  again: 'Try again',
};

const es: typeof en = {
  heading: 'Enviar una hoja de datos de seguridad',
  asks: (organisation) => `${organisation} le pide la hoja de datos de seguridad vigente de`,
  until: (day) => `Este enlace sirve una sola vez, hasta el ${day}. No hace falta una cuenta.`,
  drop: 'Suelte el PDF aquí',
  choose: 'Elegir el PDF',
  sending: (percent) => `${percent} % enviado. Deje esta página abierta.`,
  storing: 'Enviado. Se está guardando …',
  sent: 'La hoja ha llegado. Gracias.',
  sentNext: 'Una persona la revisa antes de que se use. El enlace ya se usó; puede cerrar la página.',
  refused: 'El archivo no se aceptó.',
  refusedNext: 'No se envió nada y el enlace sigue sirviendo. Elija el PDF de nuevo.',
  loading: 'Abriendo la solicitud …',
  dead: 'Este enlace ya no se abre.',
  deadNext: 'Ya se usó, se retiró o pasó su fecha. Si todavía hace falta la hoja, pida un enlace nuevo a quien se lo envió.',
  bare: 'Abra esta página desde el enlace del correo.',
  bareNext: 'El enlace contiene una clave que se lee una vez y no se guarda. Después de volver a cargar la página, ábralo otra vez desde el correo.',
  offline: 'No se puede llegar a Kneeboard.',
  offlineNext: 'Revise la red e intente de nuevo. No se envió nada.',
  failed: 'Eso no funcionó.',
  again: 'Intentar de nuevo',
};

export const sendSheetWords: Readonly<Record<Language, typeof en>> = { en, es };
