/**
 * Ways in which sheets are laid out, drawn as text (see sheet-text.ts). Layouts as met in practice; every product, maker,
 * address and figure is invented.
 */

export const twoDatesInTheHeader: readonly string[] = [
  `                               SAFETY DATA SHEET
Issuing Date 12-Mar-2015            Revision Date 30-Nov-2021            Revision Number 3

                               1. IDENTIFICATION
Product identifier
Product Name          Tollgate Floor Sealer

Other means of identification
Product Code(s)       TFS-100
Synonyms              None

Recommended use of the chemical and restrictions on use
Recommended Use       Concrete sealer.

Details of the supplier of the safety data sheet
Supplier Address
Bellmouth Coatings Corp
77 Harbor Street
Duluth, MN 55802

Emergency telephone number
Company Phone Number  218-555-0107

                               2. HAZARDS IDENTIFICATION
Classification
Skin corrosion/irritation               Category 2
Flammable liquids                       Category 3

Label elements

                               Emergency Overview
Danger
Hazard statements
Causes skin irritation
May cause genetic defects
May be fatal if swallowed and enters airways
Flammable liquid and vapor

Appearance Clear              Physical state Liquid            Odor Solvent

Precautionary Statements - Prevention
Obtain special instructions before use

                               3. COMPOSITION/INFORMATION ON INGREDIENTS
Chemical name                 CAS No              Weight-%          Trade secret
Stoddard solvent              8052-41-3           60 - 100          *
Xylenes (o-, m-, p-           1330-20-7           1 - 5             *
isomers)
Toluene                       108-88-3            <0.1              *
*The exact percentage (concentration) of composition has been withheld as a trade secret.
                               4. FIRST AID MEASURES
Eye contact           Rinse.
                               5. FIRE-FIGHTING MEASURES
Use foam.
                               6. ACCIDENTAL RELEASE MEASURES
Sweep.
                               7. HANDLING AND STORAGE
Keep closed.
                               8. EXPOSURE CONTROLS/PERSONAL PROTECTION
Control parameters
Exposure Guidelines
Chemical name           ACGIH TLV               OSHA PEL               NIOSH IDLH
Stoddard solvent        TWA: 100 ppm            TWA: 500 ppm           IDLH: 20000 mg/m3
8052-41-3                                       TWA: 2900 mg/m3
Appropriate engineering controls
Engineering controls    Showers
Individual protection measures, such as personal protective equipment
Eye/face protection     Wear safety glasses with side shields (or goggles).
Skin and body protection   Wear gloves.
Respiratory protection  Use a respirator.
                               9. PHYSICAL AND CHEMICAL PROPERTIES
Liquid
                               10. STABILITY AND REACTIVITY
Stable
                               11. TOXICOLOGICAL INFORMATION
None
                               12. ECOLOGICAL INFORMATION
None
                               13. DISPOSAL CONSIDERATIONS
None
                               14. TRANSPORT INFORMATION
None
                               15. REGULATORY INFORMATION
None
                               16. OTHER INFORMATION
Issuing Date          12-Mar-2015
Revision Date         30-Nov-2021`,
];

