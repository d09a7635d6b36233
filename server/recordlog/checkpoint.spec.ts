import { createPrivateKey, generateKeyPairSync } from 'node:crypto';
import { describe, expect, it } from '@jest/globals';
import {
  checkpointText, logSigner, openCheckpoint, openNote, parseCheckpointText, parseNote, parseVkey, signCheckpoint, signNote, verifierKey,
} from './checkpoint';

// Source: golang.org/x/mod, sumdb/note/note_test.go (keys, text and both signatures). Ed25519 is deterministic, so
// signing the text again must give the published line.
const GO = {
  seed: 'AYEKFALVFGyNhPJEMzD1QIDr+Y7hfZx09iUvxdXHKDFz',
  vkey: 'PeterNeumann+c74f20a3+ARpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TW',
  otherVkey: 'EnochRoot+af0cfe78+ATtqJ7zOtqQtYqOo0CpvDXNlMhV3HeJDpjrASKGLWdop',
  text: "If you think cryptography is the answer to your problem,\nthen you don't know what your problem is.\n",
  line: '— PeterNeumann x08go/ZJkuBS9UG/SffcvIAQxVBtiFupLLr8pAcElZInNIuGUgYN1FFYC2pZSNXgKvqfqdngotpRZb6KE6RyyBwJnAM=\n',
  otherLine: '— EnochRoot rwz+eBzmZa0SO3NbfRGzPCpDckykFXSdeX+MNtCOXm2/5n2tiOHp+vAF1aGrQ5ovTG01oOTGwnWLox33WWd1RvMc+QQ=\n',
};
// Source: c2sp.org/signed-note, the example with its verifier key.
const C2SP = {
  vkey: 'example.com/foo+530d903a+AekyeRrm56hApGFkyQR4ZCbV54Id2LKaANYcrnKv3U2k',
  note: 'This is an example message.\n\n— example.com/foo Uw2QOkn8srV1yJGh2VYRlL1Tnagv1YEq6TfXppzi2ONncAlTgK7Ztg1ERYNZXsYjOBH3mFXmRKuwHjG1Yu72IneyaQM=\n',
};
// Source: c2sp.org/tlog-checkpoint, the example (its key is not published).
const C2SP_CHECKPOINT = 'example.com/behind-the-sofa\n20852163\nCsUYapGGPo4dkMgIAUqom/Xajj7h2fB2MPA3j2jxq2I=\n\n'
  + '— example.com/behind-the-sofa Az3grlgtzPICa5OS8npVmf1Myq/5IZniMp+ZJurmRDeOoRDe4URYN7u5/Zhcyv2q1gGzGku9nTo+zyWE+xeMcTOAYQ8=\n';
// Source: the Go checksum database, a signed tree of its /lookup answers; its key stands in the Go tree,
// src/cmd/go/internal/modfetch/key.go.
const PUBLIC_LOG = {
  vkey: 'sum.golang.org+033de0ae+Ac4zctda0e5eza+HJyk9SxEdh+s3Ux18htTTAD8OuAn8',
  note: 'go.sum database tree\n65209736\n5+uGFjx6xBZG8ip1+wi77v+grwbhhukIrxEUS8PXvRo=\n\n'
    + '— sum.golang.org Az3grnbssgK7ubgFX36gVETtNv0U23qxyAhAMai2QUfeGa3nB/akvkMdlUErfcZz7l/R3cVtYspg3dxXABkGZZKdsQ8=\n',
};

const PKCS8_ED25519_PREFIX = Buffer.from('302e020100300506032b657004220420', 'hex'); // RFC 8410 section 7
const pemOfSeed = (seed: Buffer): string =>
  createPrivateKey({ key: Buffer.concat([PKCS8_ED25519_PREFIX, seed]), format: 'der', type: 'pkcs8' }).export({ format: 'pem', type: 'pkcs8' }).toString();
const newSigner = (name: string) => logSigner(name, generateKeyPairSync('ed25519').privateKey.export({ format: 'pem', type: 'pkcs8' }).toString());

