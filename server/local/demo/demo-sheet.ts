import PDFDocument from 'pdfkit';
import { STATEMENT_TEXTS } from '#compliance/hazcom/ghs-statements.data';
import { demoDate, demoWords, precautionTexts, type DemoLanguage, type DemoWords } from './demo-sheet-words.data';

/** plain: one column, labels beside values. tables: boxed header and drawn tables. running: dated header and footer, headings repeated on each page. */
export type DemoLayout = 'plain' | 'tables' | 'running';

export interface DemoSheetSpec {
  fileName: string;
  language: DemoLanguage;
  layout: DemoLayout;
  productName: string;
  productCode: string;
  use: string;
  supplier: { name: string; address: readonly string[]; phone: string; emergencyPhone: string };
  /** ISO dates. */
  revisedOn: string;
  issuedOn: string;
  supersedesOn: string | null;
  version: string;
  signalWord: 'danger' | 'warning' | 'none';
  classification: readonly string[];
  /** H-codes; the words come from the statement table. */
  hazards: readonly string[];
  precautions: readonly string[];
  ingredients: readonly { name: string; cas: string; concentration: string }[];
  limits: readonly { substance: string; kind: string; amount: string }[];
  ppe: { eyes: string; hands: string; skin: string; respiratory: string; hearing?: string };
  appearance: string;
  flashPoint: string;
  transport: string;
}

const left = 54;
const width = 504;
const valueAt = 210;

/** A complete, visibly invented safety data sheet as PDF bytes. The same spec gives the same bytes. */
export async function buildDemoSheet(spec: DemoSheetSpec, layout: DemoLayout = spec.layout): Promise<Uint8Array> {
  const made = new Date(`${spec.revisedOn}T12:00:00Z`);
  const margins = { top: layout === 'running' ? 92 : 54, bottom: 64, left, right: 54 };
  const doc = new PDFDocument({ size: 'LETTER', margins, bufferPages: true, info: { Title: `${demoWords[spec.language].title}: ${spec.productName}`, CreationDate: made, ModDate: made } });
  const chunks: Buffer[] = [];
  const done = new Promise<Uint8Array>((resolve, reject) => {
    doc.on('data', (chunk: Buffer) => chunks.push(chunk));
    doc.on('end', () => resolve(new Uint8Array(Buffer.concat(chunks))));
    doc.on('error', reject);
  });
  const sheet = new SheetWriter(doc, spec, layout);
  sheet.title();
  sheet.sections();
  sheet.edges();
  doc.end();
  return done;
}

class SheetWriter {
  private readonly words: DemoWords;
  private current = '';
  private isRepeating = false;

  constructor(
    private readonly doc: PDFKit.PDFDocument,
    private readonly spec: DemoSheetSpec,
    private readonly layout: DemoLayout,
  ) {
    this.words = demoWords[spec.language];
    // A sheet with running headings repeats the one of the section that goes on.
    doc.on('pageAdded', () => {
      if (this.layout !== 'running' || this.current === '' || this.isRepeating) return;
      this.isRepeating = true;
      this.headingLine(this.current);
      this.isRepeating = false;
    });
  }

  title(): void {
    const { doc, spec, words } = this;
    doc.font('Helvetica-Bold').fontSize(18).text(words.title, left, doc.y, { width, align: 'center' });
    doc.font('Helvetica').fontSize(8).text(words.invented, { width, align: 'center' });
    doc.moveDown(0.8);
    if (this.layout === 'tables') {
      const top = doc.y;
      doc.fontSize(9);
      doc.text(`${words.revised}: ${this.date(spec.revisedOn)}`, left, top).text(`${words.version}: ${spec.version}`, left, top + 13);
      if (spec.supersedesOn) doc.text(`${words.supersedes}: ${this.date(spec.supersedesOn)}`, 330, top);
      doc.text(`${words.issued}: ${this.date(spec.issuedOn)}`, 330, top + 13);
      doc.y = top + 32;
    }
    if (this.layout === 'plain') this.row(words.revised, this.date(spec.revisedOn));
  }

  sections(): void {
    const { spec, words } = this;
    const contents: readonly (() => void)[] = [
      () => this.identification(),
      () => this.hazards(),
      () => this.composition(),
      () => words.firstAid.forEach(([label, text]) => this.row(label, text)),
      () => words.fireFighting.forEach(([label, text]) => this.row(label, text)),
      () => this.paragraph(words.release),
      () => this.paragraph(words.handling),
      () => this.exposure(),
      () => [[words.appearance, spec.appearance] as const, [words.flashPoint, spec.flashPoint] as const].forEach(([label, text]) => this.row(label, text)),
      () => this.paragraph(words.stability),
      () => this.paragraph(words.toxicology),
      () => this.paragraph(words.ecology),
      () => this.paragraph(words.disposal),
      () => this.paragraph(spec.transport),
      () => this.paragraph(words.regulatory),
      () => this.otherInformation(),
    ];
    contents.forEach((write, index) => {
      this.heading(`${words.section} ${index + 1}: ${words.headings[index] ?? ''}`);
      write();
    });
  }

  /** Running header and footer, written last when the number of pages is known. */
  edges(): void {
    const { doc, spec, words } = this;
    const { start, count } = doc.bufferedPageRange();
    for (let page = start; page < start + count; page++) {
      doc.switchToPage(page);
      // Text below the margin would start a new page.
      doc.page.margins.bottom = 0;
      doc.font('Helvetica').fontSize(8);
      if (this.layout === 'running') {
        doc.text(`${words.productName}: ${spec.productName}`, left, 36, { lineBreak: false });
        doc.text(`${words.revised}: ${this.date(spec.revisedOn)}`, 400, 36, { lineBreak: false });
        if (spec.supersedesOn) doc.text(`${words.supersedes}: ${this.date(spec.supersedesOn)}`, 400, 48, { lineBreak: false });
        doc.text(`${words.printed}: ${this.date(spec.revisedOn.replace(/^\d{4}/, (year) => String(Number(year) + 1)))}`, left, 48, { lineBreak: false });
      }
      doc.text(words.invented, left, 744, { lineBreak: false });
      doc.text(`${words.page} ${page + 1} / ${count}`, 500, 744, { lineBreak: false });
    }
  }