export const statementsInOneCell: readonly string[] = [
  `SAFETY DATA SHEET
1. Identification
Product identifier              Slab Etch Gel
Other means of identification
  SDS number                    110
Recommended use                 Etching
Recommended restrictions        None known.
Manufacturer/Importer/Supplier/Distributor information
Manufacturer
  Company name                  Pale Harbor Supply Co.
  Address                       4 Pier Rd
                                Superior, WI 54880
  Telephone                     715-555-0155
2. Hazard(s) identification
Physical hazards                Corrosive to metals            Category 1
Health hazards                  Skin corrosion/irritation      Category 1A
OSHA defined hazards            Not classified.
Label elements
Signal word                     Danger
Hazard statement                May be corrosive to metals. Causes severe skin burns and eye damage. May cause
                                respiratory irritation.
Precautionary statement
  Prevention                    Do not breathe mist or vapor.
Hazard(s) not otherwise         None known.
classified (HNOC)
Supplemental information        10% of the mixture consists of component(s) of unknown acute oral toxicity.
3. Composition/information on ingredients
Mixtures
Chemical name                   Common name and synonyms      CAS number            %
Phosphoric acid                 Orthophosphoric acid          7664-38-2             10 - 30*
Citric acid                                                   77-92-9               5 - < 10
Other components below reportable levels                                            60 - < 70
*Designates that a specific chemical identity has been withheld.
4. First-aid measures
Inhalation                      Fresh air.
Material name: Slab Etch Gel                                            SDS US
110  Version #: 02    Revision date: -    Issue date: 27-May-2015             1 / 2`,
  `5. Fire-fighting measures
x
6. Accidental release measures
x
7. Handling and storage
x
8. Exposure controls/personal protection
Occupational exposure limits
US. OSHA Table Z-1 Limits for Air Contaminants (29 CFR 1910.1000)
Components                      Type                  Value
Phosphoric acid (CAS            PEL                   1 mg/m3
7664-38-2)
US. ACGIH Threshold Limit Values
Components                      Type                  Value
Phosphoric acid (CAS            STEL                  3 mg/m3
7664-38-2)
                                TWA                   1 mg/m3
Biological limit values         No biological exposure limits noted.
9. Physical and chemical properties
x
10. Stability and reactivity
x
11. Toxicological information
x
12. Ecological information
x
13. Disposal considerations
x
14. Transport information
x
15. Regulatory information
x
16. Other information, including date of preparation or last revision
Issue date                      27-May-2015
Version #                       02
Material name: Slab Etch Gel                                            SDS US
110  Version #: 02    Revision date: -    Issue date: 27-May-2015             2 / 2`,
];

export const datesInOneLine: readonly string[] = [
  `Quarry Lock 7
Safety Data Sheet
according to Regulation (EC) No. 1907/2006 (REACH) with its amendment Regulation (EU) 2015/830
Date of issue: 01/02/2015    Revision date: 03/04/2018    Supersedes: 01/02/2015    Version: 3.0
SECTION 1: Identification of the substance/mixture and of the company/undertaking
1.1. Product identifier
Product form                    : Mixture
Trade name                      : Quarry Lock 7
UFI                             : AAAA-BBBB-CCCC-DDDD
1.2. Relevant identified uses of the substance or mixture and uses advised against
1.3. Details of the supplier of the safety data sheet
Slate & Sons Ltd
Unit 4, Foundry Lane
LS1 4AP Leeds - United Kingdom
T +44 113 496 0000
info@slate.example
1.4. Emergency telephone number
Emergency number                : +44 113 496 0001
SECTION 2: Hazards identification
2.1. Classification of the substance or mixture
Classification according to Regulation (EC) No. 1272/2008 [CLP]
Skin corrosion/irritation, Category 2          H315
Serious eye damage/eye irritation, Category 1  H318
Full text of H statements : see section 16
2.2. Label elements
Signal word (CLP)               : Danger
Contains                        : Portland cement
Hazard statements (CLP)         : H315 - Causes skin irritation.
                                  H318 - Causes serious eye damage.
Precautionary statements (CLP)  : P280 - Wear eye protection.
EUH-statements                  : EUH208 - Contains chromium. May produce an allergic reaction.
2.3. Other hazards
SECTION 3: Composition/information on ingredients
3.2. Mixtures
Name                     Product identifier                  %          Classification according to
                                                                        Regulation (EC) No. 1272/2008 [CLP]
Portland cement          (CAS-No.) 65997-15-1                25 - 50    Skin Irrit. 2, H315
                         (EC-No.) 266-043-4                             Eye Dam. 1, H318
Quartz                   (CAS-No.) 14808-60-7                < 1        STOT RE 1, H372
                         (EC-No.) 238-878-4
                         (REACH-no) 01-2119489428-22
SECTION 4: First aid measures
SECTION 5: Firefighting measures
SECTION 6: Accidental release measures
SECTION 7: Handling and storage
SECTION 8: Exposure controls/personal protection
SECTION 9: Physical and chemical properties
SECTION 10: Stability and reactivity
SECTION 11: Toxicological information
SECTION 12: Ecological information
SECTION 13: Disposal considerations
SECTION 14: Transport information
SECTION 15: Regulatory information
SECTION 16: Other information
Full text of H- and EUH-statements:
H372                            Causes damage to organs through prolonged or repeated exposure.`,
];

