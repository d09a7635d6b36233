import { describe, expect, it } from '@jest/globals';
import { STATEMENT_TEXTS } from '#compliance/hazcom/ghs-statements.data';
import { pagesFrom } from '#test/support/sheet-text';
import { readLines } from './read-sheet';
import { matchStatements } from './statement-matcher';
import { statementRows } from './statements.data';

const read = (section2: string, rest = '') =>
  readLines(pagesFrom(`Section 1. Identification\nProduct name: Quarrybond 40, a product of the demonstration\nSection 2. Hazards identification\n${section2}\nSection 3. Composition\n${rest}\nSection 4. First aid measures`));
const codes = (section2: string, rest = ''): string[] => read(section2, rest).hazardCodes.map(({ value }) => value);

describe('statements by their words', () => {
  /** The texts of the statement table of compliance/hazcom, which names its own source. */
  const listed = STATEMENT_TEXTS.filter(({ code, text }) => /^H\d/.test(code) && text.en.length > 12);

  it.each(listed.map(({ code, text }) => [code, text.en]))('%s: %s', (code, text) => {
    expect(matchStatements(`${text}.`, 'en', 'H', true).map((match) => match.code)).toEqual([code]);
  });

  it.each((['es', 'fr', 'de'] as const).flatMap((language, at) => statementRows.filter((row) => row[at + 2] !== '').flatMap((row) => (row[at + 2] ?? '').split('|').map((wording) => [language, row[0], wording.replace(/~/, 'organos')] as const))))('%s %s: %s', (language, code, wording) => {
    // A cell may share its wording with a neighbour (French names H314 and H318 alike in part): the code must be among the finds.
    expect(matchStatements(`${wording}.`, language, 'H', true).map((match) => match.code)).toEqual(expect.arrayContaining(code.split(',')));
  });

  it.each([
    ['Flammable liquid and vapour', ['H226']],
    ['Causes damage to organs (central nervous system (CNS)) through prolonged or repeated exposure', ['H372']],
    ['May cause damage to lungs and kidneys through prolonged or repeated exposure', ['H373']],
    ['Causes damage to lungs through prolonged or repeated inhalation', ['H372']],
    ['Causes damage to lungs through prolonged or repeated expo-\nsure', ['H372']],
    ['May be harmful if swallowed and enters airways', ['H305']],
    ['Causes skin irritation and serious eye damage', ['H315', 'H318']],
    ['May damage fertility or the unborn child (inhalation)', ['H360']],
  ])('%s', (text, expected) => {
    expect(matchStatements(text, 'en', 'H', true).map((match) => match.code)).toEqual(expected);
  });
});

describe('what is not a statement of its own', () => {
  it.each([
    ['en', 'There is no evidence that it may cause cancer'],
    ['en', 'Wear gloves if\nmay cause an allergic skin reaction'],
    ['es', 'Los estudios dicen que puede perjudicar la fertilidad o dañar al feto'],
  ])('%s: %s', (language, text) => {
    expect(matchStatements(text, language, 'H', true)).toEqual([]);
  });
});

