import { hash, verify } from '@node-rs/argon2';
import { InputError } from '../errors';
import { commonPasswords } from './common-passwords.data';

// OWASP's second profile for argon2id: 19 MiB, two passes, one lane (Password Storage Cheat Sheet); the package's default variant is argon2id.
const settings = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password.normalize('NFKC'), settings);

let stranger: Promise<string> | undefined;
/** Takes as long for an address nobody has as for a wrong password. */
export async function verifyPassword(storedHash: string | undefined, password: string): Promise<boolean> {
  stranger ??= hashPassword('nobody has this address');
  const fits = await verify(storedHash ?? (await stranger), password.normalize('NFKC'));
  return storedHash !== undefined && fits;
}

/** Refuses what guessers try first. Length is the contract's business. */
export function refuseWeakPassword(password: string, own: { email: string; name: string }, path: string): void {
  const plain = password.normalize('NFKC').toLowerCase();
  const squeezed = plain.replace(/[^a-z0-9]/g, '');
  const personal = [own.email.split('@')[0] ?? '', ...own.name.toLowerCase().split(/\s+/)].filter((part) => part.length >= 4);
  const isCommon = commonPasswords.has(plain) || commonPasswords.has(squeezed) || new Set(plain).size < 5;
  const isPersonal = personal.some((part) => squeezed.includes(part) && squeezed.length - part.length < 6);
  if (isCommon || isPersonal) throw new InputError('Choose another password.', [{ path, message: isCommon ? 'This is one of the first that guessers try. Three or four unrelated words work well.' : 'Leave your own name and address out of it.' }]);
}