export const oldEightSectionForm: readonly string[] = [
  `M A T E R I A L   S A F E T Y   D A T A   S H E E T
SECTION I - PRODUCT IDENTIFICATION
MANUFACTURER'S NAME                                EMERGENCY TELEPHONE NO.
Lakefoot Chemical Company                          (715) 555-0100
ADDRESS                                            DATE PREPARED
900 Tower Ave, Superior, WI 54880                  3/9/98
TRADE NAME
Slabcure 5
SECTION II - HAZARDOUS INGREDIENTS/IDENTITY INFORMATION
HAZARDOUS COMPONENTS           CAS NO.          OSHA PEL        ACGIH TLV        %
Xylene                         1330-20-7        100 ppm         100 ppm          10-30
Mineral spirits                8052-41-3        500 ppm         100 ppm          50
SECTION III - PHYSICAL/CHEMICAL CHARACTERISTICS
Boiling point 280 F
SECTION IV - FIRE AND EXPLOSION HAZARD DATA
Flash 80 F
SECTION V - REACTIVITY DATA
Stable
SECTION VI - HEALTH HAZARD DATA
Causes eye irritation.
SECTION VII - PRECAUTIONS FOR SAFE HANDLING AND USE
Keep closed
SECTION VIII - CONTROL MEASURES
Gloves`,
];

export const germanNumbersFirst: readonly string[] = [
  `Sicherheitsdatenblatt gemäß Verordnung (EG) Nr. 1907/2006
Druckdatum: 05.06.2020       Versionsnummer 4        überarbeitet am: 03.02.2020
Handelsname: Schieferschutz 3
Abschnitt 1: Bezeichnung des Stoffs beziehungsweise des Gemischs und des Unternehmens
1.1 Produktidentifikator
Handelsname: Schieferschutz 3
1.3 Einzelheiten zum Lieferanten, der das Sicherheitsdatenblatt bereitstellt
Hersteller/Lieferant:
Mergel Chemie GmbH
Hafenstraße 3
D-23552 Lübeck
Abschnitt 2: Mögliche Gefahren
2.1 Einstufung des Stoffs oder Gemischs
GHS07
Skin Irrit. 2    H315    Verursacht Hautreizungen.
2.2 Kennzeichnungselemente
Signalwort Achtung
Gefahrenhinweise
H315 Verursacht Hautreizungen.
H317 Kann allergische Hautreaktionen verursachen.
Sicherheitshinweise
P280 Schutzhandschuhe tragen.
Abschnitt 3: Zusammensetzung/Angaben zu Bestandteilen
3.2 Gemische
Gefährliche Inhaltsstoffe:
CAS: 25068-38-6           Reaktionsprodukt: Bisphenol-A-Epichlorhydrinharze                  25-50%
NLP: 500-033-5            Aquatic Chronic 2, H411; Skin Irrit. 2, H315
CAS: 100-51-6             Benzylalkohol                                                      ≥2,5-<10%
EINECS: 202-859-9         Acute Tox. 4, H302
Abschnitt 4: Erste-Hilfe-Maßnahmen
Abschnitt 5: Maßnahmen zur Brandbekämpfung
Abschnitt 6: Maßnahmen bei unbeabsichtigter Freisetzung
Abschnitt 7: Handhabung und Lagerung
Abschnitt 8: Begrenzung und Überwachung der Exposition/Persönliche Schutzausrüstungen
Abschnitt 9: Physikalische und chemische Eigenschaften
Abschnitt 10: Stabilität und Reaktivität
Abschnitt 11: Toxikologische Angaben
Abschnitt 12: Umweltbezogene Angaben
Abschnitt 13: Hinweise zur Entsorgung
Abschnitt 14: Angaben zum Transport
Abschnitt 15: Rechtsvorschriften
Abschnitt 16: Sonstige Angaben`,
];

