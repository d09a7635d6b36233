import { carriesValues, type SheetReading } from './reading';

/** One reading as a flat record with snake-case names, for JSON Lines. */
export interface SheetLine {
  file: string;
  state: string;
  pages: number;
  has_text_layer: boolean;
  language: string | null;
  product_name: string | null;
  supplier: string | null;
  revision_date: string | null;
  signal_word: 'DANGER' | 'WARNING' | 'none' | null;
  h_codes: string[];
  cas_numbers: string[];
  components: { cas: string; concentration: string | null }[];
  section_count: number | null;
}

export function sheetLine(file: string, reading: SheetReading): SheetLine {
  const signal = reading.signalWord?.value ?? null;
  return {
    file,
    state: reading.state,
    pages: reading.pages,
    has_text_layer: reading.hasTextLayer,
    language: reading.language?.value ?? null,
    product_name: reading.productName?.value ?? null,
    supplier: reading.supplier?.value ?? null,
    revision_date: reading.revisionDate?.value ?? null,
    signal_word: signal === 'danger' ? 'DANGER' : signal === 'warning' ? 'WARNING' : signal,
    // EUH codes are the Union's supplements, not statements of the common system.
    h_codes: reading.hazardCodes.map((code) => code.value).filter((code) => !code.startsWith('EUH')),
    cas_numbers: [...new Set(reading.ingredients.map(({ value }) => value.cas))],
    components: reading.ingredients.map(({ value }) => ({ cas: value.cas, concentration: value.concentration })),
    section_count: carriesValues(reading.state) ? reading.sections.length : null,
  };
}
