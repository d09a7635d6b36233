import { checkIsoDate, type IsoDate } from '../iso-date';
import { met, notApplicable, undecided, unmet, WHO, type Rule } from '../rule';
import { usFederal } from '../source';
import { words } from '../words';
import { auditSds, type SdsForAudit } from './sds-audit';
import { hazardRowsOf, readHazardCodes, singleCodes } from './statements';

/**
 * App. D: a sheet has its 16 sections in order, under their headings, each with its minimum content; App. C: signal word and pictograms are those that its hazard statements ask.
 * Each line is one function of `sds-audit.ts`, with its own source, in this order: sections, contents, label elements, CAS check digits, date, language.
 * Here: one unmet line fails the sheet, else one open line leaves it undecided. Lines of the organization's own policy (age) do not count.
 */
export const sheetAudit: Rule<SdsForAudit> = {
  id: 'sheet-audit',
  title: words('Sheet has its form and agrees with itself', 'La hoja tiene su forma y concuerda consigo misma'),
  source: usFederal('1910.1200', 'partly', { paragraph: 'App. C, App. D', note: 'Each line of the audit carries its own source.' }),
  duties: ['HAZ-06', 'HAZ-07', 'HAZ-10', 'HAZ-11'],
  evaluate(sheet, asOf) {
    const law = auditSds(sheet, asOf).filter((line) => line.basis === 'law');
    const faults = law.filter((line) => line.outcome === 'unmet');
    const open = law.filter((line) => line.outcome === 'undecided');
    const results = { faults: faults.length, questions: open.length };
    const inputs = { 'revised on': sheet.revisedOn, 'sections found': new Set(sheet.sections.map((each) => each.number)).size };
    if (faults.length > 0) return unmet(faults[0]!.text, { inputs, results, whatWouldChange: words('A corrected sheet from the supplier.', 'Una hoja corregida del proveedor.') });
    if (open.length > 0) return undecided(open[0]!.text, WHO.safetyOfficer, { inputs, results, whatWouldChange: words('Look at the sheet and answer.', 'Mire la hoja y responda.') });
    return met(words('Form and statements agree.', 'La forma y las indicaciones concuerdan.'), { inputs, results });
  },
};

export interface ProductSheetFacts {
  readonly productName: string;
  /** Date of the confirmed revision on file; null where none is confirmed. */
  readonly confirmedRevisedOn: IsoDate | null;
  /** Date printed on the sheet that came with the product; null where nobody compared. */
  readonly receivedRevisedOn: IsoDate | null;
}

/**
 * (g)(1): a sheet for each hazardous chemical in use; (g)(5)-(7): suppliers bring it up to date and send it with the first shipment after a change.
 * Here: the confirmed sheet bears the date of the one that came with the product.
 */
export const sheetMatchesProduct: Rule<ProductSheetFacts> = {
  id: 'sheet-matches-product',
  title: words('The sheet on file is the one of the product received', 'La hoja archivada es la del producto recibido'),
  source: usFederal('1910.1200', 'partly', { paragraph: '(g)(1), (g)(5)-(7)', note: '(g)(1) and the three months of (g)(5) read; (g)(6) and (g)(7) recalled.' }),
  duties: ['HAZ-04', 'HAZ-08'],
  evaluate({ productName, confirmedRevisedOn, receivedRevisedOn }) {
    const inputs = { product: productName, 'on file': confirmedRevisedOn, received: receivedRevisedOn };
    // (g)(1)
    if (confirmedRevisedOn === null) return unmet(words(`${productName} has no confirmed sheet.`, `${productName} no tiene una hoja confirmada.`), { inputs, whatWouldChange: words('Upload and confirm its sheet.', 'Suba y confirme su hoja.') });
    // (g)(5)-(7)
    checkIsoDate('confirmedRevisedOn', confirmedRevisedOn);
    if (receivedRevisedOn === null) return undecided(words('Nobody has compared it with the sheet that came with the product.', 'Nadie la ha comparado con la hoja que vino con el producto.'), WHO.safetyOfficer, { inputs, whatWouldChange: words('Compare the two dates.', 'Compare las dos fechas.') });
    if (checkIsoDate('receivedRevisedOn', receivedRevisedOn) !== confirmedRevisedOn) {
      return unmet(words(`On file ${confirmedRevisedOn}, received ${receivedRevisedOn}.`, `Archivada ${confirmedRevisedOn}, recibida ${receivedRevisedOn}.`), { inputs, whatWouldChange: words('Ask the supplier for the sheet of what was received.', 'Pida al proveedor la hoja de lo recibido.') });
    }
    return met(words('It matches.', 'Concuerda.'), { inputs });
  },
};

export interface NewHazardFacts {
  /** Statements of the job's confirmed sheets. */
  readonly jobCodes: readonly string[];
  /** Hazard classes the person was trained on, as named in the hazard table. */
  readonly trainedClasses: readonly string[];
}

/** (h)(1): training at first assignment and when a chemical hazard that people were not trained on enters the work area. Here: a new hazard class, not each new product, and no yearly repeat. */
export const trainingAtNewHazard: Rule<NewHazardFacts> = {
  id: 'training-at-new-hazard',
  title: words('Trained before a new kind of hazard', 'Capacitación antes de un nuevo tipo de peligro'),
  source: usFederal('1910.1200', 'read', { paragraph: '(h)(1)' }),
  duties: ['HAZ-09'],
  evaluate({ jobCodes, trainedClasses }) {
    const { codes, unknown } = readHazardCodes(jobCodes);
    const classes = [...new Set(singleCodes(codes).flatMap((code) => hazardRowsOf(code).map((row) => row.hazardClass)))];
    const fresh = classes.filter((each) => !trainedClasses.includes(each));
    const inputs = { 'hazard classes on the job': classes.length, 'trained on': trainedClasses.length };
    // A class of the job's sheets that the person was not trained on; then a code that no table knows.
    if (fresh.length > 0) return unmet(words(`New here: ${fresh.join('; ')}.`, `Nuevo aquí: ${fresh.join('; ')}.`), { inputs, whatWouldChange: words('Brief the person on it.', 'Explíqueselo a la persona.') });
    if (unknown.length > 0) return undecided(unknown[0]!.question, WHO.safetyOfficer, { inputs, whatWouldChange: words('Name the hazard.', 'Nombre el peligro.') });
    if (classes.length === 0) return notApplicable(words('No hazard statements on the job’s sheets.', 'Las hojas del trabajo no traen indicaciones de peligro.'), { inputs });
    return met(words('Trained on every kind of hazard here.', 'Capacitado en cada tipo de peligro de aquí.'), { inputs });
  },
};