  private identification(): void {
    const { spec, words } = this;
    this.row(words.productName, spec.productName);
    this.row(words.productCode, spec.productCode);
    this.row(words.use, spec.use);
    this.row(words.manufacturer, [spec.supplier.name, ...spec.supplier.address].join('\n'));
    this.row(words.telephone, spec.supplier.phone);
    this.row(words.emergency, spec.supplier.emergencyPhone);
  }

  private hazards(): void {
    const { spec, words } = this;
    this.row(words.classification, spec.classification.join('\n'));
    this.row(words.signalWord, words.signalWords[spec.signalWord]);
    // One layout prints the statements without their codes, as many sheets do.
    const isCoded = this.layout !== 'plain';
    this.row(words.hazardStatements, spec.hazards.map((code) => `${isCoded ? `${code} ` : ''}${statementOf(code, spec.language)}.`).join('\n'));
    this.row(words.precautions, spec.precautions.map((code) => `${code} ${precautionTexts[code]?.[spec.language] ?? ''}`).join('\n'));
  }

  private composition(): void {
    const { spec, words } = this;
    const cells = spec.ingredients.map(({ name, cas, concentration }) => (this.layout === 'running' ? [cas, name, concentration] : [name, cas, concentration]));
    const [heads, widths] = this.layout === 'running' ? [[words.cas, words.ingredient, words.concentration], [110, 280, 114]] : [[words.ingredient, words.cas, words.concentration], [250, 130, 124]];
    this.table(heads, cells, widths);
  }

  private exposure(): void {
    const { spec, words } = this;
    if (spec.limits.length === 0) this.paragraph(words.noLimits);
    else this.table([words.ingredient, words.limitKind, words.limit], spec.limits.map(({ substance, kind, amount }) => [substance, kind, amount]), [220, 140, 144]);
    this.row(words.engineering, words.engineeringText);
    this.row(words.ppe.eyes, spec.ppe.eyes);
    this.row(words.ppe.hands, spec.ppe.hands);
    this.row(words.ppe.skin, spec.ppe.skin);
    this.row(words.ppe.respiratory, spec.ppe.respiratory);
    if (spec.ppe.hearing) this.row(words.ppe.hearing, spec.ppe.hearing);
  }

  private otherInformation(): void {
    const { spec, words } = this;
    this.row(words.revised, this.date(spec.revisedOn));
    this.row(words.issued, this.date(spec.issuedOn));
    if (spec.supersedesOn) this.row(words.supersedes, this.date(spec.supersedesOn));
    this.paragraph(words.invented);
  }

  private heading(text: string): void {
    if (this.doc.y > 640) {
      this.current = '';
      this.doc.addPage();
    }
    this.current = text;
    this.doc.moveDown(0.5);
    this.headingLine(text);
  }

  private headingLine(text: string): void {
    this.doc.font('Helvetica-Bold').fontSize(12).text(text, left, this.doc.y, { width });
    this.doc.font('Helvetica').fontSize(10).moveDown(0.3);
  }

  private paragraph(text: string): void {
    this.doc.font('Helvetica').fontSize(10).text(text, left, this.doc.y, { width }).moveDown(0.4);
  }

  /** A label with its value beside it; the value wraps in its own column. */
  private row(label: string, value: string): void {
    const { doc } = this;
    doc.font('Helvetica').fontSize(10);
    const height = doc.heightOfString(value, { width: left + width - valueAt });
    if (doc.y + height > doc.page.height - doc.page.margins.bottom) doc.addPage();
    const top = doc.y;
    doc.font('Helvetica-Bold').text(this.layout === 'tables' ? label : `${label}:`, left, top, { width: valueAt - left - 10 });
    const labelEnd = doc.y;
    doc.font('Helvetica').text(value, valueAt, top, { width: left + width - valueAt });
    doc.y = Math.max(labelEnd, doc.y) + 4;
  }

  private table(heads: readonly string[], rows: readonly (readonly string[])[], widths: readonly number[]): void {
    const { doc } = this;
    [heads, ...rows].forEach((cells, index) => {
      doc.font(index === 0 ? 'Helvetica-Bold' : 'Helvetica').fontSize(9);
      const height = Math.max(...cells.map((cell, at) => doc.heightOfString(cell, { width: (widths[at] ?? 100) - 10 }))) + 6;
      if (doc.y + height > doc.page.height - doc.page.margins.bottom) doc.addPage();
      const top = doc.y;
      cells.forEach((cell, at) => {
        const x = left + widths.slice(0, at).reduce((sum, next) => sum + next, 0);
        if (this.layout === 'tables') doc.rect(x, top - 2, widths[at] ?? 100, height).lineWidth(0.5).stroke('#888888');
        doc.fillColor('black').text(cell, x + 4, top + 1, { width: (widths[at] ?? 100) - 10 });
      });
      doc.y = top + height;
    });
    doc.moveDown(0.5);
  }

  private date(iso: string): string {
    return demoDate(iso, this.spec.language);
  }
}

function statementOf(code: string, language: DemoLanguage): string {
  return STATEMENT_TEXTS.find((statement) => statement.code === code)?.text[language] ?? code;
}
