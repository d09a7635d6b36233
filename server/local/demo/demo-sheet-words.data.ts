/** The fixed words of the demonstration's sheets, written for this project. Precautions: UN GHS Annex 3, shortened; Spanish from memory. */
export type DemoLanguage = 'en' | 'es';

export interface DemoWords {
  title: string;
  invented: string;
  section: string;
  headings: readonly string[];
  revised: string;
  issued: string;
  supersedes: string;
  printed: string;
  version: string;
  page: string;
  productName: string;
  productCode: string;
  use: string;
  manufacturer: string;
  telephone: string;
  emergency: string;
  classification: string;
  signalWord: string;
  signalWords: Record<'danger' | 'warning' | 'none', string>;
  hazardStatements: string;
  precautions: string;
  ingredient: string;
  cas: string;
  concentration: string;
  limitKind: string;
  limit: string;
  noLimits: string;
  engineering: string;
  engineeringText: string;
  ppe: Record<'eyes' | 'hands' | 'skin' | 'respiratory' | 'hearing', string>;
  appearance: string;
  flashPoint: string;
  firstAid: readonly (readonly [string, string])[];
  fireFighting: readonly (readonly [string, string])[];
  release: string;
  handling: string;
  stability: string;
  toxicology: string;
  ecology: string;
  disposal: string;
  regulatory: string;
}

