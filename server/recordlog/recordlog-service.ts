import { spawn } from 'node:child_process';
import { createWriteStream } from 'node:fs';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { eq } from 'drizzle-orm';
import { organisations } from '#drizzle/schema/organisations';
import { recordlogCheckpoints, recordlogHeads } from '#drizzle/schema/recordlog';
import { type RecordCheck } from '#shared/acknowledgements';
import { type Deps } from '../deps';
import { RefusedError } from '../errors';
import { type PersonActor } from '../http/actor';
import { type Work } from '../platform/queue';
import { logSigner, signCheckpoint } from './checkpoint';
import { exportLog, type LogEntry } from './export';
import { consistencyProof, inclusionProof, merkleRoot, StreamingRoot } from './merkle';
import { readCheckpoints, readEntries, readLeafHashes } from './recordlog-store';
import { findFalseRow } from './shown-rows-check';

const entriesAtOnce = 2_000;
/** Old checkpoints in an export: the newest ones and a spread of the rest, so that a long log stays a readable file. */
const maxEarlierCheckpoints = 64;

export function recordlogService({ config, database, storage, mail, queue, clock, log }: Deps) {
  /** The log's origin and its key's name; it does not change with the address of the service. */
  const signerOf = (organisationId: string) => logSigner(`kneeboard/${organisationId}`, config.keys.logSigningKey);

  /** Signs the tree as it stands, when it has grown. Copies leave the database: into the bucket here, by mail through the queue. */
  async function makeCheckpoint(organisationId: string): Promise<void> {
    const made = await database.inOrganisation(organisationId, async (tx) => {
      const [head] = await tx.select().from(recordlogHeads).where(eq(recordlogHeads.organisationId, organisationId));
      const last = (await readCheckpoints(tx)).at(-1);
      if (!head || head.size === 0 || head.size === last?.size) return undefined;
      const tree = new StreamingRoot();
      for (const hash of await readLeafHashes(tx, head.size)) tree.append(hash);
      const root = tree.root();
      const note = signCheckpoint({ origin: `kneeboard/${organisationId}`, size: head.size, root }, signerOf(organisationId));
      const added = await tx.insert(recordlogCheckpoints).values({ organisationId, size: head.size, root, note, createdAt: clock.now() }).onConflictDoNothing().returning({ size: recordlogCheckpoints.size });
      if (added.length === 0) return undefined;
      await queue.add(tx, 'mail-checkpoint', { organisationId, size: head.size });
      return { size: head.size, note };
    });
    if (made) log.info({ organisation: organisationId, size: made.size }, 'checkpoint signed');
  }

  /** Checkpoints from the bucket: the newest and a spread of the rest. Whoever rewrites the database does not reach these. */
  async function keptOutside(organisationId: string): Promise<string[]> {
    const keys = (await storage.list(`${organisationId}/checkpoints/`)).sort();
    const step = Math.max(1, Math.ceil(keys.length / maxEarlierCheckpoints));
    return Promise.all(keys.filter((_, at) => (keys.length - 1 - at) % step === 0).map((key) => storage.getText(key)));
  }

  async function* entries(organisationId: string, size: number): AsyncGenerator<LogEntry> {
    for (let after = -1; ; ) {
      const rows = await database.inOrganisation(organisationId, (tx) => readEntries(tx, after, size - 1, entriesAtOnce));
      yield* rows;
      const last = rows.at(-1);
      if (!last) return;
      after = last.index;
    }
  }

  async function earlierNotes(organisationId: string) {
    return database.inOrganisation(organisationId, async (tx) => {
      const all = await readCheckpoints(tx);
      const newest = all.at(-1);
      if (!newest) throw new RefusedError('There is no checkpoint yet. The first is signed within a minute of the first record; try again then.');
      const before = all.slice(0, -1);
      const step = Math.max(1, Math.ceil(before.length / maxEarlierCheckpoints));
      const chosen = before.filter((_, at) => (before.length - 1 - at) % step === 0);
      const hashes = await readLeafHashes(tx, newest.size);
      return { newest, hashes, consistency: chosen.map(({ size, note }) => ({ checkpoint: note, proof: consistencyProof(hashes, size) })) };
    });
  }

  return {
    makeCheckpoint,
    /** For the worker: every organisation whose log grew. */
    async makeCheckpoints(): Promise<void> {
      for (const row of await database.atTheDoor<{ door_organisations: string }>('SELECT door_organisations()', [])) await makeCheckpoint(row.door_organisations);
    },

    /** Takes a signed checkpoint out of the database: the bucket, and the auditors' addresses. */
    async mailCheckpoint({ organisationId, size }: Work['mail-checkpoint']): Promise<void> {
      const found = await database.inOrganisation(organisationId, async (tx) => {
        const [organisation] = await tx.select().from(organisations);
        const checkpoint = (await readCheckpoints(tx)).find((each) => each.size === size);
        return organisation && checkpoint && { organisation, checkpoint };
      });
      if (!found) return;
      const { organisation, checkpoint } = found;
      // The root stands in the name: a checkpoint of a rewritten log lies beside the one it contradicts, never over it.
      await storage.putText(`${organisationId}/checkpoints/${String(size).padStart(12, '0')}-${checkpoint.root.toString('hex')}.txt`, checkpoint.note);
      await mail.send({
        to: organisation.auditorEmails,
        subject: `${organisation.name}: checkpoint of ${size} records`,
        text: [`Keep this message. Every later copy of the record log of ${organisation.name} must fit it.`, '', checkpoint.note, `Public key: ${signerOf(organisationId).key.vkey}`, ''].join('\n'),
      });
    },

    /** The whole log as JSON Lines, up to the newest checkpoint (made now when the log has grown). */
    async export(actor: PersonActor): Promise<AsyncGenerator<string>> {
      await makeCheckpoint(actor.organisationId);
      const { newest, consistency } = await earlierNotes(actor.organisationId);
      return exportLog({ form: 'whole', organisation: actor.organisationName, vkey: signerOf(actor.organisationId).key.vkey, checkpoint: newest.note, consistency, entries: entries(actor.organisationId, newest.size) });
    },

    /** One entry with its proof, for a receipt. Refused while the entry is younger than every checkpoint. */
    async exportOne(actor: PersonActor, index: number): Promise<AsyncGenerator<string>> {
      await makeCheckpoint(actor.organisationId);
      const { newest, hashes, consistency } = await earlierNotes(actor.organisationId);
      const [entry] = await database.inOrganisation(actor.organisationId, (tx) => readEntries(tx, index - 1, index, 1));
      if (!entry || index >= newest.size) throw new RefusedError('The receipt is pending: no checkpoint covers this record yet. Try again in a minute.');
      return exportLog({ form: 'extract', organisation: actor.organisationName, vkey: signerOf(actor.organisationId).key.vkey, checkpoint: newest.note, consistency, entries: [{ ...entry, proof: inclusionProof(hashes, index) }] });
    },

    /** Proof that entry `index` is under the newest checkpoint; null while pending. */
    async prove(organisationId: string, index: number) {
      return database.inOrganisation(organisationId, async (tx) => {
        const newest = (await readCheckpoints(tx)).at(-1);
        if (!newest || index >= newest.size) return null;
        const hashes = await readLeafHashes(tx, newest.size);
        const hex = (bytes: Uint8Array) => Buffer.from(bytes).toString('hex');
        return {
          proof: { index, treeSize: newest.size, leafHash: hex(hashes[index] as Buffer), root: hex(merkleRoot(hashes)), hashes: inclusionProof(hashes, index).map(hex) },
          checkpoint: { note: newest.note, createdAt: newest.createdAt.toISOString() },
        };
      });
    },

    /**
     * Runs the standalone verifier over the whole exported log, what an auditor would run, in a process of its own; holds
     * the log against the checkpoints that left the database; then holds the rows that pages show against the log.
     */
    async check(actor: PersonActor): Promise<RecordCheck> {
      const key = signerOf(actor.organisationId).key.vkey;
      // Asked for first: a checkpoint made later may cover more than the log that is read below.
      const outside = await keptOutside(actor.organisationId);
      await makeCheckpoint(actor.organisationId);
      const [head, notes] = await database.inOrganisation(actor.organisationId, async (tx) => [(await tx.select().from(recordlogHeads))[0], await readCheckpoints(tx)] as const);
      const newest = notes.at(-1);
      if (!head || !newest) {
        const trouble = outside.length > 0 ? 'The log is empty, but signed checkpoints of it were kept outside the database: it was removed.' : await findFalseRow(database, config.keys, actor.organisationId);
        return { entries: 0, root: '', checkpoint: null, isGood: trouble === null, trouble, key };
      }
      const folder = await mkdtemp(join(tmpdir(), 'kneeboard-check-'));
      try {
        const file = join(folder, 'log.jsonl');
        await pipeline(Readable.from(await this.export(actor)), createWriteStream(file));
        const earlier = outside.map((_, at) => join(folder, `checkpoint-${at}.txt`));
        for (const [at, path] of earlier.entries()) await writeFile(path, outside[at] ?? '');
        const { code, output } = await runVerifier([file, '--key', key, ...earlier.flatMap((path) => ['--earlier', path])]);
        const trouble = code === 0 ? await findFalseRow(database, config.keys, actor.organisationId) : (output.split('\n')[0] || 'The check could not be run.').replaceAll(`${folder}/`, '');
        return {
          entries: newest.size,
          root: newest.root.toString('hex'),
          checkpoint: { note: newest.note, size: newest.size, createdAt: newest.createdAt.toISOString() },
          isGood: trouble === null,
          trouble,
          key,
        };
      } finally {
        await rm(folder, { recursive: true, force: true });
      }
    },
  };

  function runVerifier(args: readonly string[]): Promise<{ code: number | null; output: string }> {
    return new Promise((resolve, reject) => {
      const child = spawn(process.execPath, [config.VERIFIER, ...args], { stdio: ['ignore', 'pipe', 'pipe'] });
      let output = '';
      child.stdout.on('data', (piece: Buffer) => (output += piece.toString()));
      child.stderr.on('data', (piece: Buffer) => (output += piece.toString()));
      child.on('error', reject);
      child.on('close', (code) => resolve({ code, output: output.trim() }));
    });
  }
}
export type RecordlogService = ReturnType<typeof recordlogService>;
