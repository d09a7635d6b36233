import 'fake-indexeddb/auto';
import { IDBFactory } from 'fake-indexeddb';
import { webcrypto } from 'node:crypto';
import { TextDecoder, TextEncoder } from 'node:util';
import { deserialize, serialize } from 'node:v8';

/** Gives jsdom what tablets have and it lacks; a fresh storage each time. Call in beforeEach. */
export function setUpTabletBrowser(): void {
  const missing: Record<string, unknown> = {
    indexedDB: new IDBFactory(),
    crypto: webcrypto,
    TextEncoder,
    TextDecoder,
    structuredClone: (value: unknown) => deserialize(serialize(value)) as unknown,
    ResizeObserver: class {
      observe(): void {}
      disconnect(): void {}
    },
    matchMedia: () => ({ matches: false, addEventListener: () => undefined, removeEventListener: () => undefined }),
    isSecureContext: true,
  };
  // A drawing surface that takes everything and shows nothing.
  const surface = new Proxy({}, { get: () => () => undefined, set: () => true });
  Object.defineProperty(HTMLCanvasElement.prototype, 'getContext', { value: () => surface, configurable: true });
  for (const [name, value] of Object.entries(missing)) Object.defineProperty(globalThis, name, { value, configurable: true, writable: true });
}
