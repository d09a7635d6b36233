import { closeSync, fsyncSync, openSync, readFileSync, writeSync } from 'node:fs';

/** A client's own list of ids, on disk before it goes on: it lives outside every process that a test kills. */
export class SyncedIds {
  private readonly file: number;
  constructor(private readonly path: string) {
    this.file = openSync(path, 'a');
  }
  add(id: string): void {
    writeSync(this.file, `${id}\n`);
    fsyncSync(this.file);
  }
  all(): string[] {
    return readFileSync(this.path, 'utf8').split('\n').filter(Boolean);
  }
  close(): void {
    closeSync(this.file);
  }
}
