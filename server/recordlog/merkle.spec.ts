import { createHash } from 'node:crypto';
import { describe, expect, it } from '@jest/globals';
import fc from 'fast-check';
import {
  consistencyProof, inclusionProof, leafHash, merkleRoot, nodeHash, StreamingRoot, verifyConsistency, verifyInclusion,
} from './merkle';

const hex = (bytes: Uint8Array): string => Buffer.from(bytes).toString('hex');
const unhex = (text: string): Buffer => Buffer.from(text, 'hex');

// Source of leaves, roots and proofs: github.com/transparency-dev/merkle, testonly/constants.go (LeafInputs, NodeHashes,
// RootHashes) and testonly/reference_test.go (TestRefInclusionProof, TestRefConsistencyProof); first published with
// github.com/google/certificate-transparency for RFC 6962, whose tree RFC 9162 section 2.1 keeps.
const REFERENCE_LEAVES = ['', '00', '10', '2021', '3031', '40414243', '5051525354555657', '606162636465666768696a6b6c6d6e6f'].map(unhex);
const REFERENCE_ROOTS = [
  'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855',
  '6e340b9cffb37a989ca544e6bb780a2c78901d3fb33738768511a30617afa01d',
  'fac54203e7cc696cf0dfcb42c92a1d9dbaf70ad9e621f4bd8d98662f00e3c125',
  'aeb6bcfe274b70a14fb067a5e5578264db0fa9b51af5e0ba159158f329e06e77',
  'd37ee418976dd95753c1c73862b9398fa2a2cf9b4ff0fdfe8b30cd95209614b7',
  '4e3bbb1f7b478dcfe71fb631631519a3bca12c9aefca1612bfce4c13a86264d4',
  '76e67dadbcdf1e10e1b74ddc608abd2f98dfb16fbce75277b5232a127f2087ef',
  'ddb89be403809e325750d3d263cd78929c2942b7942a34b77e122c9594a74c8c',
  '5dc9da79a70659a9ad559cb701ded9a2ab9d823aad2f4960cfe370eff4604328',
];
const N = {
  leaf0: '6e340b9cffb37a989ca544e6bb780a2c78901d3fb33738768511a30617afa01d',
  leaf1: '96a296d224f285c67bee93c30f8a309157f0daa35dc5b87e410b78630a09cfc7',
  leaf4: 'bc1a0643b12e4d2d7c77918f44e0f4f79a838b6cf9ec5b5c283e1f4d88599e6b',
  pair0: 'fac54203e7cc696cf0dfcb42c92a1d9dbaf70ad9e621f4bd8d98662f00e3c125',
  pair1: '5f083f0a1a33ca076a95279832580db3e0ef4584bdff1f54c8a360f50de3031e',
  pair2: '0ebc5d3437fbe2db158b9f126a1d118e308181031d0a949f8dededebc558ef6a',
  pair3: 'ca854ea128ed050b41b35ffc1b87b8eb2bde461e9e3b5596ece6b9d5975a0ae0',
  four0: 'd37ee418976dd95753c1c73862b9398fa2a2cf9b4ff0fdfe8b30cd95209614b7',
  four1: '6b47aaf29ee3c2af9af889bc1fb9254dabd31177f16232dd6aab035ca39bf6e4',
};
const referenceHashes = REFERENCE_LEAVES.map((leaf) => leafHash(leaf));

