import { deflateSync } from 'node:zlib';
import PDFDocument from 'pdfkit';

/** A document of its own for tests: `write` draws it. */
export async function pdfOf(write: (doc: PDFKit.PDFDocument) => void, options: PDFKit.PDFDocumentOptions = {}): Promise<Uint8Array> {
  const doc = new PDFDocument({ size: 'LETTER', ...options });
  const chunks: Buffer[] = [];
  return new Promise((resolve, reject) => {
    doc.on('data', (chunk: Buffer) => chunks.push(chunk));
    doc.on('end', () => resolve(new Uint8Array(Buffer.concat(chunks))));
    doc.on('error', reject);
    write(doc);
    doc.end();
  });
}

/** A small file whose page swells to `megabytes` of drawing commands when it is unpacked, twice deflated. */
export function decompressionBomb(megabytes: number, command = 'q Q '): Uint8Array {
  const swollen = Buffer.alloc(megabytes * 1024 * 1024, command);
  const packed = deflateSync(deflateSync(swollen, { level: 1 }));
  const objects = [
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 612 792] /Contents 4 0 R >>',
  ];
  const head = objects.map((body, index) => `${index + 1} 0 obj\n${body}\nendobj\n`).join('');
  const stream = `4 0 obj\n<< /Length ${packed.length} /Filter [/FlateDecode /FlateDecode] >>\nstream\n`;
  return new Uint8Array(Buffer.concat([Buffer.from(`%PDF-1.4\n${head}${stream}`), packed, Buffer.from('\nendstream\nendobj\ntrailer << /Root 1 0 R /Size 5 >>\n%%EOF\n')]));
}
