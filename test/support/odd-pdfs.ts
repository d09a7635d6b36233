import { crc32, deflateSync } from 'node:zlib';
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

/** A PDF from its numbered objects, each given as its body; with a right table of offsets, so that readers need not guess. */
function pdfFrom(bodies: readonly string[], head = '%PDF-1.7\n'): Uint8Array {
  const parts = [head];
  const offsets: number[] = [];
  let at = head.length;
  for (const [index, body] of bodies.entries()) {
    const part = `${index + 1} 0 obj\n${body}\nendobj\n`;
    offsets.push(at);
    at += part.length;
    parts.push(part);
  }
  const rows = offsets.map((offset) => `${String(offset).padStart(10, '0')} 00000 n \n`).join('');
  parts.push(`xref\n0 ${bodies.length + 1}\n0000000000 65535 f \n${rows}trailer\n<< /Root 1 0 R /Size ${bodies.length + 1} >>\nstartxref\n${at}\n%%EOF\n`);
  return new Uint8Array(Buffer.from(parts.join(''), 'latin1'));
}
const stream = (content: string, more = ''): string => `<< /Length ${content.length} ${more}>>\nstream\n${content}\nendstream`;
const font = '<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica >>';

/** A document of this many pages that all draw the same line of text; small, because the line stands in it once. */
export function manyPages(count: number, words = 'Safety data sheet'): Uint8Array {
  const page = '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 612 792] /Contents 3 0 R /Resources << /Font << /F1 4 0 R >> >> >>';
  const kids = Array.from({ length: count }, (_, at) => `${at + 5} 0 R`).join(' ');
  return pdfFrom(['<< /Type /Catalog /Pages 2 0 R >>', `<< /Type /Pages /Kids [${kids}] /Count ${count} >>`, stream(`BT /F1 12 Tf 72 700 Td (${words}) Tj ET`), font, ...Array.from({ length: count }, () => page)]);
}

/** Files that lead a reader round in circles, by what goes round. */
export const circularPdfs: Readonly<Record<string, Uint8Array>> = {
  'a page tree that holds itself': pdfFrom(['<< /Type /Catalog /Pages 2 0 R >>', '<< /Type /Pages /Kids [2 0 R] /Count 1 >>']),
  'two page trees that hold each other': pdfFrom(['<< /Type /Catalog /Pages 2 0 R >>', '<< /Type /Pages /Kids [3 0 R] /Count 2 >>', '<< /Type /Pages /Parent 2 0 R /Kids [2 0 R] /Count 2 >>']),
  'a drawing that draws itself': pdfFrom([
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 612 792] /Contents 4 0 R /Resources << /XObject << /X 5 0 R >> >> >>',
    stream('/X Do'),
    stream('/X Do', '/Type /XObject /Subtype /Form /BBox [0 0 612 792] /Resources << /XObject << /X 5 0 R >> >> '),
  ]),
  'an object that is a reference to itself': pdfFrom(['<< /Type /Catalog /Pages 2 0 R >>', '2 0 R']),
  'a length that is the stream itself': pdfFrom([
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 612 792] /Contents 4 0 R >>',
    '<< /Length 4 0 R >>\nstream\nBT ET\nendstream',
  ]),
};

/** A sheet that is also a web page and an archive: one can be all three, because each is looked for elsewhere in a file. */
export function polyglot(sheet: Uint8Array): Uint8Array {
  const name = 'inside.txt';
  const content = Buffer.from('inside the archive');
  const local = Buffer.alloc(30);
  local.writeUInt32LE(0x04034b50, 0);
  local.writeUInt16LE(10, 4);
  local.writeUInt32LE(crc32(content), 14);
  local.writeUInt32LE(content.length, 18);
  local.writeUInt32LE(content.length, 22);
  local.writeUInt16LE(name.length, 26);
  const page = Buffer.from('\n%<html><script>document.title="run"</script></html>\n');
  const start = sheet.length + page.length;
  const entry = Buffer.alloc(46);
  entry.writeUInt32LE(0x02014b50, 0);
  entry.writeUInt16LE(10, 4);
  entry.writeUInt16LE(10, 6);
  entry.writeUInt32LE(crc32(content), 16);
  entry.writeUInt32LE(content.length, 20);
  entry.writeUInt32LE(content.length, 24);
  entry.writeUInt16LE(name.length, 28);
  entry.writeUInt32LE(start, 42);
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(1, 8);
  end.writeUInt16LE(1, 10);
  end.writeUInt32LE(entry.length + name.length, 12);
  end.writeUInt32LE(start + local.length + name.length + content.length, 16);
  return new Uint8Array(Buffer.concat([sheet, page, local, Buffer.from(name), content, entry, Buffer.from(name), end]));
}