describe('published vectors', () => {
  it.each(REFERENCE_ROOTS.map((root, size) => ({ size, root })))('root of the first $size reference leaves', ({ size, root }) => {
    expect(hex(merkleRoot(referenceHashes.slice(0, size)))).toBe(root);
  });

  it.each([
    { index: 0, size: 1, proof: [] },
    { index: 0, size: 2, proof: [N.leaf1] },
    { index: 1, size: 2, proof: [N.leaf0] },
    { index: 2, size: 3, proof: [N.pair0] },
    { index: 1, size: 5, proof: [N.leaf0, N.pair1, N.leaf4] },
    { index: 0, size: 8, proof: [N.leaf1, N.pair1, N.four1] },
    { index: 5, size: 8, proof: [N.leaf4, N.pair3, N.four0] },
  ])('inclusion proof of leaf $index in $size', ({ index, size, proof }) => {
    expect(inclusionProof(referenceHashes.slice(0, size), index).map(hex)).toEqual(proof);
    const given = { leafHash: referenceHashes[index] ?? Buffer.alloc(0), index, size, proof: proof.map(unhex), root: unhex(REFERENCE_ROOTS[size] ?? '') };
    expect(verifyInclusion(given)).toBe(true);
  });

  it.each([
    { first: 1, size: 1, proof: [] },
    { first: 1, size: 8, proof: [N.leaf1, N.pair1, N.four1] },
    { first: 2, size: 5, proof: [N.pair1, N.leaf4] },
    { first: 6, size: 8, proof: [N.pair2, N.pair3, N.four0] },
  ])('consistency proof from $first to $size', ({ first, size, proof }) => {
    expect(consistencyProof(referenceHashes.slice(0, size), first).map(hex)).toEqual(proof);
    const [firstRoot, root] = [unhex(REFERENCE_ROOTS[first] ?? ''), unhex(REFERENCE_ROOTS[size] ?? '')];
    expect(verifyConsistency({ first, firstRoot, size, root, proof: proof.map(unhex) })).toBe(true);
  });
});

// The definitions of RFC 9162, sections 2.1.1, 2.1.3.1 and 2.1.4.1, written down as they stand there.
const sha256 = (...parts: Uint8Array[]): Buffer => createHash('sha256').update(Buffer.concat(parts)).digest();
const splitOf = (n: number): number => 2 ** Math.ceil(Math.log2(n) - 1);
function mth(d: Buffer[]): Buffer {
  if (d.length === 0) return sha256();
  if (d.length === 1) return sha256(Buffer.of(0), d[0] ?? Buffer.alloc(0));
  const k = splitOf(d.length);
  return sha256(Buffer.of(1), mth(d.slice(0, k)), mth(d.slice(k)));
}
function path(m: number, d: Buffer[]): Buffer[] {
  if (d.length === 1) return [];
  const k = splitOf(d.length);
  return m < k ? [...path(m, d.slice(0, k)), mth(d.slice(k))] : [...path(m - k, d.slice(k)), mth(d.slice(0, k))];
}
function subproof(m: number, d: Buffer[], isWhole: boolean): Buffer[] {
  if (m === d.length) return isWhole ? [] : [mth(d)];
  const k = splitOf(d.length);
  return m <= k ? [...subproof(m, d.slice(0, k), isWhole), mth(d.slice(k))] : [...subproof(m - k, d.slice(k), false), mth(d.slice(0, k))];
}

const leaves = (minLength: number): fc.Arbitrary<Buffer[]> =>
  fc.array(fc.uint8Array({ maxLength: 9 }).map((bytes) => Buffer.from(bytes)), { minLength, maxLength: 70 });
const treeAndTwo = leaves(1).chain((d) => fc.tuple(fc.constant(d), fc.nat(d.length - 1), fc.nat(255)));
const flip = (bytes: Buffer, bit: number): Buffer => {
  const copy = Buffer.from(bytes);
  copy[bit >> 3] = (copy[bit >> 3] ?? 0) ^ (1 << (bit & 7));
  return copy;
};

