import { type DemoSheetSpec } from './demo-sheet';

/**
 * The sheets of the demonstration. Products and supplier are invented; substances, CAS numbers and classes are those of
 * generic trade chemicals, the ranges plausible, none of it any supplier's. Limits: 29 CFR 1910.1000 Table Z-1 and
 * 1926.1153(d)(1) as known, ACGIH and NIOSH figures from memory.
 */
const northlode = {
  name: 'Northlode Resins, Inc.',
  address: ['1180 Ore Dock Road', 'Superior, WI 54880, USA'],
  phone: '715-555-0142',
  emergencyPhone: '715-555-0199 (24 hours)',
};

const epoxyPpe = {
  eyes: 'Wear safety glasses with side shields; wear goggles where splashes are likely.',
  hands: 'Wear nitrile or butyl rubber gloves, at least 0.4 mm thick. Change them when they are soiled inside.',
  skin: 'Wear long sleeves, coveralls and boots.',
  respiratory: 'With good ventilation none is needed. Otherwise wear a half mask with organic vapor cartridges and P100 filters.',
};

export const quarrybondPartA: DemoSheetSpec = {
  fileName: 'quarrybond-40-part-a.pdf',
  language: 'en',
  layout: 'plain',
  productName: 'Quarrybond 40 Part A',
  productCode: 'QB40-A',
  use: 'Resin emulsion for cementitious urethane floors. For professional use.',
  supplier: northlode,
  revisedOn: '2024-03-18',
  issuedOn: '2021-02-09',
  supersedesOn: '2021-02-09',
  version: '3.0',
  signalWord: 'warning',
  classification: ['Skin irritation, category 2', 'Eye irritation, category 2A', 'Skin sensitization, category 1'],
  hazards: ['H315', 'H317', 'H319'],
  precautions: ['P261', 'P264', 'P272', 'P280', 'P302+P352', 'P305+P351+P338', 'P333+P313', 'P501'],
  ingredients: [
    { name: 'Castor oil polyol', cas: '8001-79-4', concentration: '30 - 60 %' },
    { name: 'Water', cas: '7732-18-5', concentration: '20 - 40 %' },
    { name: 'Reaction product: bisphenol-A-(epichlorhydrin)', cas: '25068-38-6', concentration: '5 - 10 %' },
    { name: '1,2-Benzisothiazol-3(2H)-one', cas: '2634-33-5', concentration: '< 0.1 %' },
  ],
  limits: [],
  ppe: epoxyPpe,
  appearance: 'White milky liquid, mild smell',
  flashPoint: 'Above 100 °C (212 °F), closed cup',
  transport: 'Not regulated for transport by road (DOT).',
};

export const quarrybondPartB: DemoSheetSpec = {
  fileName: 'quarrybond-40-part-b.pdf',
  language: 'en',
  layout: 'tables',
  productName: 'Quarrybond 40 Part B',
  productCode: 'QB40-B',
  use: 'Isocyanate hardener for cementitious urethane floors. For professional use.',
  supplier: northlode,
  revisedOn: '2024-09-27',
  issuedOn: '2020-05-14',
  supersedesOn: '2022-11-30',
  version: '4.1',
  signalWord: 'danger',
  classification: [
    'Acute toxicity, inhalation, category 4',
    'Skin irritation, category 2',
    'Eye irritation, category 2A',
    'Respiratory sensitization, category 1',
    'Skin sensitization, category 1',
    'Carcinogenicity, category 2',
    'Specific target organ toxicity, single exposure, category 3',
    'Specific target organ toxicity, repeated exposure, category 2',
  ],
  hazards: ['H332', 'H315', 'H319', 'H334', 'H317', 'H351', 'H335', 'H373'],
  precautions: ['P260', 'P264', 'P271', 'P272', 'P280', 'P284', 'P304+P340', 'P342+P311', 'P302+P352', 'P405', 'P501'],
  ingredients: [
    { name: "4,4'-Methylenediphenyl diisocyanate", cas: '101-68-8', concentration: '30 - 60 %' },
    { name: 'Polymethylene polyphenyl isocyanate (polymeric MDI)', cas: '9016-87-9', concentration: '30 - 60 %' },
    { name: "2,4'-Methylenediphenyl diisocyanate", cas: '5873-54-1', concentration: '1 - 5 %' },
  ],
  limits: [
    { substance: "4,4'-Methylenediphenyl diisocyanate", kind: 'OSHA PEL ceiling', amount: '0.02 ppm' },
    { substance: "4,4'-Methylenediphenyl diisocyanate", kind: 'ACGIH TLV TWA', amount: '0.005 ppm' },
  ],
  ppe: {
    ...epoxyPpe,
    respiratory: 'Vapor is hazardous before it can be smelled. Where air is not known to be below the limits wear a supplied-air respirator, or a half mask with organic vapor cartridges and P100 filters on a written change schedule.',
  },
  appearance: 'Brown liquid, faint musty smell',
  flashPoint: 'Above 200 °C (392 °F), closed cup',
  transport: 'Not regulated for transport by road in containers under the reportable quantity.',
};

