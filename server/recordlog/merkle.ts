import { createHash } from 'node:crypto';

/**
 * The Merkle tree of RFC 9162 section 2.1 over SHA-256. All hashes are 32 bytes; `leafHashes` are already hashed by
 * `leafHash`. A range `[start, end)` is a run of leaves whose own tree is one node of a proof, so that a later store
 * of nodes can answer ranges without reading leaves.
 */
export type Range = readonly [start: number, end: number];

const LEAF_PREFIX = Buffer.of(0);
const NODE_PREFIX = Buffer.of(1);
const HASH_BYTES = 32;

/** SHA-256(0x00 ‖ bytes). */
export function leafHash(bytes: Uint8Array): Buffer {
  return createHash('sha256').update(LEAF_PREFIX).update(bytes).digest();
}

/** SHA-256(0x01 ‖ left ‖ right). */
export function nodeHash(left: Uint8Array, right: Uint8Array): Buffer {
  return createHash('sha256').update(NODE_PREFIX).update(left).update(right).digest();
}

/** Root of a growing tree in O(log n) memory: one hash per set bit of the size, as in a binary counter. */
export class StreamingRoot {
  private readonly subtrees: Uint8Array[] = [];
  private leaves = 0;

  get size(): number {
    return this.leaves;
  }

  append(hash: Uint8Array): void {
    requireHash(hash);
    let node = hash;
    // Each trailing one bit of the old size is a full subtree as large as the new one: join them.
    for (let size = this.leaves; size % 2 === 1; size = Math.floor(size / 2)) {
      const left = this.subtrees.pop();
      if (left) node = nodeHash(left, node);
    }
    this.subtrees.push(node);
    this.leaves += 1;
  }

  /** The root of what was appended so far; of nothing, SHA-256 of no bytes. Appending may go on. */
  root(): Buffer {
    const joined = this.subtrees.reduceRight<Uint8Array | undefined>(
      (right, left) => (right ? nodeHash(left, right) : left),
      undefined,
    );
    return joined ? Buffer.from(joined) : createHash('sha256').digest();
  }
}

/** MTH of section 2.1.1. */
export function merkleRoot(leafHashes: readonly Uint8Array[]): Buffer {
  return rangeRoot(leafHashes, [0, leafHashes.length]);
}

/** PATH of section 2.1.3.1 as ranges, from the leaf upwards. Throws when the index is not in the tree. */
export function inclusionRanges(index: number, size: number): Range[] {
  if (!isCount(size) || !isCount(index) || index >= size) throw new RangeError(`There is no leaf ${index} in a tree of ${size}.`);
  const ranges: Range[] = [];
  let [start, end] = [0, size];
  while (end - start > 1) {
    const middle = start + largestPowerBelow(end - start);
    if (index < middle) {
      ranges.push([middle, end]);
      end = middle;
    } else {
      ranges.push([start, middle]);
      start = middle;
    }
  }
  return ranges.reverse();
}

/** PROOF of section 2.1.4.1 as ranges: from the first `first` leaves to all `size`. Throws unless 0 < first ≤ size. */
export function consistencyRanges(first: number, size: number): Range[] {
  if (!isCount(size) || !isCount(first) || first === 0 || first > size) {
    throw new RangeError(`There is no proof from a tree of ${first} to a tree of ${size}.`);
  }
  const ranges: Range[] = [];
  let [start, end] = [0, size];
  while (first !== end) {
    const middle = start + largestPowerBelow(end - start);
    if (first <= middle) {
      ranges.push([middle, end]);
      end = middle;
    } else {
      ranges.push([start, middle]);
      start = middle;
    }
  }
  // The older root itself is known to the verifier; any other subtree that ends the walk must be given.
  if (start > 0) ranges.push([start, end]);
  return ranges.reverse();
}