describe('hazards of the product', () => {
  it('are the printed codes, with suffixes that matter and combinations', () => {
    expect(codes('Hazard statements   H314-1 Causes severe skin burns.\n                    H360FD May damage fertility.\n                    H302 + H332 Harmful if swallowed or if inhaled.\n                    H350i May cause cancer by inhalation.')).toEqual(['H302+H332', 'H314', 'H350i', 'H360FD']);
  });

  it('are read out of a line of classes', () => {
    expect(codes('Health hazards   Acute Tox. 4 - H332 Skin Irrit. 2 - H315 STOT SE 3 -\n                 H335, H336 Asp. Tox. 1 - H304')).toEqual(['H304', 'H315', 'H332', 'H335', 'H336']);
  });

  it('are none when section 2 runs on to the end of a long sheet: its codes may be the glossary', () => {
    const glossary = Array.from({ length: 80 }, (_, at) => `Line ${at} of a text whose headings nobody could read`).join('\n');
    const text = `Section 1. Identification\nProduct name: Quarrybond 40\nSection 2. Hazards identification\nH315 Causes skin irritation.\n${glossary}\nH225 Highly flammable liquid and vapor`;
    expect(readLines(pagesFrom(text)).hazardCodes).toEqual([]);
  });

  it('are not those of an ingredient, of section 3 or of section 16', () => {
    expect(codes('Hazard statements   H315 Causes skin irritation.\nPortland cement 65997-15-1 H318', 'Quartz  14808-60-7  H372')).toEqual(['H315']);
  });

  it('are mapped from sentences where no code is printed', () => {
    const reading = read('Signal word          Danger\nHazard statements    Flammable liquid and vapor. Causes serious eye\n                     irritation.\n                     May cause cancer.\nPrecautionary statements    Wear gloves. If skin irritation occurs: get advice.');
    expect(reading.hazardCodes.map(({ value }) => value)).toEqual(['H226', 'H319', 'H350']);
    expect(reading.hazardCodes[0]).toMatchObject({ page: 1, quote: 'Flammable liquid and vapor', because: expect.stringMatching(/without its code/) });
  });

  it('prefer the listed codes to a paragraph that says otherwise', () => {
    expect(codes('GHS Hazards\nH225   Highly flammable liquid and vapour\nHazard Statements: Highly flammable liquid and vapor. Causes skin irritation.')).toEqual(['H225']);
  });

  it('are not prose about dust or vapor', () => {
    expect(codes('Signal word   Warning\nHazard statements   Causes skin irritation.\nSupplemental label elements   Sanding dusts may be harmful if inhaled. Vapors cause drowsiness.')).toEqual(['H315']);
  });

  it('are none on a sheet older than the global system, whose sentences are not statements', () => {
    expect(codes('Emergency overview\nWARNING!\nHARMFUL IF INHALED.\nCAUSES EYE IRRITATION.')).toEqual([]);
  });

  it.each([
    ['es', 'Palabra de advertencia: Peligro\nIndicaciones de peligro: Provoca irritación cutánea.\nPuede provocar cáncer.\nConsejos de prudencia: No respirar el polvo de la mezcla para la seguridad de los ojos y la piel', ['H315', 'H350']],
    ['fr', "Mention d'avertissement : Attention\nMentions de danger : Provoque une sévère irritation des yeux.\nConseils de prudence : Ne pas respirer les poussières pour la peau et les yeux", ['H319']],
    ['de', 'Signalwort: Gefahr\nGefahrenhinweise: Verursacht schwere Augenschäden.\nKann allergische Hautreaktionen verursachen.\nSicherheitshinweise: Staub nicht einatmen und nach der Arbeit die Haut waschen, bei Kontakt mit den Augen', ['H317', 'H318']],
  ])('are mapped in %s', (language, section2, expected) => {
    const reading = read(section2);
    expect(reading.language?.value).toBe(language);
    expect(reading.hazardCodes.map(({ value }) => value)).toEqual(expected);
  });
});

describe('precautions', () => {
  it('are the printed codes, joined over a broken line', () => {
    const reading = read('Precautionary statements   P210           Keep away from heat.\n                           P305+P351+P3   IF IN EYES: Rinse.\n                           38\n                           P301+330+331   IF SWALLOWED: Rinse mouth.');
    expect(reading.precautionaryCodes.map(({ value }) => value)).toEqual(['P210', 'P301+P330+P331', 'P305+P351+P338']);
  });

  it('are mapped from their opening words', () => {
    const reading = read('Signal word   Danger\nHazard statements   Causes skin irritation.\nPrecautionary statements\nPrevention   Do not breathe vapor. Avoid release to the environment.\nStorage      Store locked up.');
    expect(reading.precautionaryCodes.map(({ value }) => value)).toEqual(['P260', 'P273', 'P405']);
  });
});

describe('the signal word', () => {
  it.each([
    ['Signal word: Danger', 'danger'],
    ['Signal Word\nDanger', 'danger'],
    ['Signal word   : Warning', 'warning'],
    ['Palabra de advertencia   Atención', 'warning'],
    ['Signalwort Gefahr', 'danger'],
    ['WARNING\nHazard statements   Causes skin irritation', 'warning'],
    ['Signal word   No signal word', 'none'],
    ['This product is not classified as hazardous.', 'none'],
    ['Tactile warning of   Not applicable.\ndanger', 'none'],
  ])('%s → %s', (section2, expected) => {
    expect(read(section2).signalWord?.value).toBe(expected);
  });

  it('stays open where statements are printed and the word is not: it may be a picture', () => {
    expect(read('Hazard statements\nH315 Causes skin irritation.').signalWord).toBeNull();
  });

  it('is found in running text and after "Label:"', () => {
    expect(read('Skin Irritation, Category 2 (H315). Signal word: Warning. Causes skin irritation.').signalWord?.value).toBe('warning');
    expect(read('Label: Danger').signalWord?.value).toBe('danger');
  });

  it('is not the warning about California', () => {
    expect(read('WARNING: This product contains a chemical known to the State of California to cause cancer.').signalWord?.value).toBe('none');
  });
});
