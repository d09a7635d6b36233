/**
 * Layouts that are harder to read than they look, drawn as text (see sheet-text.ts). Every product, maker and figure is
 * invented. Sections 4 to 16 say nothing here; their titles follow the language.
 */

const titles = {
  en: ['First-aid measures', 'Fire-fighting measures', 'Accidental release measures', 'Handling and storage', 'Exposure controls/personal protection', 'Physical and chemical properties', 'Stability and reactivity', 'Toxicological information', 'Ecological information', 'Disposal considerations', 'Transport information', 'Regulatory information', 'Other information'],
  es: ['Primeros auxilios', 'Medidas contra incendios', 'Medidas en caso de derrame accidental', 'Manejo y almacenamiento', 'Controles de exposición/protección personal', 'Propiedades físicas y químicas', 'Estabilidad y reactividad', 'Información toxicológica', 'Información ecotoxicológica', 'Información relativa a la eliminación', 'Información relativa al transporte', 'Información reglamentaria', 'Otra información'],
};
const rest = (heading: (number: number, title: string) => string, language: keyof typeof titles = 'en', last = ''): string => titles[language].map((title, at) => `${heading(at + 4, title)}\n${language === 'es' ? 'Ver la etiqueta del producto y las hojas de los datos.' : 'See the label of the product.\nAsk the maker.\nKeep this sheet.'}\n`).join('') + last;

/** Cells set to the middle: a label stands beside the middle of its text. */
export const labelsAtTheMiddle: readonly string[] = [
  `                    HOJA DE DATOS DE SEGURIDAD
SECCIÓN 1. IDENTIFICACIÓN DE LA SUSTANCIA QUÍMICA PELIGROSA O MEZCLA Y DEL PROVEEDOR O FABRICANTE

Nombre de la sustancia química peligrosa o mezcla   Sellador Pizarra 20

                                          Recubrimientos Pizarra, S.A. de C.V.
Datos del proveedor o fabricante          Muelle Norte 8, Superior
                                          Tel. 715 555 0100

Teléfono de emergencia                    Línea Azul, S.C. 800 000 0000

SECCIÓN 2. IDENTIFICACIÓN DE LOS PELIGROS

Palabra de advertencia                    PELIGRO

                                          Líquido y vapores muy inflamables.
                                          Provoca irritación cutánea.
Indicaciones de peligro                   Se sospecha que puede perjudicar la fertilidad o dañar al feto.
                                          Puede provocar somnolencia o vértigo.
                                          Provoca irritación ocular grave.

Consejos de prudencia                     Usar guantes de protección.

SECCIÓN 3. COMPOSICIÓN/INFORMACIÓN SOBRE LOS COMPONENTES
Identidad química      Número CAS      Número UN      Concentración
Tolueno                108-88-3        1294           25 – 40 %
${rest((number, title) => `SECCIÓN ${number}. ${title.toUpperCase()}`, 'es')}Fecha de elaboración       15 de marzo de 2018
Fecha de actualización     02 de agosto de 2023`,
];

/** Headings in the margin: what stands beside them is text of their section. */
export const headingsInTheMargin: readonly string[] = [
  `Material: Slate Thinner 6
Safety data sheet, 19 May 2022 (date of revision)
1. Identification        Product name: Slate Thinner 6
                         Supplier: Slate Mill Paint Company, 2 Mill Street, Superior WI 54880
                         Emergency telephone: Blueline Inc. 800 555 0166

2. Hazard                Signal word: DANGER
identification           H225 Highly flammable liquid and vapor
                         H361d Suspected of damaging the unborn child

3. Composition           Toluene   CAS 108-88-3   60-80 %
                         Acetone   CAS 67-64-1    20-40 %
${rest((number, title) => `\n${number}. ${title}`)}`,
];

/** Everything in sentences; each amount belongs to the number of its own clause. */
export const sentencesOnly: readonly string[] = [
  `SAFETY DATA SHEET
1 IDENTIFICATION
Product identifier: Slateset Portland-Limestone Cement
Supplier: Slate Wharf Cement Works, 200 Wharf Road, Superior WI 54880, tel. (715) 555-0160
2 HAZARDS IDENTIFICATION
The product is classified under 29 CFR 1910.1200(d). Signal word: Danger. Causes severe skin burns and eye dam-
age. May cause an allergic skin reaction. Causes damage to lungs through prolonged or repeated expo-
sure. Wear protective gloves.
3 COMPOSITION/INFORMATION ON INGREDIENTS
Portland cement clinker (CAS 65997-15-1) 70-95%; limestone (CAS 1317-65-3) 5-15%; gypsum (CAS 13397-24-5)
2-10%; crystalline silica, quartz (CAS 14808-60-7) 0.1-1.5%; water (CAS 7732-18-5), balance.
${rest((number, title) => `${number} ${title.toUpperCase()}`)}Date prepared: 22 April 2018. Date reviewed: 6 January 2023. The next review is due 6 January 2028.`,
];

