/**
 * The sixteen sections of a safety data sheet: GHS Annex 4 (A4.3), 29 CFR 1910.1200 App. D, REACH Annex II part B, and the
 * titles older American (ANSI Z400.1) and European sheets print. Titles are compared folded, letters and digits only.
 */
export type SectionRole =
  | 'identification'
  | 'hazards'
  | 'composition'
  | 'first-aid'
  | 'fire-fighting'
  | 'release'
  | 'handling'
  | 'exposure'
  | 'properties'
  | 'stability'
  | 'toxicology'
  | 'ecology'
  | 'disposal'
  | 'transport'
  | 'regulatory'
  | 'other';

/** In the order of the numbers 1 to 16. */
export const sectionRoles: readonly SectionRole[] = [
  'identification',
  'hazards',
  'composition',
  'first-aid',
  'fire-fighting',
  'release',
  'handling',
  'exposure',
  'properties',
  'stability',
  'toxicology',
  'ecology',
  'disposal',
  'transport',
  'regulatory',
  'other',
];

/** A title begins with one of these (English, Spanish, French, German; some Italian, Portuguese, Dutch). */
export const titleStarts: Readonly<Record<SectionRole, readonly RegExp[]>> = {
  identification: [
    /^(product|chemical|substance|material|company|supplier|manufacturer)\w{0,40}(identification|information|identity|identifier)/,
    /^identification(of)?(the)?(substance|product|material|chemical|mixture|hazardous|preparation|and|company)/,
    /^identification$/,
    /^productand(company|supplier)|^companyandproduct|^generalinformation|^productdata/,
    /^identificacion(de)?(la|del|l)?(sustancia|producto|mezcla|preparado|quimic|empresa|compania)/,
    /^identificacion$|^productoyempresa|^identidaddelproducto|^datosgenerales|^(producto|sustancia)eidentificacion/,
    /^identification(de)?(la|du|l)?(substance|produit|melange|preparation|entreprise|societe)/,
    /^(stoff|bezeichnung|produkt|angabenzum)\w{0,40}(firmenbezeichnung|unternehmen|zubereitung|identifikation|produkt|gemisch)/,
    /^identifikation|^(identificazione|identificacao|identificatie)/,
  ],
  hazards: [
    /^hazards?$/,
    /^hazards?s?(identification|information|identity|summary|classification|statements?)/,
    /^(identification|identity)of(the)?hazards?|^emergencyoverview|^healthhazards?(data|identification)?$/,
    /^(identificacion|identidad)(de|del|y)?(los?)?(peligro|riesgo)|^peligros|^(clasificacion|identificacion)\w{0,14}(peligro|riesgo)/,
    /^identification(de|du|des)?s?(dangers?|risques)/,
    /^(mogliche|moegliche)gefahren|^gefahren(identifikation|bezeichnung|hinweise)?$|^gefahrenubersicht/,
    /^identificazionedeipericoli|^identificacao(de|dos)perigos|^identificatievandegevaren/,
  ],
  composition: [
    /^composition(al)?(and)?(or)?\w{0,4}(information|data|ingredient|on)/,
    /^composition$|^(hazardous)?(ingredients?|components?)(information|identity|composition)?\w{0,24}$/,
    /^(information|data)on(the)?(ingredients|components|composition)|^ingredients?composition|^chemicalcomposition/,
    /^composicion|^informacion(sobre)?(los|la)?(componentes|ingredientes|composicion)|^(ingredientes|componentes)(peligrosos)?$/,
    /^composition(et)?(information|renseignement)s?sur|^informationsurles(composants|ingredients)/,
    /^zusammensetzung|^angabenzu(den)?bestandteilen/,
    /^composizione|^composicao|^samenstelling/,
  ],
  'first-aid': [
    /^(emergency(and)?)?firstaid|^emergencyfirstaid/,
    /^(medidas|procedimientos)?(de)?primerosauxilios|^primerosauxilios/,
    /^(premierssecours|premierssoins|mesuresdepremierssecours|descriptiondespremierssecours)/,
    /^erstehilfe/,
    /^(misurediprimosoccorso|primosoccorso|medidasdeprimeirossocorros|primeirossocorros|eerstehulp)/,
  ],
  'fire-fighting': [
    /^fire(fighting|andexplosion|extinguishing|hazards?|safety)?(measures|data|hazards?|procedures|information)/,
    /^firefighting|^fireandexplosion|^measures?forfire/,
    /^(medidas)?(de)?(lucha|combate)?contra(elfuego|incendio|incendios|losincendios)|^medidas(de|para)?\w{0,24}(incendio|fuego)|^riesgosdefuego/,
    /^(mesures)?(de)?(lutte)?contrelincendie|^mesuresdeluttecontre/,
    /^massnahmenzurbrand|^brandbekampfung/,
    /^misure(di)?(lotta)?antincendio|^misuredilottacontro|^medidasdecombate|^brandbestrijding/,
  ],
  release: [
    /^(accidental|spill|environmentalrelease|release)\w{0,40}(release|measures|procedures|leak|response)/,
    /^accidentalrelease|^spill(or|and)?leak|^spills?$/,
    /^medidas(que)?\w{0,36}(vertido|derrame|liberacion|fuga)|^(derrames?|vertido)accidental|^medidasencaso/,
    /^(mesures)?(a)?(prendre)?(encas)?(de)?(dispersion|rejet|deversement)accidentel|^mesures\w{0,16}(dispersion|deversement|rejet)/,
    /^massnahmenbei(unbeabsichtigter|versehentlich)/,
    /^misureincasodi|^medidasatomaremcaso|^maatregelenbij/,
  ],
  handling: [
    /^(safe)?handling(and)?(storage|use)|^storageandhandling|^(precautionsfor)?safehandling(and)?(use|storage)/,
    /^(precauciones)?(para)?(el|la)?(manipulacion|manejo)y(el)?almacenamiento|^almacenamientoymani|^manejoyalmac/,
    /^manipulationet(stockage|entreposage)|^manutentionet/,
    /^handhabungundlagerung|^lagerungundhandhabung/,
    /^manipolazioneeimm|^manuse|^hanteringenopslag/,
  ],
  exposure: [
    /^exposure(controls?|limits|guidelines)?(and)?(or)?(personal|protection|controls?|measures)/,
    /^(exposurecontrols?|personalprotection|controlmeasures|specialprotection)/,
    /^control(es)?(de)?(la|l)?(exposicion|parametros)|^controlesdeexposicion|^proteccionpersonal/,
    /^(controle?s?)(de)?(l)?(exposition)|^protectionindividuelle|^limitationdelexposition/,
    /^(begrenzungundube|expositionsbegrenzung|begrenzungder|uberwachungderexposition)/,
    /^controllodell?esposizione|^controlo?dae?xposicao|^maatregelenterbeheersing/,
  ],
  properties: [
    /^(physical|chemical)(and|or)?(physical|chemical)?(properties|data|characteristics)/,
    /^propiedadesfisicas?|^propiedadesfisicoquim/,
    /^proprietesphysi|^proprietespysi|^caracteristiquesphysi/,
    /^(physikalische|chemische)\w{0,24}eigenschaften|^physikalischchem/,
    /^proprietafisiche|^propriedadesfisi|^fysische/,
  ],
  stability: [
    /^(chemical)?(stability|reactivity)(and)?(reactivity|stability|data|hazard)/,
    /^(reactivitydata|reactivity$|stability$)/,
    /^estabilidady?(quimica)?(reactividad)?|^reactividad/,
    /^stabiliteet(reactivite)?|^reactivite/,
    /^stabilitatund(reaktivitat)?/,
    /^stabilitaereattivita|^estabilidadeereatividade|^stabiliteitenreactiviteit/,
  ],
  toxicology: [
    /^(toxicological|toxicology|toxicity|toxicologic)(al)?(information|data|properties|and|health)?/,
    /^(informacion|datos|informaciones)(sobre)?(la)?toxicolog|^toxicologia/,
    /^(informations?|donnees|renseignements)toxicolog/,
    /^(toxikologische|angabenzurtoxiko)/,
    /^informazionitossicologiche|^informacaotoxicologica|^toxicologischeinformatie/,
  ],
  ecology: [
    /^(ecological|ecology|ecotoxicological|environmental)(information|data|and|toxicity|impact|effects)?/,
    /^(informacion|datos|informaciones)(sobre)?(la)?(ecolog|ecotox)/,
    /^(informations?|donnees|renseignements)(ecolog|ecotox)/,
    /^(umweltbezogene|angabenzurokologie|okologische)/,
    /^informazioniecologiche|^informacaoecologica|^ecologischeinformatie/,
  ],
  disposal: [
    /^(waste)?dispos(al|ition)(considerations?|information|measures|methods|instructions)?|^(considerations|information)(on|for)disposal|^wastedisposal/,
    /^(consideraciones|informacion|indicaciones|aspectos)(sobre|relativas?a|relativosa|relativa|para|de|relacionad\w{1,4})?(la|al?)?(eliminacion|disposicion|desecho)|^eliminaciondelproducto|^disposicionde/,
    /^(considerations?|informations?|donnees)(relatives?|sur|concernant)?(a|l|la|les)?(elimination|dechets)|^elimination/,
    /^(hinweisezurentsorgung|entsorgung)/,
    /^considerazionisullosmaltimento|^consideracoesrelativas|^instructiesvoorverwijdering/,
  ],
  transport: [
    /^(transport|transportation|shipping)(ation)?(information|data|considerations|requirements)?/,
    /^(informacion|datos)(relativa|relativos|sobre|para|de|relacionada)?(al?|el|con)?(el)?transporte|^transporte/,
    /^(informations?|donnees)(relatives?|sur|concernant)?(au|le)?transport/,
    /^angabenzumtransport|^transportvorschriften|^transport(angaben)?$/,
    /^informazionisultrasporto|^informacoesrelativasaotransporte|^informatiemetbetrekkingtothetvervoer/,
  ],
  regulatory: [
    /^(regulatory|regulation|regulations|otherregulatory)(information|data|status)?/,
    /^(informacion|informaciones|datos|disposiciones)?(sobre)?(la)?(reglamenta|reglament|regulator|regulad|normativa|legal)/,
    /^(informations?|donnees|renseignements)?(relativesala)?(reglement|surlareglement)/,
    /^(rechtsvorschriften|vorschriften|angabenzurechts|gesetzliche)/,
    /^informazionisullaregolamentazione|^informacaosobreregul|^regelgeving/,
  ],
  other: [
    /^(other|additional|further|miscellaneous|anyother|supplemental)(relevant)?(information|data)|^other$/,
    /^(otras?|demas|informacion)(informacion|informaciones|datos|adicional)|^otrosdatos|^otrainformacion|^informacionadicional/,
    /^(autres?)(informations?|donnees|renseignements)/,
    /^(sonstige|weitere)(angaben|informationen|hinweise)/,
    /^altreinformazioni|^outrasinformacoes|^overigeinformatie/,
  ],
};

