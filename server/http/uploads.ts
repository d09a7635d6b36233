import { mkdirSync } from 'node:fs';
import { types } from 'node:util';
import multer from 'multer';
import { InputError, KneeboardError, UnavailableError } from '../errors';
import { type Uploads } from './mount';

export const maxUploadBytes = 25 * 1024 * 1024;
/** A zip of many sheets. */
export const maxZipBytes = 500 * 1024 * 1024;

/** One file into the upload folder, under a name of our own. */
export function createUploads(folder: string, maxBytes = maxUploadBytes): Uploads {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const receive = multer({ dest: folder, limits: { fileSize: maxBytes, files: 1, fields: 5, fieldSize: 1000, parts: 10 }, defParamCharset: 'utf8' }).single('file');
  return {
    receive: (request, response) =>
      new Promise((resolve, reject) =>
        receive(request, response, (error: unknown) => {
          if (error) return reject(named(error, maxBytes));
          const file = request.file;
          if (!file) return reject(new InputError('No file came with this.', [{ path: 'file', message: 'Choose a file.' }]));
          resolve({ path: file.path, byteLength: file.size, fileName: cleanFileName(file.originalname) });
        }),
      ),
  };
}

function named(error: unknown, maxBytes: number): unknown {
  // multer removes what it wrote of it.
  if (types.isNativeError(error) && 'code' in error && /^(?:ENOSPC|EDQUOT|EFBIG)$/.test(String(error.code))) return new UnavailableError('There is no room left for files. Nothing was stored; tell whoever runs this service, then send the file again.');
  if (!(error instanceof multer.MulterError)) return error instanceof Error && /Multipart|boundary|Unexpected end|Request (?:aborted|closed)/i.test(error.message) ? new InputError('The upload broke off. Nothing was stored; send the file again.') : error;
  if (error.code === 'LIMIT_FILE_SIZE') return new KneeboardError(413, 'Too large', `This file is over ${maxBytes / 1024 / 1024} MB. Ask the supplier for a smaller one, or save it without pictures.`);
  return new InputError('Send one file, in the field named file.', [{ path: 'file', message: error.message }]);
}

/** A name for showing: no path, no control characters, no text-direction tricks. */
export function cleanFileName(name: string): string {
  const plain = (name.split(/[\\/]/).at(-1) ?? '').replace(/[\p{Cc}\u202a-\u202e\u2066-\u2069]/gu, '').trim();
  return plain.slice(0, 200) || 'sheet.pdf';
}
