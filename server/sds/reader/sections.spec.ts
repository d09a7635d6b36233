import { describe, expect, it } from '@jest/globals';
import { pagesFrom } from '#test/support/sheet-text';
import { findSections } from './sections';

/** Titles as in 29 CFR 1910.1200 Table D.1 (en) and REACH Annex II part B (es, fr, de; the last three from memory). */
const titles = {
  en: ['Identification', 'Hazard(s) identification', 'Composition/information on ingredients', 'First-aid measures', 'Fire-fighting measures', 'Accidental release measures', 'Handling and storage', 'Exposure controls/personal protection', 'Physical and chemical properties', 'Stability and reactivity', 'Toxicological information', 'Ecological information', 'Disposal considerations', 'Transport information', 'Regulatory information', 'Other information'],
  es: ['Identificación de la sustancia o la mezcla y de la sociedad o la empresa', 'Identificación de los peligros', 'Composición/información sobre los componentes', 'Primeros auxilios', 'Medidas de lucha contra incendios', 'Medidas en caso de vertido accidental', 'Manipulación y almacenamiento', 'Controles de exposición/protección individual', 'Propiedades físicas y químicas', 'Estabilidad y reactividad', 'Información toxicológica', 'Información ecológica', 'Consideraciones relativas a la eliminación', 'Información relativa al transporte', 'Información reglamentaria', 'Otra información'],
  fr: ["Identification de la substance/du mélange et de la société/l'entreprise", 'Identification des dangers', 'Composition/informations sur les composants', 'Premiers secours', "Mesures de lutte contre l'incendie", 'Mesures à prendre en cas de dispersion accidentelle', 'Manipulation et stockage', "Contrôles de l'exposition/protection individuelle", 'Propriétés physiques et chimiques', 'Stabilité et réactivité', 'Informations toxicologiques', 'Informations écologiques', "Considérations relatives à l'élimination", 'Informations relatives au transport', 'Informations relatives à la réglementation', 'Autres informations'],
  de: ['Bezeichnung des Stoffs beziehungsweise des Gemischs und des Unternehmens', 'Mögliche Gefahren', 'Zusammensetzung/Angaben zu Bestandteilen', 'Erste-Hilfe-Maßnahmen', 'Maßnahmen zur Brandbekämpfung', 'Maßnahmen bei unbeabsichtigter Freisetzung', 'Handhabung und Lagerung', 'Begrenzung und Überwachung der Exposition/Persönliche Schutzausrüstungen', 'Physikalische und chemische Eigenschaften', 'Stabilität und Reaktivität', 'Toxikologische Angaben', 'Umweltbezogene Angaben', 'Hinweise zur Entsorgung', 'Angaben zum Transport', 'Rechtsvorschriften', 'Sonstige Angaben'],
};
const roman = ['I', 'II', 'III', 'IV', 'V', 'VI', 'VII', 'VIII', 'IX', 'X', 'XI', 'XII', 'XIII', 'XIV', 'XV', 'XVI'];
const words = ['ONE', 'TWO', 'THREE', 'FOUR', 'FIVE', 'SIX', 'SEVEN', 'EIGHT', 'NINE', 'TEN', 'ELEVEN', 'TWELVE', 'THIRTEEN', 'FOURTEEN', 'FIFTEEN', 'SIXTEEN'];
const spaced = (text: string): string => text.toUpperCase().split(' ').map((word) => word.split('').join(' ')).join('   ');

const find = (heading: (title: string, index: number) => string, list = titles.en) => findSections(pagesFrom(list.map((title, index) => `${heading(title, index)}\nText of this section, see section ${((index + 5) % 16) + 1} for more.`).join('\n')).flat());

