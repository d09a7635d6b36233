import { describe, expect, it } from '@jest/globals';
import * as plain from '#test/support/house-styles.data';
import * as odd from '#test/support/odd-styles.data';
import { pagesFrom } from '#test/support/sheet-text';
import { withLabelsOnTop } from './middle-cells';
import { readLines } from './read-sheet';

const styles = { ...plain, ...odd };

interface Expected {
  name: string | null;
  supplier: string;
  revised: string | null;
  signal: 'danger' | 'warning' | 'none';
  hazards: string;
  ingredients: readonly string[];
  sections?: number;
  notices?: readonly string[];
}

/** What a person reads off the drawn sheets in test/support/house-styles.data.ts and odd-styles.data.ts. */
const expected: Record<keyof typeof styles, Expected> = {
  twoDatesInTheHeader: { name: 'Tollgate Floor Sealer', supplier: 'Bellmouth Coatings Corp', revised: '2021-11-30', signal: 'danger', hazards: 'H226 H304 H315 H340', ingredients: ['Stoddard solvent, 8052-41-3: 60 - 100', 'Xylenes (o-, m-, p- isomers), 1330-20-7: 1 - 5', 'Toluene, 108-88-3: <0.1'] },
  statementsInOneCell: { name: 'Slab Etch Gel', supplier: 'Pale Harbor Supply Co.', revised: '2015-05-27', signal: 'danger', hazards: 'H290 H314 H335', ingredients: ['Phosphoric acid, 7664-38-2: 10 - 30', 'Citric acid, 77-92-9: 5 - < 10'] },
  datesInOneLine: { name: 'Quarry Lock 7', supplier: 'Slate & Sons Ltd', revised: '2018-04-03', signal: 'danger', hazards: 'H315 H318', ingredients: ['Portland cement, 65997-15-1: 25 - 50', 'Quartz, 14808-60-7: < 1'] },
  oldEightSectionForm: { name: 'Slabcure 5', supplier: 'Lakefoot Chemical Company', revised: '1998-03-09', signal: 'none', hazards: '', ingredients: ['Xylene, 1330-20-7: 10-30', 'Mineral spirits, 8052-41-3: 50'], sections: 8 },
  germanNumbersFirst: { name: 'Schieferschutz 3', supplier: 'Mergel Chemie GmbH', revised: '2020-02-03', signal: 'warning', hazards: 'H315 H317', ingredients: ['Reaktionsprodukt: Bisphenol-A-Epichlorhydrinharze, 25068-38-6: 25-50%', 'Benzylalkohol, 100-51-6: ≥2,5-<10%'] },
  frenchWithoutCodes: { name: 'Ardoise Primaire', supplier: 'Les Résines du Lac SARL', revised: '2019-03-07', signal: 'warning', hazards: 'H315 H317 H319', ingredients: ['Résine époxydique, 25068-38-6: 25 - < 50', 'Alcool benzylique, 100-51-6: 5 - 10'] },
  spanishMonthFirst: { name: 'LIMPIADOR DE LOSAS 9', supplier: 'Muelle Químicos S.A. de C.V.', revised: '2023-10-01', signal: 'warning', hazards: 'H315 H319', ingredients: ['Etanol, 64-17-5: >= 10 - < 20'] },
  smallMaker: { name: 'Rampart Patch Gray Part A', supplier: 'Rampart', revised: '2025-02-21', signal: 'warning', hazards: 'H315 H317 H319', ingredients: ['Bisphenol A resin, 25085-99-8: 50-70', 'Titanium dioxide, 13463-67-7: < 5%'] },
  titlesWithoutNumbers: { name: null, supplier: 'Marrow Salt Works, LLC', revised: '2016-06-15', signal: 'warning', hazards: 'H319', ingredients: ['Calcium chloride, 10043-52-4: 70-90%', 'Sodium chloride, 7647-14-5: 1-5%'] },
  nameUnderSubheading: { name: 'Slatebond D8 Off-White, Part B', supplier: '3Q Bonding', revised: '2019-05-29', signal: 'danger', hazards: 'H225 H317 H319 H372', ingredients: ['Methyl Methacrylate, 80-62-6: 40 - 70', 'Toluene, 108-88-3: < 0.5'] },
  statementsWithoutStops: { name: 'Slatewash A', supplier: 'Pier Scientific Company', revised: '2021-12-24', signal: 'danger', hazards: 'H225 H319 H336 H373', ingredients: ['Acetone, 67-64-1: >95'] },
  yearFirstDate: { name: 'Slateplan T 16 Part A', supplier: 'SLATE CORPORATION', revised: '2019-01-08', signal: 'warning', hazards: 'H315 H317 H319', ingredients: ['bisphenol-A-epichlorhydrin resin, 25068-38-6: >= 50.0 - < 75.0%', 'oxirane, mono[(C12-14-alkyloxy)methyl] derivs., 68609-97-2: >= 10.0 - < 15.0%'] },
  // "May 2015" is no full date, and a number with a wrong check digit is none.
  numberAndTitleApart: { name: 'Portland Cement', supplier: 'Slate Cement Corporation', revised: null, notices: ['date-without-day, page 1: Revision Date: May 2015'], signal: 'danger', hazards: 'H314 H317 H335 H350', ingredients: ['Portland cement, 65997-15-1: 100', 'Calcium oxide, 1305-78-8: 0 - 3', 'Quartz, 14808-60-7: 0-0.5'] },
  tableOfStatements: { name: 'Slate Bentonite Chips', supplier: 'Slate Drilling Supply Pty Ltd', revised: '2015-12-16', signal: 'danger', hazards: 'H350 H373', ingredients: ['bentonite, 1302-78-9: >60', 'silica crystalline - quartz, 14808-60-7: <10'] },
  sectionsSideBySide: { name: 'Slate Seal WB', supplier: 'Slate Coatings, LLC', revised: '2022-03-14', signal: 'warning', hazards: 'H315 H320', ingredients: ['2-Butoxyethanol, 111-76-2: 1-5', 'Ammonia, 1336-21-6: <1'] },
  labelsAtTheMiddle: { name: 'Sellador Pizarra 20', supplier: 'Recubrimientos Pizarra, S.A. de C.V.', revised: '2023-08-02', signal: 'danger', hazards: 'H225 H315 H319 H336 H361', ingredients: ['Tolueno, 108-88-3: 25 – 40 %'] },
  headingsInTheMargin: { name: 'Slate Thinner 6', supplier: 'Slate Mill Paint Company', revised: '2022-05-19', signal: 'danger', hazards: 'H225 H361d', ingredients: ['Toluene, 108-88-3: 60-80 %', 'Acetone, 67-64-1: 20-40 %'] },
  sentencesOnly: { name: 'Slateset Portland-Limestone Cement', supplier: 'Slate Wharf Cement Works', revised: '2023-01-06', signal: 'danger', hazards: 'H314 H317 H372', ingredients: ['Portland cement clinker, 65997-15-1: 70-95%', 'limestone, 1317-65-3: 5-15%', 'gypsum, 13397-24-5: 2-10%', 'crystalline silica, quartz, 14808-60-7: 0.1-1.5%', 'water, 7732-18-5: null'] },
  // The month alone is no date, and the superseded one is not this revision's.
  aMonthAlone: { name: 'Slate Strip X', supplier: 'Slate Supply Company', revised: null, signal: 'danger', hazards: 'H302+H332 H314', ingredients: ['Benzyl alcohol, 100-51-6: 30-50', 'Formic acid, 64-18-6: 10-20'], notices: ['date-without-day, page 1: Revised March 2024'] },
  twoLanguages: { name: 'Slate Fill 50', supplier: 'Scellants Ardoise inc.', revised: '2022-10-31', signal: 'warning', hazards: 'H317', ingredients: ['BENZYL ALCOHOL, 100-51-6: 30-60%', 'SALICYLIC ACID, 69-72-7: 1-5%'] },
  // Only the first sheet is read, and nothing of the second: not its later date either.
  kitOfTwo: { name: 'Slate Floor 70 Part A', supplier: 'Slate Binders, Inc.', revised: '2021-02-25', signal: 'warning', hazards: 'H317', ingredients: ['Epoxy resin, 25068-38-6: 60-80'], notices: ['several-sheets, page 2: SECTION 1: Identification'] },
  romanWithoutMark: { name: 'SLATE 850 CONDUCTIVE PRIMER - BASE', supplier: 'SLATE COATINGS CORP.', revised: '2022-10-19', signal: 'warning', hazards: 'H315 H351', ingredients: ['CARBON BLACK, 1333-86-4: 1-5'] },
};

describe('sheets of many makers', () => {
  it.each(Object.entries(expected) as [keyof typeof styles, Expected][])('%s', (style, sheet) => {
    const reading = readLines(pagesFrom(...styles[style]).map(withLabelsOnTop));
    expect({
      name: reading.productName?.value ?? null,
      supplier: reading.supplier?.value,
      revised: reading.revisionDate?.value ?? null,
      signal: reading.signalWord?.value,
      hazards: reading.hazardCodes.map(({ value }) => value).join(' '),
      ingredients: reading.ingredients.map(({ value }) => `${value.name}, ${value.cas}: ${value.concentration}`),
      sections: reading.sections.length,
      notices: reading.notices.map(({ kind, page, quote }) => `${kind}, page ${page}: ${quote}`),
    }).toEqual({ sections: 16, notices: [], ...sheet });
  });
});