export const demoWords: Record<DemoLanguage, DemoWords> = {
  en: {
    title: 'SAFETY DATA SHEET',
    invented: 'Invented for demonstration. Not a real product; do not use for work.',
    section: 'SECTION',
    headings: [
      'Identification',
      'Hazard(s) identification',
      'Composition/information on ingredients',
      'First-aid measures',
      'Fire-fighting measures',
      'Accidental release measures',
      'Handling and storage',
      'Exposure controls/personal protection',
      'Physical and chemical properties',
      'Stability and reactivity',
      'Toxicological information',
      'Ecological information',
      'Disposal considerations',
      'Transport information',
      'Regulatory information',
      'Other information',
    ],
    revised: 'Revision date',
    issued: 'Date of first issue',
    supersedes: 'Supersedes',
    printed: 'Print date',
    version: 'Version',
    page: 'Page',
    productName: 'Product name',
    productCode: 'Product code',
    use: 'Recommended use',
    manufacturer: 'Manufacturer',
    telephone: 'Telephone',
    emergency: 'Emergency telephone',
    classification: 'Classification',
    signalWord: 'Signal word',
    signalWords: { danger: 'Danger', warning: 'Warning', none: 'None' },
    hazardStatements: 'Hazard statements',
    precautions: 'Precautionary statements',
    ingredient: 'Chemical name',
    cas: 'CAS number',
    concentration: 'Weight %',
    limitKind: 'Kind',
    limit: 'Limit',
    noLimits: 'No limits are set for the ingredients of this part.',
    engineering: 'Engineering controls',
    engineeringText: 'Exhaust at the mixer and cross-ventilation of the room before anything else.',
    ppe: { eyes: 'Eye protection', hands: 'Hand protection', skin: 'Skin protection', respiratory: 'Respiratory protection', hearing: 'Hearing protection' },
    appearance: 'Appearance',
    flashPoint: 'Flash point',
    firstAid: [
      ['Inhalation', 'Bring the person into fresh air and let them rest. Call a doctor if breathing is hard.'],
      ['Skin contact', 'Take off soiled clothing and wash with soap and plenty of water.'],
      ['Eye contact', 'Rinse with water for at least 15 minutes, lifting the lids. Take out contact lenses. See a doctor.'],
      ['Ingestion', 'Rinse the mouth. Do not make the person vomit. Call a doctor.'],
    ],
    fireFighting: [
      ['Suitable media', 'Water spray, foam, dry chemical or carbon dioxide.'],
      ['Special hazards', 'Smoke may hold carbon monoxide and other toxic gases. Wear self-contained breathing apparatus.'],
    ],
    release: 'Keep people away and ventilate. Wear the protection of section 8. Take up with sand, sweep without raising dust, and keep it out of drains.',
    handling: 'Open and mix only with the exhaust running. Do not eat, drink or smoke in the mixing area. Keep containers closed, dry and between 10 and 30 °C.',
    stability: 'Stable when kept dry and closed. Keep away from water, acids, alcohols and amines before mixing.',
    toxicology: 'The signs of overexposure are those named in section 2. No data were measured on the mixture itself.',
    ecology: 'No data were measured on the mixture. Keep it out of soil, drains and water.',
    disposal: 'Let mixed material harden and dispose of it as local rules demand. Do not pour liquids into drains.',
    regulatory: 'Hazardous under 29 CFR 1910.1200. All ingredients are on the TSCA inventory or exempt from it.',
  },
  es: {
    title: 'HOJA DE DATOS DE SEGURIDAD',
    invented: 'Inventada para demostración (invented for demonstration). No es un producto real; no usar para el trabajo.',
    section: 'SECCIÓN',
    headings: [
      'Identificación del producto',
      'Identificación de los peligros',
      'Composición/información sobre los componentes',
      'Primeros auxilios',
      'Medidas contra incendios',
      'Medidas en caso de vertido accidental',
      'Manejo y almacenamiento',
      'Controles de exposición/protección personal',
      'Propiedades físicas y químicas',
      'Estabilidad y reactividad',
      'Información toxicológica',
      'Información ecológica',
      'Consideraciones sobre la eliminación',
      'Información relativa al transporte',
      'Información reglamentaria',
      'Otras informaciones',
    ],
    revised: 'Fecha de revisión',
    issued: 'Fecha de primera emisión',
    supersedes: 'Sustituye a la versión del',
    printed: 'Fecha de impresión',
    version: 'Versión',
    page: 'Página',
    productName: 'Nombre del producto',
    productCode: 'Código del producto',
    use: 'Uso recomendado',
    manufacturer: 'Fabricante',
    telephone: 'Teléfono',
    emergency: 'Teléfono de emergencia',
    classification: 'Clasificación',
    signalWord: 'Palabra de advertencia',
    signalWords: { danger: 'Peligro', warning: 'Atención', none: 'Ninguna' },
    hazardStatements: 'Indicaciones de peligro',
    precautions: 'Consejos de prudencia',
    ingredient: 'Nombre químico',
    cas: 'Número CAS',
    concentration: '% en peso',
    limitKind: 'Clase',
    limit: 'Límite',
    noLimits: 'No hay límites fijados para los componentes de esta parte.',
    engineering: 'Controles de ingeniería',
    engineeringText: 'Primero extracción en la mezcladora y ventilación cruzada del local.',
    ppe: { eyes: 'Protección de los ojos', hands: 'Protección de las manos', skin: 'Protección de la piel', respiratory: 'Protección respiratoria', hearing: 'Protección auditiva' },
    appearance: 'Aspecto',
    flashPoint: 'Punto de inflamación',
    firstAid: [
      ['Inhalación', 'Llevar a la persona al aire fresco y dejarla descansar. Llamar a un médico si respira con dificultad.'],
      ['Contacto con la piel', 'Quitar la ropa sucia y lavar con jabón y mucha agua.'],
      ['Contacto con los ojos', 'Enjuagar con agua al menos 15 minutos, levantando los párpados. Quitar los lentes de contacto. Ver a un médico.'],
      ['Ingestión', 'Enjuagar la boca. No provocar el vómito. Llamar a un médico.'],
    ],
    fireFighting: [
      ['Medios adecuados', 'Agua pulverizada, espuma, polvo químico seco o dióxido de carbono.'],
      ['Peligros especiales', 'El humo puede contener monóxido de carbono y otros gases tóxicos. Usar aparato de respiración autónomo.'],
    ],
    release: 'Alejar a la gente y ventilar. Usar la protección de la sección 8. Recoger con arena, barrer sin levantar polvo y evitar los desagües.',
    handling: 'Abrir y mezclar solo con la extracción en marcha. No comer, beber ni fumar en la zona de mezcla. Mantener los envases cerrados, secos y entre 10 y 30 °C.',
    stability: 'Estable si se mantiene seco y cerrado. Mantener lejos del agua, ácidos, alcoholes y aminas antes de mezclar.',
    toxicology: 'Los signos de sobreexposición son los nombrados en la sección 2. No se midieron datos de la mezcla.',
    ecology: 'No se midieron datos de la mezcla. Evitar el suelo, los desagües y el agua.',
    disposal: 'Dejar endurecer el material mezclado y eliminarlo según las reglas locales. No verter líquidos en desagües.',
    regulatory: 'Peligroso según 29 CFR 1910.1200. Todos los componentes están en el inventario TSCA o exentos.',
  },
};

const englishMonths = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'];