export const quarrybondPartC: DemoSheetSpec = {
  fileName: 'quarrybond-40-part-c.pdf',
  language: 'en',
  layout: 'running',
  productName: 'Quarrybond 40 Part C',
  productCode: 'QB40-C',
  use: 'Cement and quartz powder for cementitious urethane floors. For professional use.',
  supplier: northlode,
  revisedOn: '2023-06-05',
  issuedOn: '2019-04-22',
  supersedesOn: '2021-01-11',
  version: '2.2',
  signalWord: 'danger',
  classification: [
    'Skin irritation, category 2',
    'Serious eye damage, category 1',
    'Skin sensitization, category 1',
    'Carcinogenicity, category 1A',
    'Specific target organ toxicity, single exposure, category 3',
    'Specific target organ toxicity, repeated exposure, category 1 (lungs)',
  ],
  hazards: ['H315', 'H317', 'H318', 'H335', 'H350', 'H372'],
  precautions: ['P201', 'P202', 'P260', 'P264', 'P270', 'P271', 'P280', 'P302+P352', 'P305+P351+P338', 'P308+P313', 'P501'],
  ingredients: [
    { name: 'Quartz (crystalline silica)', cas: '14808-60-7', concentration: '50 - 70 %' },
    { name: 'Portland cement', cas: '65997-15-1', concentration: '20 - 30 %' },
    { name: 'Calcium hydroxide', cas: '1305-62-0', concentration: '5 - 10 %' },
    { name: 'Titanium dioxide', cas: '13463-67-7', concentration: '1 - 5 %' },
  ],
  limits: [
    { substance: 'Quartz (crystalline silica)', kind: 'OSHA PEL TWA', amount: '0.05 mg/m3 (respirable)' },
    { substance: 'Portland cement', kind: 'OSHA PEL TWA', amount: '15 mg/m3 (total dust)' },
    { substance: 'Calcium hydroxide', kind: 'OSHA PEL TWA', amount: '15 mg/m3 (total dust)' },
  ],
  ppe: {
    eyes: 'Wear tight goggles: the powder burns wet eyes.',
    hands: 'Wear alkali-resistant nitrile gloves.',
    skin: 'Wear long sleeves and boots; wash powder off before it gets wet with sweat.',
    respiratory: 'Where dust cannot be kept down wear at least an N95 filtering facepiece; see the silica rule for mixing and sanding.',
  },
  appearance: 'Gray powder, no smell',
  flashPoint: 'Does not burn',
  transport: 'Not regulated for transport by road (DOT).',
};

export const primer: DemoSheetSpec = {
  fileName: 'northlode-primer-12.pdf',
  language: 'en',
  layout: 'tables',
  productName: 'Northlode Primer 12',
  productCode: 'NP-12',
  use: 'Epoxy primer for dry concrete. For professional use.',
  supplier: northlode,
  revisedOn: '2022-08-16',
  issuedOn: '2018-10-02',
  supersedesOn: '2020-03-23',
  version: '2.0',
  signalWord: 'danger',
  classification: ['Flammable liquid, category 3', 'Skin corrosion, category 1B', 'Serious eye damage, category 1', 'Skin sensitization, category 1', 'Hazardous to the aquatic environment, long-term, category 2'],
  hazards: ['H226', 'H314', 'H317', 'H411'],
  precautions: ['P210', 'P233', 'P240', 'P261', 'P273', 'P280', 'P303+P361+P353', 'P305+P351+P338', 'P391', 'P501'],
  ingredients: [
    { name: 'Reaction product: bisphenol-A-(epichlorhydrin)', cas: '25068-38-6', concentration: '40 - 60 %' },
    { name: 'Xylene', cas: '1330-20-7', concentration: '10 - 20 %' },
    { name: 'Benzyl alcohol', cas: '100-51-6', concentration: '5 - 10 %' },
    { name: 'Isophorone diamine', cas: '2855-13-2', concentration: '5 - 10 %' },
  ],
  limits: [
    { substance: 'Xylene', kind: 'OSHA PEL TWA', amount: '100 ppm' },
    { substance: 'Xylene', kind: 'ACGIH TLV TWA', amount: '20 ppm' },
  ],
  ppe: epoxyPpe,
  appearance: 'Clear amber liquid, solvent smell',
  flashPoint: '27 °C (81 °F), closed cup',
  transport: 'UN1263, Paint, 3, PG III',
};