describe('the sixteen sections', () => {
  it.each([
    ['"1. Title"', (title: string, index: number) => `${index + 1}. ${title}`, titles.en],
    ['"1.Title"', (title: string, index: number) => `${index + 1}.${title}`, titles.en],
    ['"1 Title"', (title: string, index: number) => `${index + 1} ${title}`, titles.en],
    ['"1: TITLE"', (title: string, index: number) => `${index + 1}: ${title.toUpperCase()}`, titles.en],
    ['"Section 1. Title"', (title: string, index: number) => `Section ${index + 1}. ${title}`, titles.en],
    ['"SECTION 1: TITLE"', (title: string, index: number) => `SECTION ${index + 1}: ${title.toUpperCase()}`, titles.en],
    ['"Section 1 -- TITLE"', (title: string, index: number) => `Section ${index + 1} -- ${title.toUpperCase()}`, titles.en],
    ['"SECTION ONE - TITLE"', (title: string, index: number) => `SECTION ${words[index]} - ${title}`, titles.en],
    ['"Section Twelve: Title"', (title: string, index: number) => `Section ${words[index]?.toLowerCase()}: ${title}`, titles.en],
    ['"SECTION IV - TITLE"', (title: string, index: number) => `SECTION ${roman[index]} - ${title}`, titles.en],
    ['"XII. Title"', (title: string, index: number) => `${roman[index]}. ${title}`, titles.en],
    ['number and title in cells of their own', (title: string, index: number) => `SECTION ${index + 1}     ${title}`, titles.en],
    ['number alone, title below', (title: string, index: number) => `SECTION ${index + 1}\n${title}`, titles.en],
    ['spaced letters', (title: string, index: number) => `${index + 1}.  ${spaced(title)}`, titles.en],
    ['title with the ANSI number behind', (title: string, index: number) => `${title.toUpperCase()}   (ANSI Section ${index + 1})`, titles.en],
    ['"SECTION 1 of 16: TITLE"', (title: string, index: number) => `SECTION ${index + 1} of 16: ${title.toUpperCase()}`, titles.en],
    ['"1.0 TITLE"', (title: string, index: number) => `${index + 1}.0 ${title.toUpperCase()}`, titles.en],
    ['"§ 1. Title"', (title: string, index: number) => `§ ${index + 1}. ${title}`, titles.en],
    ['"1 | Title"', (title: string, index: number) => `${index + 1} | ${title}`, titles.en],
    ['"IV   TITLE"', (title: string, index: number) => `${roman[index]}   ${title.toUpperCase()}`, titles.en],
    ['titles without numbers', (title: string) => title.toUpperCase(), titles.en],
    ['Spanish', (title: string, index: number) => `SECCIÓN ${index + 1}: ${title}`, titles.es],
    ['French', (title: string, index: number) => `RUBRIQUE ${index + 1}: ${title}`, titles.fr],
    ['German', (title: string, index: number) => `ABSCHNITT ${index + 1}: ${title}`, titles.de],
    ['German, numbers only', (title: string, index: number) => `${index + 1}. ${title.toUpperCase()}`, titles.de],
  ])('are found as %s', (_, heading, list) => {
    const { headings, bodies } = find(heading, list);
    expect(headings.map(({ number }) => number)).toEqual(Array.from({ length: 16 }, (__, index) => index + 1));
    expect(bodies.get('transport')?.at(-1)?.text).toMatch(/^Text of this section/);
  });

  it('follow their titles where old American sheets put composition second', () => {
    const old = ['Product and company identification', 'Composition/information on ingredients', 'Hazards identification', ...titles.en.slice(3)];
    const { bodies, headingLines } = find((title, index) => `Section ${index + 1} -- ${title.toUpperCase()}`, old);
    expect(headingLines.get('composition')?.text).toMatch(/^Section 2/);
    expect(bodies.get('hazards')).toHaveLength(1);
  });

  it('are not subsections, references or figures', () => {
    const text = `Section 1. Identification
1.1 Product identifier
Section 2. Hazards identification
Section 7 for advice on storage.
2.1 Classification
Section 8.
Section 9. Physical and chemical properties
9.1 Information on basic physical and chemical properties
10 mg of stability test`;
    expect(findSections(pagesFrom(text).flat()).headings.map(({ number }) => number)).toEqual([1, 2, 9]);
  });

  it('go on over the page under a repeated heading', () => {
    const { headings, bodies } = findSections(pagesFrom('1. Identification\na name\n2. Hazards identification\nfirst part', '2. Hazards identification\nsecond part\n3. Composition').flat());
    expect(headings.map(({ number, page }) => [number, page])).toEqual([[1, 1], [2, 1], [3, 2]]);
    expect(bodies.get('hazards')?.map(({ text }) => text)).toEqual(['first part', 'second part']);
  });

  it('pass over a table of contents and leave a second sheet in the same file unread', () => {
    const contents = titles.en.map((title, index) => `${index + 1}. ${title}`).join('\n');
    const sheet = (word: string): string => titles.en.map((title, index) => `${index + 1}. ${title}\n${word} ${index}\n${word} more\n${word} yet more`).join('\n');
    const { bodies } = findSections(pagesFrom(`${contents}\n${sheet('first')}\n${sheet('second')}`).flat());
    expect(bodies.get('hazards')?.map(({ text }) => text)).toEqual(['first 1', 'first more', 'first yet more']);
  });

  it('leave out a seventeenth', () => {
    expect(find((title, index) => `SECTION ${index + 1}: ${title}`, [...titles.en, 'Disclaimer']).headings).toHaveLength(16);
  });
});