/** A superseded date in figures, the revision without a day. */
export const aMonthAlone: readonly string[] = [
  `Slate Strip X                                   Revised March 2024 (replaces 1-15-2018)
1. Product and Company Identification
Trade Name: Slate Strip X
Manufactured for: Slate Supply Company
Address: 400 Pier Ave, Superior, WI 54880
In case of emergency: Blueline (800) 555-0101
2. Hazards Identification
Danger
H314 Causes severe skin burns and eye damage
H302+H332 Harmful if swallowed or if inhaled
3. Composition/Information on Ingredients
%          Ingredient           CAS Reg. No.    OSHA PEL    ACGIH TLV
30-50      Benzyl alcohol       100-51-6        none        none
10-20      Formic acid          64-18-6         5 ppm       5 ppm
${rest((number, title) => `${number}. ${title}`)}`,
];

/** Two languages side by side, and columns for the numbers: name and amount stand above, numbers below. */
export const twoLanguages: readonly string[] = [
  `SAFETY DATA SHEET / FICHE DE DONNÉES DE SÉCURITÉ
Revision date / Date de révision : 2022-10-31
SECTION 1: IDENTIFICATION / IDENTIFICATION
Product name / Nom du produit : Slate Fill 50
Supplier / Fournisseur : Scellants Ardoise inc.
The product is a filler for the joints of concrete floors and for the use of the trade only.
SECTION 2: HAZARD IDENTIFICATION / IDENTIFICATION DES DANGERS
Signal word / Mention d’avertissement : WARNING / ATTENTION
Hazard statements / Mentions de danger :
H317 May cause an allergic skin reaction / Peut provoquer une allergie cutanée
SECTION 3: COMPOSITION / COMPOSITION
BENZYL ALCOHOL                                                            30-60%
CAS number: 100-51-6      EC number: 202-859-9      REACH registration number: 01-2119492630-38-XXXX
Classification
Acute Tox. 4 - H302
SALICYLIC ACID                                                            1-5%
CAS number: 69-72-7       EC number: 200-712-3      REACH registration number: 01-2119486984-17-XXXX
${rest((number, title) => `SECTION ${number}: ${title.toUpperCase()}`)}`,
];

const part = (letter: string, date: string, hazards: string, ingredient: string): string => `SAFETY DATA SHEET
Revision date: ${date}
SECTION 1: Identification
Product name: Slate Floor 70 Part ${letter}
Supplier: Slate Binders, Inc.
SECTION 2: Hazard(s) identification
${hazards}
SECTION 3: Composition/information on ingredients
Name                   CAS No.          %
${ingredient}
${rest((number, title) => `SECTION ${number}: ${title}`)}`;

/** The sheets of both parts of a kit in one file. */
export const kitOfTwo: readonly string[] = [
  part('A', '02/25/2021', 'Signal word: Warning\nHazard statements: H317 May cause an allergic skin reaction', 'Epoxy resin            25068-38-6       60-80'),
  part('B', '08/30/2023', 'Signal word: Danger\nHazard statements: H314 Causes severe skin burns and eye damage', 'Isophorone diamine     2855-13-2        20-40'),
];

/** Roman numbers without a mark, capitals throughout, the maker named above section 1. */
export const romanWithoutMark: readonly string[] = [
  `SLATE COATINGS CORP.                         SAFETY DATA SHEET
2200 QUAY AVE, SUPERIOR, WI 54880            REV: 10/19/22
EMERGENCY: BLUELINE INC 800-555-0110         PRINTED: 11/02/22
I     PRODUCT IDENTIFICATION
      PRODUCT NAME:   SLATE 850 CONDUCTIVE PRIMER - BASE
      PRODUCT CODE:   850B
II    HAZARDS IDENTIFICATION
      SIGNAL WORD:    WARNING
      HAZARD STATEMENTS:
        CAUSES SKIN IRRITATION
        SUSPECTED OF CAUSING CANCER
III   COMPOSITION / INFORMATION ON INGREDIENTS
      INGREDIENT                      CAS NO.        WT %
      CARBON BLACK                    1333-86-4      1-5
${rest((number, title) => `${['IV', 'V', 'VI', 'VII', 'VIII', 'IX', 'X', 'XI', 'XII', 'XIII', 'XIV', 'XV', 'XVI'][number - 4]}     ${title.toUpperCase()}`)}`,
];