describe('against the recursive definitions', () => {
  it('gives the same roots, at once and streamed', () => {
    fc.assert(fc.property(leaves(0), (d) => {
      const stream = new StreamingRoot();
      d.forEach((leaf, index) => {
        stream.append(leafHash(leaf));
        expect(hex(stream.root())).toBe(hex(mth(d.slice(0, index + 1))));
      });
      expect(stream.size).toBe(d.length);
      expect(hex(merkleRoot(d.map(leafHash)))).toBe(hex(mth(d)));
    }), { numRuns: 40 });
  });

  it('gives the same inclusion proofs, which verify, and which no longer do when anything is changed', () => {
    fc.assert(fc.property(treeAndTwo, ([d, index, bit]) => {
      const hashes = d.map(leafHash);
      const proof = inclusionProof(hashes, index);
      expect(proof.map(hex)).toEqual(path(index, d).map(hex));
      const good = { leafHash: hashes[index] ?? Buffer.alloc(0), index, size: d.length, proof, root: mth(d) };
      expect(verifyInclusion(good)).toBe(true);
      expect(verifyInclusion({ ...good, leafHash: flip(Buffer.from(good.leafHash), bit) })).toBe(false);
      expect(verifyInclusion({ ...good, root: flip(good.root, bit) })).toBe(false);
      expect(verifyInclusion({ ...good, proof: [...proof, good.root] })).toBe(false);
      expect(verifyInclusion({ ...good, index: d.length })).toBe(false);
      if (proof.length > 0) expect(verifyInclusion({ ...good, proof: proof.slice(1) })).toBe(false);
      const at = bit % Math.max(1, proof.length);
      if (proof.length > 0) expect(verifyInclusion({ ...good, proof: proof.map((p, i) => (i === at ? flip(p, bit) : p)) })).toBe(false);
    }));
  });

  it('gives the same consistency proofs, which verify, and which no longer do when anything is changed', () => {
    fc.assert(fc.property(treeAndTwo, ([d, index, bit]) => {
      const first = index + 1;
      const proof = consistencyProof(d.map(leafHash), first);
      expect(proof.map(hex)).toEqual(subproof(first, d, true).map(hex));
      const good = { first, firstRoot: mth(d.slice(0, first)), size: d.length, root: mth(d), proof };
      expect(verifyConsistency(good)).toBe(true);
      expect(verifyConsistency({ ...good, firstRoot: flip(good.firstRoot, bit) })).toBe(false);
      expect(verifyConsistency({ ...good, root: flip(good.root, bit) })).toBe(false);
      expect(verifyConsistency({ ...good, proof: [...proof, good.root] })).toBe(false);
      if (proof.length > 0) expect(verifyConsistency({ ...good, proof: proof.slice(1) })).toBe(false);
      const at = bit % Math.max(1, proof.length);
      if (proof.length > 0) expect(verifyConsistency({ ...good, proof: proof.map((p, i) => (i === at ? flip(p, bit) : p)) })).toBe(false);
    }));
  });
});

describe('edges', () => {
  it('does not take a node for a leaf', () => {
    const [left, right] = [leafHash(Buffer.of(1)), leafHash(Buffer.of(2))];
    expect(hex(leafHash(Buffer.concat([left, right])))).not.toBe(hex(nodeHash(left, right)));
  });

  it('refuses a leaf hash of the wrong length, an index outside, an empty or larger first tree', () => {
    expect(() => merkleRoot([Buffer.alloc(31)])).toThrow('32 bytes');
    expect(() => inclusionProof(referenceHashes, 8)).toThrow('no leaf 8');
    expect(() => inclusionProof(referenceHashes, -1)).toThrow('no leaf -1');
    expect(() => consistencyProof(referenceHashes, 0)).toThrow('tree of 0');
    expect(() => consistencyProof(referenceHashes, 9)).toThrow('tree of 9');
    const root = merkleRoot(referenceHashes);
    expect(verifyConsistency({ first: 0, firstRoot: merkleRoot([]), size: 8, root, proof: [] })).toBe(false);
    expect(verifyInclusion({ leafHash: root, index: 0, size: 0, proof: [], root })).toBe(false);
    expect(verifyInclusion({ leafHash: root, index: 0.5, size: 1, proof: [], root })).toBe(false);
  });
});