/** Inclusion proof for the leaf at `index`, from the leaf upwards. */
export function inclusionProof(leafHashes: readonly Uint8Array[], index: number): Buffer[] {
  return inclusionRanges(index, leafHashes.length).map((range) => rangeRoot(leafHashes, range));
}

/** Consistency proof from the tree of the first `first` leaves to the tree of all. */
export function consistencyProof(leafHashes: readonly Uint8Array[], first: number): Buffer[] {
  return consistencyRanges(first, leafHashes.length).map((range) => rangeRoot(leafHashes, range));
}

export interface Inclusion {
  leafHash: Uint8Array;
  index: number;
  size: number;
  proof: readonly Uint8Array[];
  root: Uint8Array;
}

/** Whether the proof leads from this leaf at this index to this root: section 2.1.3.2. */
export function verifyInclusion({ leafHash: leaf, index, size, proof, root }: Inclusion): boolean {
  if (!isCount(size) || !isCount(index) || index >= size) return false;
  let [fn, sn] = [index, size - 1];
  let node = leaf;
  for (const sibling of proof) {
    if (sn === 0) return false;
    if (fn % 2 === 1 || fn === sn) {
      node = nodeHash(sibling, node);
      while (fn % 2 === 0 && fn !== 0) [fn, sn] = [half(fn), half(sn)];
    } else {
      node = nodeHash(node, sibling);
    }
    [fn, sn] = [half(fn), half(sn)];
  }
  return sn === 0 && same(node, root);
}

export interface Consistency {
  first: number;
  firstRoot: Uint8Array;
  size: number;
  root: Uint8Array;
  proof: readonly Uint8Array[];
}

/** Whether the tree of `first` leaves is the beginning of the tree of `size` leaves: section 2.1.4.2. */
export function verifyConsistency({ first, firstRoot, size, root, proof }: Consistency): boolean {
  if (!isCount(first) || !isCount(size) || first === 0 || first > size) return false;
  if (first === size) return proof.length === 0 && same(firstRoot, root);
  // A first tree that is a whole power of two is itself the first node of the path.
  const path = isPowerOfTwo(first) ? [firstRoot, ...proof] : [...proof];
  const [start, ...rest] = path;
  if (!start || proof.length === 0) return false;
  let [fn, sn] = [first - 1, size - 1];
  while (fn % 2 === 1) [fn, sn] = [half(fn), half(sn)];
  let [older, newer] = [start, start];
  for (const node of rest) {
    if (sn === 0) return false;
    if (fn % 2 === 1 || fn === sn) {
      older = nodeHash(node, older);
      newer = nodeHash(node, newer);
      while (fn % 2 === 0 && fn !== 0) [fn, sn] = [half(fn), half(sn)];
    } else {
      newer = nodeHash(newer, node);
    }
    [fn, sn] = [half(fn), half(sn)];
  }
  return sn === 0 && same(older, firstRoot) && same(newer, root);
}

function rangeRoot(leafHashes: readonly Uint8Array[], [start, end]: Range): Buffer {
  const tree = new StreamingRoot();
  for (let index = start; index < end; index += 1) tree.append(leafHashes[index] ?? new Uint8Array());
  return tree.root();
}

/** The largest power of two smaller than `count`, for count ≥ 2. Multiplication, not shifts: sizes may pass 2³¹. */
function largestPowerBelow(count: number): number {
  let power = 1;
  while (power * 2 < count) power *= 2;
  return power;
}

function isPowerOfTwo(count: number): boolean {
  return largestPowerBelow(count * 2) === count;
}

const half = (count: number): number => Math.floor(count / 2);
const isCount = (count: number): boolean => Number.isSafeInteger(count) && count >= 0;
const same = (left: Uint8Array, right: Uint8Array): boolean => Buffer.compare(left, right) === 0;

function requireHash(hash: Uint8Array): void {
  if (hash.length !== HASH_BYTES) throw new RangeError(`A leaf hash has ${HASH_BYTES} bytes, this has ${hash.length}.`);
}