export const frenchWithoutCodes: readonly string[] = [
  `FICHE DE DONNÉES DE SÉCURITÉ
Date d'émission: 10/02/2014     Date de révision: 07/03/2019     Remplace la fiche: 10/02/2014
RUBRIQUE 1: Identification de la substance/du mélange et de la société/l'entreprise
1.1 Identificateur de produit
Nom du produit : Ardoise Primaire
1.3 Renseignements concernant le fournisseur de la fiche de données de sécurité
Société : Les Résines du Lac SARL
12 rue du Port
67000 Strasbourg
RUBRIQUE 2: Identification des dangers
2.2 Éléments d'étiquetage
Mention d'avertissement : Attention
Mentions de danger :
Provoque une irritation cutanée.
Peut provoquer une allergie cutanée.
Provoque une sévère irritation des yeux.
Conseils de prudence :
Porter des gants de protection.
RUBRIQUE 3: Composition/informations sur les composants
Nom chimique                  N° CAS           Concentration (%)
Résine époxydique             25068-38-6       25 - < 50
Alcool benzylique             100-51-6         5 - 10
RUBRIQUE 4: Premiers secours
RUBRIQUE 5: Mesures de lutte contre l'incendie
RUBRIQUE 6: Mesures à prendre en cas de dispersion accidentelle
RUBRIQUE 7: Manipulation et stockage
RUBRIQUE 8: Contrôles de l'exposition/protection individuelle
RUBRIQUE 9: Propriétés physiques et chimiques
RUBRIQUE 10: Stabilité et réactivité
RUBRIQUE 11: Informations toxicologiques
RUBRIQUE 12: Informations écologiques
RUBRIQUE 13: Considérations relatives à l'élimination
RUBRIQUE 14: Informations relatives au transport
RUBRIQUE 15: Informations relatives à la réglementation
RUBRIQUE 16: Autres informations`,
];

export const spanishMonthFirst: readonly string[] = [
  `FICHA DE DATOS DE SEGURIDAD
Versión 2.1       Fecha de revisión 10/01/2023       Fecha de impresión
                                                     04/27/2025
SECCIÓN 1. IDENTIFICACIÓN DEL PRODUCTO Y DE LA COMPAÑÍA
Nombre del Material          : LIMPIADOR DE LOSAS 9
Número del material          : LL-9
Informaciones sobre el fabricante o el proveedor
Compañía                     : Muelle Químicos S.A. de C.V.
Dirección                    : 8 Muelle Norte
                               Superior, WI 54880
SECCIÓN 2. IDENTIFICACIÓN DE LOS PELIGROS
Palabra de advertencia       : Atención
Indicaciones de peligro      : H315 Provoca irritación cutánea.
                               H319 Provoca irritación ocular grave.
Consejos de prudencia        : Prevención:
                               P264 Lavarse la piel.
SECCIÓN 3. COMPOSICIÓN/ INFORMACIÓN SOBRE LOS COMPONENTES
Nombre químico               No. CAS         Concentración [%]
Etanol                       64-17-5         >= 10 - < 20
SECCIÓN 4. PRIMEROS AUXILIOS
SECCIÓN 5. MEDIDAS CONTRA INCENDIOS
SECCIÓN 6. MEDIDAS EN CASO DE LIBERACIÓN ACCIDENTAL
SECCIÓN 7. MANIPULACIÓN Y ALMACENAMIENTO
SECCIÓN 8. CONTROLES DE EXPOSICIÓN/PROTECCIÓN PERSONAL
SECCIÓN 9. PROPIEDADES FÍSICAS Y QUÍMICAS
SECCIÓN 10. ESTABILIDAD Y REACTIVIDAD
SECCIÓN 11. INFORMACIÓN TOXICOLÓGICA
SECCIÓN 12. INFORMACIÓN ECOLÓGICA
SECCIÓN 13. CONSIDERACIONES RELATIVAS A LA ELIMINACIÓN
SECCIÓN 14. INFORMACIÓN RELATIVA AL TRANSPORTE
SECCIÓN 15. INFORMACIÓN REGLAMENTARIA
SECCIÓN 16. OTRA INFORMACIÓN`,
];

