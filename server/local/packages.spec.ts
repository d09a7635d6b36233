import { describe, expect, it } from '@jest/globals';
import { isInstalled } from './packages.mjs';

// npm's lock file format, "packages": docs.npmjs.com/cli/v10/configuring-npm/package-lock-json; the record in
// node_modules/.package-lock.json has the same form ("Hidden Lockfiles" there).
const wanted = { '': { version: '0.1.0' }, 'node_modules/pg': { version: '8.23.1' }, 'node_modules/esbuild-aix': { version: '0.28.2', optional: true } };

describe('isInstalled', () => {
  it.each([
    ['everything is there', { 'node_modules/pg': { version: '8.23.1' } }, true],
    ['an optional one is there too', { 'node_modules/pg': { version: '8.23.1' }, 'node_modules/esbuild-aix': { version: '0.28.2' } }, true],
    ['more than wanted is there', { 'node_modules/pg': { version: '8.23.1' }, 'node_modules/left-over': { version: '1.0.0' } }, true],
    ['one is missing', {}, false],
    ['one has another version', { 'node_modules/pg': { version: '8.22.0' } }, false],
    ['an optional one has another version', { 'node_modules/pg': { version: '8.23.1' }, 'node_modules/esbuild-aix': { version: '0.28.1' } }, false],
  ])('when %s', (_situation, present, answer) => expect(isInstalled(wanted, present)).toBe(answer));
});
