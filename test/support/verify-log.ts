import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { projectRoot } from './processes';

/** Runs the standalone verifier over an export, as an auditor would: a process of its own, with nothing of ours loaded. */
export async function verifyExport(bytes: Uint8Array, ...options: readonly string[]): Promise<{ code: number | null; output: string }> {
  const folder = mkdtempSync(join(tmpdir(), 'kneeboard-verify-'));
  const file = join(folder, 'log.jsonl');
  writeFileSync(file, bytes);
  try {
    return await new Promise((resolve) => {
      const child = spawn(process.execPath, [join(projectRoot, 'server/recordlog/verify.mjs'), file, ...options], { cwd: folder, env: {}, stdio: ['ignore', 'pipe', 'pipe'] });
      let output = '';
      child.stdout.on('data', (piece: Buffer) => (output += piece.toString()));
      child.stderr.on('data', (piece: Buffer) => (output += piece.toString()));
      child.on('close', (code) => resolve({ code, output: output.trim() }));
    });
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

export interface ExportedEntry {
  readonly index: number;
  readonly leaf: string;
  readonly record: Readonly<Record<string, unknown>> | null;
}
/** The entries of an export, records opened. */
export const entriesOf = (bytes: Uint8Array): ExportedEntry[] =>
  Buffer.from(bytes)
    .toString()
    .split('\n')
    .filter((line) => line.startsWith('{"index"'))
    .map((line) => {
      const { index, leaf, record } = JSON.parse(line) as { index: number; leaf: string; record: string | null };
      return { index, leaf, record: record === null ? null : (JSON.parse(Buffer.from(record, 'base64').toString()) as Record<string, unknown>) };
    });