export const smallMaker: readonly string[] = [
  `Safety Data Sheet
Rampart Patch Gray Part A
Version 1 pg. 1
SECTION 1 - PRODUCT AND COMPANY IDENTIFICATION
1.1 Trade Name (as labeled): Rampart Patch Gray Part A
Synonyms: N/A
CAS No: Mixture
1.2 Product Use: Epoxy bonding adhesive
1.3 Company Name: Rampart
Company Address: 88 Rampart Way; Suite 6
Business Phone: (715) 555-0100
Date of Last Revision: July 1, 2018
Date of Current Revision: February 21, 2025
SECTION 2 - HAZARDS IDENTIFICATION
EMERGENCY OVERVIEW: This product is a white colored liquid with a characteristic odor.
Health Hazards: May cause skin and eye irritation. Contact with skin may cause allergic reaction.
Signal Word: Warning
2.1 EU Labeling and Classification:
Hazard Statements
H317: May cause an allergic skin reaction
H319: Causes serious eye irritation; H315: Causes skin irritation
SECTION 3 - COMPOSITION AND INFORMATION ON INGREDIENTS
Hazardous Ingredients     CAS #          EINECS #        % WT
Bisphenol A resin         25085-99-8     500-033-5       50-70
Titanium dioxide          13463-67-7     236-675-5       < 5%
Balance of other ingredients are non-hazardous or less than 1% in concentration
SECTION 4 - FIRST-AID MEASURES
SECTION 5 - FIREFIGHTING MEASURES
SECTION 6 - ACCIDENTAL RELEASE MEASURES
SECTION 7 - HANDLING and STORAGE
SECTION 8 - EXPOSURE CONTROLS - PERSONAL PROTECTION
SECTION 9 - PHYSICAL and CHEMICAL PROPERTIES
SECTION 10 - STABILITY and REACTIVITY
SECTION 11 - TOXICOLOGICAL INFORMATION
SECTION 12 - ECOLOGICAL INFORMATION
SECTION 13 - DISPOSAL CONSIDERATIONS
SECTION 14 - TRANSPORTATION INFORMATION
SECTION 15 - REGULATORY INFORMATION
SECTION 16 - OTHER INFORMATION`,
];

export const titlesWithoutNumbers: readonly string[] = [
  `Safety Data Sheet
SUPERIOR ICE MELT
IDENTIFICATION
Recommended use: melting ice
HAZARDS IDENTIFICATION
Signal word: Warning
Hazard statements: Causes serious eye irritation
COMPOSITION/INFORMATION ON INGREDIENTS
Calcium chloride (CAS 10043-52-4) 70-90%
Sodium chloride (CAS 7647-14-5) 1-5%
FIRST AID MEASURES
Rinse.
FIRE FIGHTING MEASURES
None.
ACCIDENTAL RELEASE MEASURES
Sweep.
HANDLING AND STORAGE
Dry.
EXPOSURE CONTROLS/PERSONAL PROTECTION
Glasses.
PHYSICAL AND CHEMICAL PROPERTIES
Solid.
Marrow Salt Works, LLC                 SUPERIOR ICE MELT               Revised: 6/15/16`,
  `STABILITY AND REACTIVITY
Stable.
TOXICOLOGICAL INFORMATION
None.
ECOLOGICAL INFORMATION
None.
DISPOSAL CONSIDERATIONS
None.
TRANSPORT INFORMATION
None.
REGULATORY INFORMATION
OSHA 29 CFR 1910.1200
OTHER INFORMATION
None.





Marrow Salt Works, LLC                 SUPERIOR ICE MELT               Revised: 6/15/16`,
];