export const degreaser: DemoSheetSpec = {
  fileName: 'northlode-degreaser.pdf',
  language: 'en',
  layout: 'plain',
  productName: 'Northlode Slab Degreaser',
  productCode: 'ND-5',
  use: 'Alkaline cleaner for concrete before coating. For professional use.',
  supplier: northlode,
  revisedOn: '2021-12-01',
  issuedOn: '2017-07-19',
  supersedesOn: null,
  version: '1.3',
  signalWord: 'danger',
  classification: ['Corrosive to metals, category 1', 'Skin corrosion, category 1B', 'Serious eye damage, category 1'],
  hazards: ['H290', 'H314'],
  precautions: ['P260', 'P264', 'P280', 'P301+P330+P331', 'P303+P361+P353', 'P305+P351+P338', 'P405', 'P501'],
  ingredients: [
    { name: 'Sodium hydroxide', cas: '1310-73-2', concentration: '1 - 5 %' },
    { name: 'Sodium metasilicate', cas: '6834-92-0', concentration: '1 - 5 %' },
    { name: '2-Butoxyethanol', cas: '111-76-2', concentration: '3 - 7 %' },
  ],
  limits: [
    { substance: 'Sodium hydroxide', kind: 'OSHA PEL TWA', amount: '2 mg/m3' },
    { substance: '2-Butoxyethanol', kind: 'OSHA PEL TWA', amount: '50 ppm' },
  ],
  ppe: { ...epoxyPpe, eyes: 'Wear chemical goggles and a face shield: the liquid is caustic.', hearing: 'Wear hearing protection beside the pressure washer.' },
  appearance: 'Clear green liquid, faint smell',
  flashPoint: 'Does not burn',
  transport: 'UN1760, Corrosive liquid, n.o.s., 8, PG III',
};

/** The powder's sheet for Spanish-speaking crews. */
export const quarrybondPartCSpanish: DemoSheetSpec = {
  ...quarrybondPartC,
  fileName: 'quarrybond-40-parte-c.pdf',
  language: 'es',
  productName: 'Quarrybond 40 Parte C',
  use: 'Polvo de cemento y cuarzo para pisos de uretano cementoso. Para uso profesional.',
  classification: [
    'Irritación cutánea, categoría 2',
    'Lesiones oculares graves, categoría 1',
    'Sensibilización cutánea, categoría 1',
    'Carcinogenicidad, categoría 1A',
    'Toxicidad específica en órganos, exposición única, categoría 3',
    'Toxicidad específica en órganos, exposiciones repetidas, categoría 1 (pulmones)',
  ],
  ingredients: [
    { name: 'Cuarzo (sílice cristalina)', cas: '14808-60-7', concentration: '50 - 70 %' },
    { name: 'Cemento Portland', cas: '65997-15-1', concentration: '20 - 30 %' },
    { name: 'Hidróxido de calcio', cas: '1305-62-0', concentration: '5 - 10 %' },
    { name: 'Dióxido de titanio', cas: '13463-67-7', concentration: '1 - 5 %' },
  ],
  limits: [
    { substance: 'Cuarzo (sílice cristalina)', kind: 'OSHA PEL TWA', amount: '0.05 mg/m3 (respirable)' },
    { substance: 'Cemento Portland', kind: 'OSHA PEL TWA', amount: '15 mg/m3 (polvo total)' },
  ],
  ppe: {
    eyes: 'Usar gafas cerradas: el polvo quema los ojos húmedos.',
    hands: 'Usar guantes de nitrilo resistentes a los álcalis.',
    skin: 'Usar manga larga y botas; quitar el polvo antes de que se moje con el sudor.',
    respiratory: 'Donde no se pueda evitar el polvo, usar al menos una mascarilla N95; consulte la regla de la sílice para mezclar y lijar.',
  },
  appearance: 'Polvo gris, sin olor',
  flashPoint: 'No arde',
  transport: 'No regulado para el transporte por carretera (DOT).',
};

/** Every sheet of the demonstration. */
export const demoSheets: readonly DemoSheetSpec[] = [quarrybondPartA, quarrybondPartB, quarrybondPartC, quarrybondPartCSpanish, primer, degreaser];