/** "03/18/2024" would be read two ways across the border; English prints the month's name, Spanish the day first. */
export function demoDate(iso: string, language: DemoLanguage): string {
  const [year = '', month = '', day = ''] = iso.split('-');
  return language === 'en' ? `${englishMonths[Number(month) - 1] ?? month} ${Number(day)}, ${year}` : `${day}/${month}/${year}`;
}

export const precautionTexts: Record<string, Record<DemoLanguage, string>> = {
  P201: { en: 'Obtain special instructions before use.', es: 'Procurarse las instrucciones antes del uso.' },
  P202: { en: 'Do not handle until all safety precautions have been read and understood.', es: 'No manipular antes de haber leído y comprendido todas las precauciones de seguridad.' },
  P210: { en: 'Keep away from heat, hot surfaces, sparks, open flames and other ignition sources. No smoking.', es: 'Mantener alejado del calor, superficies calientes, chispas y llamas. No fumar.' },
  P233: { en: 'Keep container tightly closed.', es: 'Mantener el recipiente herméticamente cerrado.' },
  P240: { en: 'Ground and bond container and receiving equipment.', es: 'Conectar a tierra el recipiente y el equipo receptor.' },
  P260: { en: 'Do not breathe dust, mist or vapors.', es: 'No respirar polvo, niebla ni vapores.' },
  P261: { en: 'Avoid breathing mist or vapors.', es: 'Evitar respirar nieblas o vapores.' },
  P264: { en: 'Wash hands thoroughly after handling.', es: 'Lavarse las manos cuidadosamente después de la manipulación.' },
  P270: { en: 'Do not eat, drink or smoke when using this product.', es: 'No comer, beber ni fumar durante su utilización.' },
  P271: { en: 'Use only outdoors or in a well-ventilated area.', es: 'Utilizar solo al aire libre o en un lugar bien ventilado.' },
  P272: { en: 'Contaminated work clothing should not be allowed out of the workplace.', es: 'La ropa de trabajo contaminada no debe salir del lugar de trabajo.' },
  P273: { en: 'Avoid release to the environment.', es: 'No dispersar en el medio ambiente.' },
  P280: { en: 'Wear protective gloves, protective clothing and eye protection.', es: 'Usar guantes, ropa de protección y protección para los ojos.' },
  P284: { en: 'Wear respiratory protection.', es: 'Usar equipo de protección respiratoria.' },
  'P301+P330+P331': { en: 'IF SWALLOWED: Rinse mouth. Do NOT induce vomiting.', es: 'EN CASO DE INGESTIÓN: Enjuagar la boca. NO provocar el vómito.' },
  'P302+P352': { en: 'IF ON SKIN: Wash with plenty of water and soap.', es: 'EN CASO DE CONTACTO CON LA PIEL: Lavar con abundante agua y jabón.' },
  'P303+P361+P353': { en: 'IF ON SKIN (or hair): Take off immediately all contaminated clothing. Rinse skin with water.', es: 'EN CASO DE CONTACTO CON LA PIEL (o el pelo): Quitar inmediatamente toda la ropa contaminada. Enjuagar la piel con agua.' },
  'P304+P340': { en: 'IF INHALED: Remove person to fresh air and keep comfortable for breathing.', es: 'EN CASO DE INHALACIÓN: Transportar a la persona al aire libre y mantenerla en una posición que le facilite la respiración.' },
  'P305+P351+P338': { en: 'IF IN EYES: Rinse cautiously with water for several minutes. Remove contact lenses, if present and easy to do. Continue rinsing.', es: 'EN CASO DE CONTACTO CON LOS OJOS: Enjuagar con agua cuidadosamente durante varios minutos. Quitar los lentes de contacto si se puede. Seguir enjuagando.' },
  'P308+P313': { en: 'IF exposed or concerned: Get medical advice.', es: 'EN CASO DE exposición demostrada o supuesta: Consultar a un médico.' },
  'P333+P313': { en: 'If skin irritation or rash occurs: Get medical advice.', es: 'En caso de irritación o erupción cutánea: Consultar a un médico.' },
  'P342+P311': { en: 'If experiencing respiratory symptoms: Call a doctor.', es: 'En caso de síntomas respiratorios: Llamar a un médico.' },
  P391: { en: 'Collect spillage.', es: 'Recoger los vertidos.' },
  P405: { en: 'Store locked up.', es: 'Guardar bajo llave.' },
  P501: { en: 'Dispose of contents and container as local rules demand.', es: 'Eliminar el contenido y el recipiente según las reglas locales.' },
};