export const nameUnderSubheading: readonly string[] = [
  `                                        Safety Data Sheet
Document Group:      10-22-7               Version Number:     8.00
Issue Date:          05/29/19                Supercedes Date:    02/01/18
SECTION 1: Identification
1.1. Product identifier
Slatebond D8 Off-White, Part B
Product Identification Numbers
11-0001-0002-3, 11-0001-0003-1
1.2. Recommended use and restrictions on use
Recommended use
Structural adhesive
1.3. Supplier's details
MANUFACTURER:        3Q Bonding
DIVISION:            Floor Division
ADDRESS:             9 Quay Center, Duluth, MN 55802
Telephone:           1-888-555-0100
1.4. Emergency telephone number
1-800-555-0150 (24 hours)
SECTION 2: Hazard identification
2.1. Hazard classification
Flammable Liquid: Category 2.
Skin Sensitizer: Category 1A.
2.2. Label elements
Signal word
Danger
Symbols
Flame | Exclamation mark |
Pictograms
Hazard Statements
Highly flammable liquid and vapor.

Causes serious eye irritation.
May cause an allergic skin reaction.

Causes damage to organs through prolonged or repeated exposure:
nervous system |
Precautionary Statements
General:
Keep out of reach of children.
Prevention:
Keep away from heat, hot surfaces, sparks, open flames and other ignition sources.
2.3. Hazards not otherwise classified
2% of the mixture consists of ingredients of unknown acute oral toxicity.
SECTION 3: Composition/information on ingredients
Ingredient                              C.A.S. No.          % by Wt
Methyl Methacrylate                     80-62-6             40 - 70 Trade Secret *
Acrylate Polymer                        Trade Secret*       10 - 30
Toluene                                 108-88-3            < 0.5
SECTION 4: First aid measures
Eye Contact: rinse.
SECTION 5: Fire-fighting measures
x
SECTION 6: Accidental release measures
x
SECTION 7: Handling and storage
x
SECTION 8: Exposure controls/personal protection
8.1. Control parameters
Ingredient            C.A.S. No.    Agency     Limit type                    Additional Comments
Methyl Methacrylate   80-62-6       ACGIH      TWA:50 ppm;STEL:100 ppm       Dermal Sensitizer
Methyl Methacrylate   80-62-6       OSHA       TWA:410 mg/m3(100 ppm)
8.2. Exposure controls
8.2.2. Personal protective equipment (PPE)
Eye/face protection
Select and use eye/face protection to prevent contact. Safety Glasses with side shields
Skin/hand protection
Select and use gloves. Gloves made from: Butyl Rubber
SECTION 9: Physical and chemical properties
x
SECTION 10: Stability and reactivity
x
SECTION 11: Toxicological information
x
SECTION 12: Ecological information
x
SECTION 13: Disposal considerations
x
SECTION 14: Transport Information
x
SECTION 15: Regulatory information
x
SECTION 16: Other information
Document Group:      10-22-7               Version Number:     8.00
Issue Date:          05/29/19                Supercedes Date:    02/01/18
DISCLAIMER: The information in this Safety Data Sheet (SDS) is believed to be correct.`,
];

export const statementsWithoutStops: readonly string[] = [
  `SAFETY DATA SHEET
Creation Date  23-Apr-2009          Revision Date  24-Dec-2021          Revision Number  5
                    1. Identification
Product Name                    Slatewash A
Cat No. :                       A11-1
CAS No                          67-64-1
Synonyms                        Dimethyl ketone
Recommended Use                 Laboratory chemicals.
Uses advised against            Food.
Details of the supplier of the safety data sheet
Company
Pier Scientific Company
One Harbor Lane
Duluth, MN 55802
Tel: (201) 555-0100
                    2. Hazard(s) identification
Classification
This chemical is considered hazardous by the 2012 OSHA Hazard Communication Standard (29 CFR 1910.1200)
Flammable liquids                                       Category 2
Serious Eye Damage/Eye Irritation                       Category 2
Specific target organ toxicity (single exposure)        Category 3
Target Organs - Central nervous system (CNS).
Label Elements
Signal Word
Danger
Hazard Statements
Highly flammable liquid and vapor
Causes serious eye irritation
May cause drowsiness or dizziness
May cause damage to organs through prolonged or repeated exposure
Precautionary Statements
Prevention
Wash face, hands and any exposed skin thoroughly after handling
Hazards not otherwise classified (HNOC)
Repeated exposure may cause skin dryness or cracking
                    3. Composition/Information on Ingredients
Component                       CAS No              Weight %
Acetone                         67-64-1             >95
                    4. First-aid measures
x
                    5. Fire-fighting measures
x
                    6. Accidental release measures
x
                    7. Handling and storage
x
                    8. Exposure controls / personal protection
x
                    9. Physical and chemical properties
x
                    10. Stability and reactivity
x
                    11. Toxicological information
x
                    12. Ecological information
x
                    13. Disposal considerations
x
                    14. Transport information
x
                    15. Regulatory information
x
                    16. Other information
Prepared By            Regulatory Affairs
Creation Date          23-Apr-2009
Revision Date          24-Dec-2021
Print Date             24-Dec-2021
Revision Summary       This document has been updated to comply with the US OSHA HazCom 2012 Standard`,
];