describe('published notes', () => {
  it('derives the published verifier key and signs the published line', () => {
    const signer = logSigner('PeterNeumann', pemOfSeed(Buffer.from(GO.seed, 'base64').subarray(1)));
    expect(signer.key.vkey).toBe(GO.vkey);
    expect(signNote(GO.text, [signer])).toBe(`${GO.text}\n${GO.line}`);
  });

  it('opens the published notes with either key, with both, and passes unknown keys over', () => {
    const note = `${GO.text}\n${GO.line}${GO.otherLine}`;
    const [peter, enoch] = [parseVkey(GO.vkey), parseVkey(GO.otherVkey)];
    expect(openNote(note, [peter])).toEqual({ text: GO.text, signedBy: [peter] });
    expect(openNote(note, [enoch, peter]).signedBy).toEqual([peter, enoch]);
    expect(() => openNote(note, [parseVkey(C2SP.vkey)])).toThrow('None of the known keys');
    expect(() => openNote(`${GO.text}\n${GO.line.replace('PeterNeumann', 'PeterNeuman')}`, [peter])).toThrow('None of the known keys');
    expect(openNote(C2SP.note, [parseVkey(C2SP.vkey)]).text).toBe('This is an example message.\n');
  });

  it('refuses the whole note when a known key has a wrong signature', () => {
    const keys = [parseVkey(GO.vkey), parseVkey(GO.otherVkey)];
    const spoiled = GO.otherLine.replace('rwz+eBzm', 'rwz+eBzn');
    expect(() => openNote(`${GO.text}\n${GO.line}${spoiled}`, keys)).toThrow('EnochRoot (af0cfe78)');
    expect(() => openNote(`${GO.text.replace('think', 'thank')}\n${GO.line}`, keys)).toThrow('does not fit');
  });

  it('reads the published checkpoint', () => {
    const { text, signatures } = parseNote(C2SP_CHECKPOINT);
    const checkpoint = parseCheckpointText(text);
    expect(checkpoint).toMatchObject({ origin: 'example.com/behind-the-sofa', size: 20852163 });
    expect(checkpoint.root).toHaveLength(32);
    expect(checkpointText(checkpoint)).toBe(text);
    expect(signatures).toMatchObject([{ name: 'example.com/behind-the-sofa' }]);
    expect(signatures[0]?.signature).toHaveLength(64);
  });

  it('opens a real checkpoint of a public log', () => {
    const { text, signedBy } = openNote(PUBLIC_LOG.note, [parseVkey(PUBLIC_LOG.vkey)]);
    expect(text.split('\n')[1]).toBe('65209736');
    expect(signedBy).toMatchObject([{ name: 'sum.golang.org', keyId: '033de0ae' }]);
    expect(() => openNote(PUBLIC_LOG.note.replace('65209736', '65209737'), [parseVkey(PUBLIC_LOG.vkey)])).toThrow('does not fit');
  });

  // Source: the manglings of TestNewVerifier and TestOpen in sumdb/note/note_test.go.
  it('refuses every part and every one-off change of a verifier key', () => {
    for (let start = 0; start <= GO.vkey.length; start += 1) {
      for (let end = start + 1; end <= GO.vkey.length; end += 1) {
        if (start > 0 || end < GO.vkey.length) expect(() => parseVkey(GO.vkey.slice(start, end))).toThrow(TypeError);
      }
      const changed = Buffer.from(GO.vkey);
      changed[start] = (changed[start] ?? 0) + 1;
      if (start < GO.vkey.length) expect(() => parseVkey(changed.toString('latin1'))).toThrow(TypeError);
    }
    expect(() => parseVkey('PeterNeumann+cc469956+ARpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TWBADKEY==')).toThrow(TypeError);
    expect(() => parseVkey('PeterNeumann+173116ae+ZRpc2QcUPDhMQegwxbzhKqiBfsVkmqq/LDE4izWy10TW')).toThrow(TypeError);
  });

  it.each([
    ['no signature', GO.text],
    ['a blank line only', `${GO.text}\n`],
    ['no last line end', `${GO.text}\n${GO.line.slice(0, -1)}`],
    ['a control character', `\u0001${GO.text}\n${GO.line}`],
    ['a name with a space', `${GO.text}\n${GO.line.replace('PeterNeumann', 'Peter Neumann')}`],
    ['a line after the signatures', `${GO.text}\n${GO.line}Unexpected line.\n`],
    ['too many signatures', `${GO.text}\n${GO.line.repeat(17)}`],
  ])('refuses a note with %s', (_what, note) => {
    expect(() => openNote(note, [parseVkey(GO.vkey)])).toThrow(TypeError);
  });
});

describe('our checkpoints', () => {
  const ORIGIN = 'kneeboard.example/log/marrow-and-slate';
  const checkpoint = { origin: ORIGIN, size: 24118, root: Buffer.alloc(32, 9) };

  it('are signed under the origin and opened with its key', () => {
    const signer = newSigner(ORIGIN);
    const note = signCheckpoint(checkpoint, signer);
    expect(note.split('\n').slice(0, 4)).toEqual([ORIGIN, '24118', checkpoint.root.toString('base64'), '']);
    expect(openCheckpoint(note, [newSigner(ORIGIN).key, parseVkey(signer.key.vkey)])).toMatchObject({ ...checkpoint, signedBy: { vkey: signer.key.vkey } });
    expect(() => openCheckpoint(note.replace('24118', '24117'), [signer.key])).toThrow('does not fit');
    expect(() => openCheckpoint(note, [newSigner(ORIGIN).key])).toThrow('None of the known keys');
  });

  it('are refused under a key of another name', () => {
    const other = newSigner('kneeboard.example/log/other');
    expect(() => signCheckpoint(checkpoint, other)).toThrow('The key is for kneeboard.example/log/other');
    expect(() => openCheckpoint(signNote(checkpointText(checkpoint), [other]), [other.key])).toThrow('another name');
  });

  it.each([
    ['a leading zero', 'a.example\n01\n'],
    ['a sign', 'a.example\n+1\n'],
    ['a size beyond whole numbers', 'a.example\n9999999999999999\n'],
    ['an origin with a space', 'a example\n1\n'],
  ])('are refused with %s', (_what, head) => {
    const root = Buffer.alloc(32).toString('base64');
    expect(() => parseCheckpointText(`${head}${root}\n`)).toThrow('not a checkpoint');
  });

  it('are refused with a short root, a root of two spellings, or lines after it', () => {
    const root = Buffer.alloc(32).toString('base64');
    expect(parseCheckpointText(`a.example\n0\n${root}\n`).size).toBe(0);
    expect(() => parseCheckpointText(`a.example\n1\n${Buffer.alloc(31).toString('base64')}\n`)).toThrow('not a checkpoint');
    expect(() => parseCheckpointText(`a.example\n1\n${root.replace('A=', 'B=')}\n`)).toThrow('not a checkpoint');
    expect(() => parseCheckpointText(`a.example\n1\n${root}\nmore\n`)).toThrow('not a checkpoint');
  });

  it('are never signed with another kind of key or a name that cannot stand in a note', () => {
    const p256 = generateKeyPairSync('ec', { namedCurve: 'P-256' });
    expect(() => verifierKey(ORIGIN, p256.publicKey)).toThrow('Ed25519');
    expect(() => newSigner('two words')).toThrow('no spaces');
  });
});
