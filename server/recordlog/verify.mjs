#!/usr/bin/env node
// Checks an exported record log without the program that wrote it: this one file, Node.js 18 or newer, nothing else.
//
//   node verify.mjs FILE [--key VKEY-OR-FILE]... [--earlier FILE]...
//
// --key      the public key you were given, as text or in a file. Without it the key in the file is used, with a warning.
// --earlier  a checkpoint you kept (a printed, mailed or stored note), or an earlier export of the same log.
//
// Exit code 0: good. 1: something is wrong, and the first wrong entry is named (entries count from 0). 2: bad usage.
// Forms: RFC 9162 section 2.1 (Merkle tree), c2sp.org/signed-note and c2sp.org/tlog-checkpoint (signatures).
import * as crypto from 'node:crypto';
import { closeSync, fstatSync, openSync, readFileSync, readSync, realpathSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const KINDS = new Set([
  'checklist-version', 'briefing', 'acknowledgement', 'start-check', 'corrective-action', 'sheet-confirmed',
  'exposure-basis', 'pin', 'plan-approved', 'correction', 'key-rotation',
]);
const LEAF_HEAD = /^\{"format":"kneeboard-leaf\/1","kind":"([a-z-]+)","recordedAt":"(\d{4}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12]\d|3[01])T(?:[01]\d|2[0-3]):[0-5]\d:[0-5]\d\.\d{3}Z)","recordHash":"/;
const LEAF_TAIL = /^[0-9a-f]{64}"\}$/;
const HASH = /^[0-9a-f]{64}$/;
const VKEY = /^([^\s+]+)\+([0-9a-f]{8})\+([A-Za-z0-9+/]+={0,2})$/u;
const SALT_HEX = 32;
/** How many indexes of an extract are shown. */
const SHOWN = 20;
const MAX_LINE_BYTES = 256 * 1024 * 1024;

class Trouble extends Error {}
class BadUsage extends Error {}
const trouble = (text) => { throw new Trouble(text); };

// ---- Hashes, as 64 hex digits.

const sha256 = crypto.hash
  ? (bytes) => crypto.hash('sha256', bytes, 'hex')
  : (bytes) => crypto.createHash('sha256').update(bytes).digest('hex');

const nodeBytes = Buffer.alloc(65, 1);
function nodeHash(left, right) {
  nodeBytes.hexWrite(left, 1, 32);
  nodeBytes.hexWrite(right, 33, 32);
  return sha256(nodeBytes);
}

let leafBytes = Buffer.alloc(512);
function leafHash(leaf) {
  if (leaf.length >= leafBytes.length) leafBytes = Buffer.alloc(leaf.length * 2);
  return sha256(leafBytes.subarray(0, 1 + leafBytes.latin1Write(leaf, 1)));
}

let recordBytes = Buffer.alloc(64 * 1024);
/** SHA-256(salt ‖ record), or undefined when salt or record are not whole hex and base64. */
function recordHash(salt, record) {
  if (record.length > recordBytes.length - 32) recordBytes = Buffer.alloc(record.length * 2);
  if (salt.length !== SALT_HEX || recordBytes.hexWrite(salt, 0) !== SALT_HEX / 2) return undefined;
  const length = recordBytes.base64Write(record, SALT_HEX / 2);
  if (record.length !== Math.ceil(length / 3) * 4) return undefined;
  return sha256(recordBytes.subarray(0, SALT_HEX / 2 + length));
}

// ---- Merkle tree.

class StreamingRoot {
  size = 0;
  subtrees = [];
  append(hash) {
    let node = hash;
    for (let size = this.size; size % 2 === 1; size = (size - 1) / 2) node = nodeHash(this.subtrees.pop(), node);
    this.subtrees.push(node);
    this.size += 1;
  }
  root() {
    return this.subtrees.length === 0 ? sha256(Buffer.alloc(0)) : this.subtrees.reduceRight((right, left) => nodeHash(left, right));
  }
}

/** RFC 9162 section 2.1.3.2. */
function isIncluded(leaf, index, size, proof, root) {
  let [fn, sn, node] = [index, size - 1, leaf];
  for (const sibling of proof) {
    if (sn === 0) return false;
    if (fn % 2 === 1 || fn === sn) {
      node = nodeHash(sibling, node);
      while (fn % 2 === 0 && fn !== 0) [fn, sn] = [Math.floor(fn / 2), Math.floor(sn / 2)];
    } else node = nodeHash(node, sibling);
    [fn, sn] = [Math.floor(fn / 2), Math.floor(sn / 2)];
  }
  return index < size && sn === 0 && node === root;
}

/** RFC 9162 section 2.1.4.2. */
function isConsistent(first, firstRoot, size, root, proof) {
  if (first === 0) return proof.length === 0 && firstRoot === new StreamingRoot().root();
  if (first === size) return proof.length === 0 && firstRoot === root;
  if (first > size || proof.length === 0) return false;
  const [start, ...rest] = Number.isInteger(Math.log2(first)) ? [firstRoot, ...proof] : proof;
  let [fn, sn, older, newer] = [first - 1, size - 1, start, start];
  while (fn % 2 === 1) [fn, sn] = [Math.floor(fn / 2), Math.floor(sn / 2)];
  for (const node of rest) {
    if (sn === 0) return false;
    if (fn % 2 === 1 || fn === sn) {
      [older, newer] = [nodeHash(node, older), nodeHash(node, newer)];
      while (fn % 2 === 0 && fn !== 0) [fn, sn] = [Math.floor(fn / 2), Math.floor(sn / 2)];
    } else newer = nodeHash(newer, node);
    [fn, sn] = [Math.floor(fn / 2), Math.floor(sn / 2)];
  }
  return sn === 0 && older === firstRoot && newer === root;
}

// ---- Keys, notes, checkpoints.

/** A key from its text form, or undefined. */
function readVkey(text) {
  const [, name, id, base64] = VKEY.exec(text) ?? [];
  const typed = Buffer.from(base64 ?? '', 'base64');
  if (typed.length !== 33 || typed[0] !== 1) return undefined;
  if (sha256(Buffer.concat([Buffer.from(`${name}\n`), typed])).slice(0, 8) !== id) return undefined;
  const der = Buffer.concat([Buffer.from('302a300506032b6570032100', 'hex'), typed.subarray(1)]);
  return { name, id, vkey: text, publicKey: crypto.createPublicKey({ key: der, format: 'der', type: 'spki' }) };
}

/** Text and signatures of a note, or undefined when it is not one. */
function readNote(note) {
  const cut = typeof note === 'string' ? note.lastIndexOf('\n\n') : -1;
  if (cut < 1 || !note.endsWith('\n')) return undefined;
  const signatures = note.slice(cut + 2, -1).split('\n').map((line) => {
    const [, name, base64] = /^— ([^\s+]+) ([A-Za-z0-9+/]+={0,2})$/u.exec(line) ?? [];
    const bytes = Buffer.from(base64 ?? '', 'base64');
    return { name, id: bytes.toString('hex', 0, 4), signature: bytes.subarray(4) };
  });
  return { text: note.slice(0, cut + 1), signatures };
}

/** The keys among `keys` that signed; a signature of theirs that does not fit counts as "wrong". */
function signers({ text, signatures }, keys) {
  const found = [];
  for (const { name, id, signature } of signatures) {
    const key = keys.find((known) => known.name === name && known.id === id);
    if (key && !crypto.verify(null, Buffer.from(text), key.publicKey, signature)) return 'wrong';
    if (key) found.push(key);
  }
  return found;
}

/** Origin, size, root of a checkpoint note, signatures still to be checked. */
function readCheckpoint(note, what) {
  const parts = readNote(note);
  const [, origin, size, base64] = /^([^\s+]+)\n(0|[1-9]\d{0,15})\n([A-Za-z0-9+/]{43}=)\n$/u.exec(parts?.text ?? '') ?? [];
  if (!origin || !Number.isSafeInteger(Number(size))) trouble(`${what} is not a signed checkpoint.`);
  return { origin, size: Number(size), root: Buffer.from(base64, 'base64').toString('hex'), note: parts, what };
}

// ---- Files.

/** The lines of a file as latin1 strings, without line ends, in flat memory. */
function* linesOf(fd) {
  const chunk = Buffer.alloc(1024 * 1024);
  let rest = [];
  let restBytes = 0;
  for (let position = 0, read; (read = readSync(fd, chunk, 0, chunk.length, position)) > 0; position += read) {
    let start = 0;
    for (let end; (end = chunk.indexOf(10, start)) >= 0 && end < read; start = end + 1) {
      const line = chunk.latin1Slice(start, end);
      yield withoutReturn(rest.length > 0 ? rest.join('') + line : line);
      rest = [];
      restBytes = 0;
    }
    if (start < read) rest.push(chunk.latin1Slice(start, read));
    restBytes += read - start;
    if (restBytes > MAX_LINE_BYTES) trouble('A line is too long for a record log.');
  }
  if (rest.length > 0) yield withoutReturn(rest.join(''));
}
const withoutReturn = (line) => (line.endsWith('\r') ? line.slice(0, -1) : line);

/** The last line of a file that is not empty, as a latin1 string. */
function lastLineOf(fd) {
  let tail = Buffer.alloc(0);
  for (let position = fstatSync(fd).size; position > 0 && tail.length < MAX_LINE_BYTES;) {
    const bytes = Buffer.alloc(Math.min(position, 1024 * 1024));
    position -= bytes.length;
    readSync(fd, bytes, 0, bytes.length, position);
    tail = Buffer.concat([bytes, tail]);
    const text = tail.toString('latin1').trimEnd();
    if (text.includes('\n')) return text.slice(text.lastIndexOf('\n') + 1);
  }
  return tail.toString('latin1').trimEnd();
}

function open(path) {
  let fd;
  try {
    fd = openSync(path, 'r');
  } catch (error) {
    throw new BadUsage(`Cannot read ${path}: ${error.code ?? error.message}`);
  }
  if (!fstatSync(fd).isFile()) throw new BadUsage(`${path} is not a file.`);
  return fd;
}

/** JSON of a latin1 line whose bytes are UTF-8, or undefined. */
function readJson(line) {
  try {
    const value = JSON.parse(Buffer.from(line ?? '', 'latin1').toString());
    return typeof value === 'object' && value !== null && !Array.isArray(value) ? value : undefined;
  } catch {
    return undefined;
  }
}

function readHeader(line, what = 'This') {
  const header = readJson(line);
  if (header?.format !== 'kneeboard-log/1') trouble(`${what} is not a record log: its first line is not a kneeboard-log/1 header.`);
  const { form, origin, organisation, size, vkey } = header;
  const isWhole = form === 'whole';
  if ((!isWhole && form !== 'extract') || typeof origin !== 'string' || typeof organisation !== 'string' || !Number.isSafeInteger(size) || size < 0 || typeof vkey !== 'string') {
    trouble('The header is out of form.');
  }
  return { isWhole, origin, organisation, size, vkey };
}

/** The trailer, or undefined when the file ends without one. */
function readTrailer(fd) {
  const trailer = readJson(lastLineOf(fd));
  if (!trailer || !('checkpoint' in trailer)) return undefined;
  const { entries, checkpoint, consistency } = trailer;
  if (!Number.isSafeInteger(entries) || !Array.isArray(consistency) || !consistency.every((older) => isProof(older?.proof))) trouble('The last line is out of form.');
  return {
    entries,
    checkpoint: readCheckpoint(checkpoint, 'The checkpoint in the last line'),
    older: consistency.map((older, index) => ({
      ...readCheckpoint(older.checkpoint, `The earlier checkpoint ${index + 1} in the last line`), proof: older.proof,
    })),
  };
}

// ---- One entry.

/** Checks one entry line by itself; gives index, kind, time, leaf hash, record, proof. */
function readEntry(line, number, before) {
  let entry;
  try {
    entry = JSON.parse(line);
  } catch {
    trouble(`Line ${number} is not an entry: it is not JSON.${before ? ` It follows entry ${before.index}.` : ''}`);
  }
  const { index, leaf, leafHash: stored, salt, record, proof } = entry ?? {};
  if (!Number.isSafeInteger(index) || index < 0) trouble(`Line ${number} is not an entry: it has no index.`);
  const wrong = (text) => trouble(`Entry ${index} is wrong: ${text}`);
  const isErased = salt === null && record === null;
  if (typeof leaf !== 'string' || typeof stored !== 'string' || (!isErased && (typeof salt !== 'string' || typeof record !== 'string'))) wrong('its line is out of form.');
  if (proof !== undefined && !isProof(proof)) wrong('its proof is out of form.');

  const [head, kind, recordedAt] = LEAF_HEAD.exec(leaf) ?? [''];
  const tail = leaf.slice(head.length);
  if (!KINDS.has(kind) || !isDay(recordedAt)) wrong('its leaf is out of form.');
  if (isErased || `${recordHash(salt, record)}"}` !== tail) {
    if (!LEAF_TAIL.test(tail)) wrong('its leaf is out of form.');
    if (!isErased) wrong(`its record does not match its hash ${tail.slice(0, 16)}…`);
  }
  const hash = leafHash(leaf);
  if (hash !== stored) wrong(`its leaf does not match the stored leaf hash ${stored.slice(0, 16)}…`);
  // A line longer than its parts has a second "record", or more: another reader might see something else in it.
  const length = 52 + String(index).length + leaf.length + 16 + stored.length + (isErased ? 8 : salt.length + record.length + 4)
    + (proof === undefined ? 0 : 10 + proof.length * 67 + (proof.length === 0 ? 1 : 0));
  if (line.length !== length) wrong('its line is out of form.');
  return { index, kind, recordedAt, hash, record, isErased, proof };
}

const isProof = (proof) => Array.isArray(proof) && proof.every((hash) => HASH.test(hash));
/** Whether a time of the right shape names a day that exists. */
const isDay = (time) => time.slice(8, 10) < '29' || (!Number.isNaN(Date.parse(time)) && new Date(time).toISOString() === time);

/** What a wrong index in a whole log means: twice, moved or missing. Looks ahead in the rest of the file. */
function indexTrouble(expected, { index }, rest) {
  if (index < expected) return `Entry ${index} is wrong: its number comes a second time, after entry ${expected - 1}: an entry was inserted, repeated or moved.`;
  const place = expected === 0 ? `the log begins with entry ${index}` : `entry ${index} follows entry ${expected - 1}`;
  for (const line of rest) if (line.startsWith(`{"index":${expected},`)) return `Entry ${expected} is wrong: it is out of order, ${place}.`;
  return `Entry ${expected} is missing: ${place}.`;
}

// ---- Keys that follow one another.

class Keys {
  pairs = [];
  constructor(given) {
    /** May have signed the checkpoint: the given keys and those that followed them. */
    this.current = [...given];
    /** May have signed older checkpoints: also those the given keys followed. */
    this.all = [...given];
  }
  /** Takes in a key rotation, a note signed by the old key and the new. */
  rotate(record, index, origin) {
    const note = readNote(Buffer.from(record, 'base64').toString());
    const pair = note?.text.split('\n').slice(2, 4).map(readVkey) ?? [];
    const [oldKey, newKey] = pair;
    if (!oldKey || !newKey || note.text !== `kneeboard-key/1\n${origin}\n${oldKey.vkey}\n${newKey.vkey}\n`) trouble(`Entry ${index} is wrong: its key rotation is out of form.`);
    if (signers(note, [oldKey]).length !== 1 || signers(note, [newKey]).length !== 1) trouble(`Entry ${index} is wrong: its key rotation is not signed by both keys.`);
    this.pairs.push(pair);
    const has = (keys, wanted) => keys.some((key) => key.vkey === wanted.vkey);
    for (const [from, to] of this.pairs) for (const keys of [this.current, this.all]) if (has(keys, from) && !has(keys, to)) keys.push(to);
    for (const [from, to] of [...this.pairs].reverse()) if (has(this.all, to) && !has(this.all, from)) this.all.push(from);
  }
  vouches(checkpoint) {
    const found = signers(checkpoint.note, this.all);
    return found !== 'wrong' && found.some((key) => key.name === checkpoint.origin);
  }
}

// ---- The whole check.

/** An earlier export read beside the log: names the first entry that is no longer what it was. */
function earlierExport(path) {
  const fd = open(path);
  const lines = linesOf(fd);
  const header = readHeader(lines.next().value, path);
  const trailer = readTrailer(fd) ?? trouble(`The earlier export ${path} ends without a checkpoint.`);
  const checkpoint = { ...trailer.checkpoint, what: `The checkpoint of the earlier export ${path}` };
  const tree = new StreamingRoot();
  let changed;
  return {
    checkpoint,
    next(index, hash) {
      if (!header.isWhole || index >= checkpoint.size) return;
      const earlier = leafHash(String(readJson(lines.next().value)?.leaf));
      tree.append(earlier);
      if (changed === undefined && earlier !== hash) changed = index;
    },
    /** The changed entry, told only when the earlier export is itself what was signed. */
    changed() {
      for (let index = tree.size; changed !== undefined && index < checkpoint.size; index += 1) tree.append(leafHash(String(readJson(lines.next().value)?.leaf)));
      closeSync(fd);
      return changed !== undefined && tree.root() === checkpoint.root ? changed : undefined;
    },
  };
}

/** Reads an `--earlier` file: a checkpoint note, or an earlier export. */
function readEarlier(path) {
  const fd = open(path);
  const isExport = (linesOf(fd).next().value ?? '').startsWith('{');
  closeSync(fd);
  if (isExport) return earlierExport(path);
  const text = readFileSync(path, 'utf8').replace(/\r\n/g, '\n');
  return { checkpoint: readCheckpoint(text.endsWith('\n') ? text : `${text}\n`, `The earlier checkpoint ${path}`), next() {}, changed() {} };
}

function readKey(value) {
  const key = readVkey(value.trim());
  if (key) return key;
  let text;
  try {
    text = readFileSync(value, 'utf8');
  } catch {
    throw new BadUsage(`This is neither a verifier key nor a file: ${value}`);
  }
  const found = text.split(/\r?\n/).map((line) => readVkey(line.trim())).find(Boolean);
  if (!found) throw new BadUsage(`There is no verifier key in ${value}.`);
  return found;
}

/**
 * Checks a file. `keys` and `earlier` are as on the command line. Gives the lines to show; `isGood` tells the outcome.
 * Throws BadUsage when a file or key cannot be read.
 */
export function verifyLog(path, { keys: keyTexts = [], earlier: earlierPaths = [] } = {}) {
  const fd = open(path);
  const warnings = [];
  try {
    const given = keyTexts.map(readKey);
    return { isGood: true, lines: check(fd, given, earlierPaths.map(readEarlier), warnings), warnings };
  } catch (error) {
    if (!(error instanceof Trouble)) throw error;
    return { isGood: false, lines: error.message.split('\n'), warnings };
  } finally {
    closeSync(fd);
  }
}

function check(fd, given, earlier, warnings) {
  const lines = linesOf(fd);
  const header = readHeader(lines.next().value);
  if (given.length === 0) {
    given = [readVkey(header.vkey) ?? trouble('The key in the header is not a verifier key.')];
    warnings.push(`Warning: the key came from the file itself; compare it with the one you were given: ${header.vkey}`);
  }
  const stranger = given.find((key) => key.name !== header.origin);
  if (stranger) trouble(`The key is for ${stranger.name}, this log is ${header.origin}.`);
  const trailer = readTrailer(fd);
  const final = trailer?.checkpoint;
  if (final && (final.origin !== header.origin || final.size !== header.size)) trouble(`The header speaks of ${header.size} entries of ${header.origin}, the checkpoint of ${final.size} entries of ${final.origin}.`);

  const marks = [...(trailer?.older ?? []), ...earlier.map(({ checkpoint }) => checkpoint)];
  const state = { keys: new Keys(given), marks, entries: 0, erased: 0, firstErased: undefined, indexes: [], tree: new StreamingRoot() };
  const found = scan(lines, header, final, earlier, state);
  const troubles = [rewritten(header, earlier, state), found].filter(Boolean);
  if (troubles.length > 0) trouble(troubles.join('\n'));
  if (!trailer) trouble(`The file ends after ${state.entries} entries without its checkpoint: it was cut off.`);
  finish(header, trailer, earlier, state);
  return report(header, final, state);
}

/** Goes through the entries; gives the first trouble, or undefined. */
function scan(lines, header, final, earlier, state) {
  const { keys, marks, tree } = state;
  const rootsWanted = new Map();
  for (const mark of marks) rootsWanted.set(mark.size, [...(rootsWanted.get(mark.size) ?? []), mark]);
  const compare = () => rootsWanted.get(tree.size)?.forEach((mark) => { mark.isMet = tree.root() === mark.root; });
  let number = 1;
  let before;
  if (header.isWhole) compare();
  try {
    for (const line of lines) {
      number += 1;
      if (line.startsWith('{"entries":')) {
        for (const more of lines) if (more !== '') trouble(`There are lines after the checkpoint, from line ${number + 1} on.`);
        return undefined;
      }
      const entry = readEntry(line, number, before);
      if (header.isWhole) {
        if (entry.index !== tree.size) trouble(indexTrouble(tree.size, entry, lines));
        tree.append(entry.hash);
        for (const other of earlier) other.next(entry.index, entry.hash);
        compare();
      } else if (before && entry.index <= before.index) {
        trouble(`Entry ${entry.index} is wrong: it stands after entry ${before.index}, out of order or twice.`);
      } else if (!entry.proof || (final && !isIncluded(entry.hash, entry.index, final.size, entry.proof, final.root))) {
        trouble(`Entry ${entry.index} is wrong: its proof does not lead to the checkpoint.`);
      }
      if (before && entry.recordedAt < before.recordedAt) {
        trouble(`Entry ${entry.index} is wrong: it was recorded at ${entry.recordedAt}, before entry ${before.index} at ${before.recordedAt}: one of the two was moved or changed.`);
      }
      if (entry.kind === 'key-rotation' && !entry.isErased) keys.rotate(entry.record, entry.index, header.origin);
      if (entry.isErased) [state.erased, state.firstErased] = [state.erased + 1, state.firstErased ?? entry.index];
      if (!header.isWhole && state.entries <= SHOWN) state.indexes.push(entry.index);
      state.entries += 1;
      before = entry;
    }
  } catch (error) {
    if (error instanceof Trouble) return error.message;
    throw error;
  }
  return undefined;
}

/** The first place where the log is no longer what a signed earlier checkpoint says, or undefined. */
function rewritten(header, earlier, { keys, marks, tree }) {
  const changed = earlier.map((other) => (keys.vouches(other.checkpoint) ? other.changed() : undefined)).filter((index) => index !== undefined);
  if (changed.length > 0) return `Entry ${Math.min(...changed)} is wrong: it is not what it was in the earlier export.`;
  if (!header.isWhole) return undefined;
  const reached = marks.filter((mark) => mark.size <= tree.size && keys.vouches(mark)).sort((a, b) => a.size - b.size);
  const broken = reached.find((mark) => !mark.isMet);
  return broken && between(reached, broken);
}

/** Names the stretch in which the first wrong entry lies: after the last checkpoint that holds, before the broken one. */
function between(marks, broken) {
  const held = Math.max(0, ...marks.filter((mark) => mark.isMet && mark.size <= broken.size).map((mark) => mark.size));
  const last = broken.size - 1;
  const where = held >= last ? `Entry ${last} is wrong` : `The first wrong entry is between entry ${held} and entry ${last}`;
  const before = held > 0 ? ` All entries before entry ${held} match the checkpoint of ${held}.` : '';
  return `${where}: the root does not match the checkpoint of ${broken.size}.${before}`;
}

/** What can only be told at the end: count, root, signature, older checkpoints. */
function finish(header, trailer, earlier, { keys, marks, tree, entries }) {
  const final = trailer.checkpoint;
  const isSigned = signers(final.note, keys.current);
  const met = marks.filter((mark) => mark.isMet && keys.vouches(mark));
  if (header.isWhole && entries !== final.size) {
    const held = Math.max(0, ...met.map((mark) => mark.size));
    const first = Math.min(entries, final.size);
    const what = entries < final.size ? `Entry ${entries} is missing` : `Entry ${final.size} is wrong: the checkpoint does not cover it`;
    trouble(`${what}, or ${entries < final.size ? 'one was taken out' : 'one was put in'} between entry ${held} and entry ${first} and the rest numbered anew: the file has ${entries} entries, its checkpoint ${final.size}.`);
  }
  if (entries !== trailer.entries) trouble(`The file has ${entries} entries, its last line says ${trailer.entries}.`);
  if (header.isWhole && tree.root() !== final.root) trouble(between(met, final));
  if (isSigned === 'wrong') trouble('The signature does not fit the checkpoint: its text was changed after signing.');
  if (isSigned.length === 0) trouble(`The checkpoint is not signed by the key ${keys.current.map((key) => key.vkey).join(' or ')}.`);
  for (const mark of marks) {
    if (mark.origin !== header.origin) trouble(`${mark.what} is of another log: ${mark.origin}.`);
    if (!keys.vouches(mark)) trouble(`${mark.what} (${mark.size} entries) is not signed by a key of this log.`);
    if (mark.size > final.size) trouble(`${mark.what} covers ${mark.size} entries, this log only ${final.size}: entries are missing at the end.`);
    if (mark.proof && !isConsistent(mark.size, mark.root, final.size, final.root, mark.proof)) trouble(`${mark.what} (${mark.size} entries) is not proved to be the beginning of this log.`);
  }
  if (header.isWhole) return;
  for (const { checkpoint } of earlier) {
    const isProved = (checkpoint.size === final.size && checkpoint.root === final.root)
      || trailer.older.some((older) => older.size === checkpoint.size && older.root === checkpoint.root);
    if (!isProved) trouble(`${checkpoint.what} (${checkpoint.size} entries) cannot be checked: this extract has no proof from it. Ask for one, or for the whole log.`);
  }
}

function report(header, final, { keys, marks, entries, erased, firstErased, indexes }) {
  const names = `${indexes.slice(0, SHOWN).join(', ')}${indexes.length > SHOWN ? ', …' : ''}`;
  const [key] = signers(final.note, keys.current);
  const count = header.isWhole ? `${entries} entries` : `${entries} of ${final.size} entries (${names})`;
  const said = [`Good: ${count}, checkpoint of ${final.origin}, root ${final.root}, signed by key ${key.id}.`];
  if (marks.length > 0) said.push(`It continues ${marks.length} earlier ${marks.length === 1 ? 'checkpoint' : 'checkpoints'}.`);
  if (erased > 0) said.push(`Records erased by retention: ${erased}, the first of entry ${firstErased}. Their hashes still stand.`);
  return said;
}

// ---- Command line.

function main(args) {
  const options = { keys: [], earlier: [] };
  const files = [];
  for (let index = 0; index < args.length; index += 1) {
    const name = args[index];
    if (!name.startsWith('--')) {
      files.push(name);
      continue;
    }
    const list = { '--key': options.keys, '--earlier': options.earlier }[name];
    index += 1;
    if (!list || args[index] === undefined) throw new BadUsage(`Unknown or unfinished option: ${name}`);
    list.push(args[index]);
  }
  if (files.length !== 1) throw new BadUsage('One file is needed.');
  const { isGood, lines, warnings } = verifyLog(files[0], options);
  for (const warning of warnings) console.error(warning);
  for (const line of lines) console.log(line);
  return isGood ? 0 : 1;
}

if (process.argv[1] && realpathSync(process.argv[1]) === fileURLToPath(import.meta.url)) {
  try {
    process.exitCode = main(process.argv.slice(2));
  } catch (error) {
    if (!(error instanceof BadUsage)) throw error;
    console.error(`${error.message}\nUsage: node verify.mjs FILE [--key VKEY-OR-FILE]... [--earlier FILE]...`);
    process.exitCode = 2;
  }
}