export const yearFirstDate: readonly string[] = [
  `Safety Data Sheet
Slateplan T 16 Part A
Revision date : 2019/01/08                                             Page: 1/14
Version: 4.0                                                           (40 11 72/US/EN)
1. Identification
Product identifier used on the label
Slateplan T 16 Part A
Recommended use of the chemical and restriction on use
Recommended use*: Product for construction chemicals
Details of the supplier of the safety data sheet
Company:
SLATE CORPORATION
40 Quay Street
Superior, WI 54880, USA
Telephone: +1 715 555-0100
Emergency telephone number
2. Hazards Identification
According to Regulation 2012 OSHA Hazard Communication Standard; 29 CFR Part 1910.1200
Classification of the product
Skin Corr./Irrit.     2              Skin corrosion/irritation
Eye Dam./Irrit.       2A             Serious eye damage/eye irritation
Label elements
Pictogram:
Signal Word:
Warning
Hazard Statement:
H319                  Causes serious eye irritation.
H315                  Causes skin irritation.
H317                  May cause an allergic skin reaction.
Precautionary Statements (Prevention):
P280                  Wear protective gloves.
3. Composition / Information on Ingredients
According to Regulation 2012 OSHA Hazard Communication Standard; 29 CFR Part 1910.1200
CAS Number            Weight %                 Chemical name
25068-38-6            >= 50.0 - < 75.0%        bisphenol-A-epichlorhydrin resin
68609-97-2            >= 10.0 - < 15.0%        oxirane, mono[(C12-14-alkyloxy)methyl] derivs.
4. First-Aid Measures
x
5. Fire-Fighting Measures
x
6. Accidental release measures
x
7. Handling and Storage
x
8. Exposure Controls/Personal Protection
No occupational exposure limits known.
Personal protective equipment
Respiratory protection:
Wear respiratory protection if ventilation is inadequate.
Hand protection:
Chemical resistant protective gloves
Eye protection:
Safety glasses with side-shields.
9. Physical and Chemical Properties
x
10. Stability and Reactivity
x
11. Toxicological information
x
12. Ecological Information
x
13. Disposal considerations
x
14. Transport Information
x
15. Regulatory Information
x
16. Other Information
SDS Prepared by:
Product Regulations
SDS Prepared on: 2019/01/08`,
];

export const numberAndTitleApart: readonly string[] = [
  `Product Name: Portland Cement                                       Revision Date: May 2015
                                                                    Page 1 of 12
Section 1       Portland Cement
                Identification
GHS product identifier:        Portland Cement
Chemical name:                 Calcium compounds, calcium silicate compounds
MANUFACTURER:
Slate Cement Corporation
Slate Plant
44 County Road 7
Section 2       Hazards Identification
Portland cement is a gray powder. A single short-term exposure is not likely to cause serious harm.
DANGER! Overexposure can cause serious, potentially irreversible skin or eye damage.
Signal word: Danger
Hazard statements: Causes severe skin burns and eye damage. May cause an allergic skin reaction.
                   May cause respiratory irritation. May cause cancer through inhalation.
Section 3       Composition/Information on Ingredients
Portland cement        65997-15-1       100
Calcium oxide          1305-78-8        0 - 3
Quartz                 14808-60-7       0-0.5
Hexavalent chromium*   18450-29-9       0.0 - 0.003
Section 4       First Aid Measures
x
Section 5       Fire-Fighting Measures
x
Section 6       Accidental Release Measures
x
Section 7       Handling and Storage
x
Section 8       Exposure Controls/Personal Protection
x
Section 9       Physical and Chemical Properties
x
Section 10      Stability and Reactivity
x
Section 11      Toxicological Information
x
Section 12      Ecological Information
x
Section 13      Disposal Considerations
x
Section 14      Transport Information
x
Section 15      Regulatory Information
x
Section 16      Other Information
x`,
];