/** Words for "section" before the number. */
export const sectionWords = /^(section|seccion|rubrique|abschnitt|sektion|sezione|secao|rubriek|apartado|kapitel|part|punkt|sect|sec)\b/;

const ordinals: Readonly<Record<string, readonly string[]>> = {
  english: ['one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve', 'thirteen', 'fourteen', 'fifteen', 'sixteen'],
  spanish: ['uno', 'dos', 'tres', 'cuatro', 'cinco', 'seis', 'siete', 'ocho', 'nueve', 'diez', 'once', 'doce', 'trece', 'catorce', 'quince', 'dieciseis'],
  french: ['un', 'deux', 'trois', 'quatre', 'cinq', 'six', 'sept', 'huit', 'neuf', 'dix', 'onze', 'douze', 'treize', 'quatorze', 'quinze', 'seize'],
  german: ['eins', 'zwei', 'drei', 'vier', 'funf', 'sechs', 'sieben', 'acht', 'neun', 'zehn', 'elf', 'zwolf', 'dreizehn', 'vierzehn', 'funfzehn', 'sechzehn'],
  roman: ['i', 'ii', 'iii', 'iv', 'v', 'vi', 'vii', 'viii', 'ix', 'x', 'xi', 'xii', 'xiii', 'xiv', 'xv', 'xvi'],
};

/** "Twelve", "XII", "doce" → 12. */
export const numberWords: ReadonlyMap<string, number> = new Map(
  Object.values(ordinals).flatMap((words) => words.map((word, index): [string, number] => [word, index + 1])),
);