export const tableOfStatements: readonly string[] = [
  `Slate Bentonite Chips
Slate Drilling                                        Code: 2
Version No: 4.1.1.1                                   Issue Date: 12/16/2015
Safety Data Sheet according to OSHA HazCom Standard (2012) requirements     Print Date: 08/02/2016
SECTION 1 IDENTIFICATION
Product Identifier
Product name                    Slate Bentonite Chips
Synonyms                        Not Available
Recommended use of the chemical and restrictions on use
Name, address, and telephone number of the chemical manufacturer, importer, or other responsible party
Registered company name         Slate Drilling Supply Pty Ltd
Address                         1 Main Rd Perth Australia
SECTION 2 HAZARD(S) IDENTIFICATION
Classification of the substance or mixture
Classification                  Carcinogenicity Category 1A, Specific target organ toxicity - repeated exposure Category 2
Label elements
SIGNAL WORD                     DANGER
Hazard statement(s)
H350                            May cause cancer.
H373                            May cause damage to organs through prolonged or repeated exposure.
Precautionary statement(s) Prevention
P201                            Obtain special instructions before use.
P260                            Do not breathe dust/fume.
SECTION 3 COMPOSITION / INFORMATION ON INGREDIENTS
Substances
See section below for composition of Mixtures
Mixtures
CAS No                 %[weight]              Name
1302-78-9              >60                    bentonite
14808-60-7             <10                    silica crystalline - quartz
SECTION 4 FIRST-AID MEASURES
x
SECTION 5 FIRE-FIGHTING MEASURES
x
SECTION 6 ACCIDENTAL RELEASE MEASURES
x
SECTION 7 HANDLING AND STORAGE
x
SECTION 8 EXPOSURE CONTROLS / PERSONAL PROTECTION
x
SECTION 9 PHYSICAL AND CHEMICAL PROPERTIES
x
SECTION 10 STABILITY AND REACTIVITY
x
SECTION 11 TOXICOLOGICAL INFORMATION
x
SECTION 12 ECOLOGICAL INFORMATION
x
SECTION 13 DISPOSAL CONSIDERATIONS
x
SECTION 14 TRANSPORT INFORMATION
x
SECTION 15 REGULATORY INFORMATION
x
SECTION 16 OTHER INFORMATION
x`,
];

export const sectionsSideBySide: readonly string[] = [
  `Slate Coatings, LLC                                                       SDS No. 1042
SAFETY DATA SHEET                                                         Date Revised: 3/14/2022
1 PRODUCT AND COMPANY IDENTIFICATION
Product Name:     Slate Seal WB                    Manufacturer:       Slate Coatings, LLC
Product Code:     SS-WB                            Address:            12 Pier Street
Chemical Family:  Acrylic                                              Superior, WI 54880
Product Use:      Sealer                           Emergency Phone:    800-555-0100
2 HAZARDS IDENTIFICATION
GHS Classification:                                Signal Word: WARNING
Skin Irritant Category 2                           Hazard Statements:
Eye Irritant Category 2B                           H315 Causes skin irritation
                                                   H320 Causes eye irritation
Precautionary Statements: P264 Wash hands thoroughly after handling.
3 COMPOSITION / INFORMATION ON INGREDIENTS
Ingredient                    CAS #             Wt. %          OSHA PEL         ACGIH TLV
2-Butoxyethanol               111-76-2          1-5            50 ppm           20 ppm
Ammonia                       1336-21-6         <1             50 ppm           25 ppm
4 FIRST AID MEASURES
x
5 FIRE FIGHTING MEASURES
x
6 ACCIDENTAL RELEASE MEASURES
x
7 HANDLING AND STORAGE
x
8 EXPOSURE CONTROLS / PERSONAL PROTECTION
x
9 PHYSICAL AND CHEMICAL PROPERTIES
x
10 STABILITY AND REACTIVITY
x
11 TOXICOLOGICAL INFORMATION
x
12 ECOLOGICAL INFORMATION
x
13 DISPOSAL CONSIDERATIONS
x
14 TRANSPORT INFORMATION
x
15 REGULATORY INFORMATION
x
16 OTHER INFORMATION
Prepared by: Slate Coatings`,
];
