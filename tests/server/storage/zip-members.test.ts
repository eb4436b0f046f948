import { createHash } from 'node:crypto';
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { inflateGzip, isGzip } from '../../../server/storage/inflate-gzip.ts';
import { countZipMembers, MOST_MEMBERS, ZipProblem, zipMembers } from '../../../server/storage/zip-members.ts';
import { zipBytes } from '../../support/zip-bytes.ts';

let folder: string;
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'muslin-zip-'));
});
afterAll(() => rm(folder, { recursive: true, force: true }));

const archive = () => path.join(folder, 'archive.zip');

/** What came out, with its content; the folder holds nothing but the archive afterwards. */
async function open(bytes: Buffer, unwanted: (name: string) => string | null = () => null) {
  await writeFile(archive(), bytes);
  const seen: { path: string; content?: string; why?: string; fingerprint?: string }[] = [];
  for await (const member of zipMembers({ file: archive(), folder, unwanted })) {
    if (member.kind === 'left out') seen.push({ path: member.path, why: member.why });
    else {
      const content = await readFile(member.temporaryPath, 'latin1');
      expect(member.bytes).toBe(content.length);
      seen.push({ path: member.path, content, fingerprint: member.fingerprint });
    }
  }
  expect(await readdir(folder)).toEqual(['archive.zip']);
  return seen;
}

describe('a zip archive', () => {
  it('gives its files one by one with their SHA-256, whether packed or stored', async () => {
    for (const stored of [false, true]) {
      const bytes = await zipBytes({ 'north/a.epw': 'LOCATION,A', 'b.csv': 'time,t\n' }, { stored });
      const fingerprint = createHash('sha256').update('LOCATION,A').digest('hex');
      expect(await open(bytes)).toMatchObject([
        { path: 'north/a.epw', content: 'LOCATION,A', fingerprint },
        { path: 'b.csv', content: 'time,t\n' },
      ]);
      expect(await countZipMembers(archive())).toBe(2);
    }
  });

  it('leaves out what is not wanted and says why', async () => {
    const bytes = await zipBytes({ 'a.ddy': 'x', 'a.epw': 'LOCATION' });
    const seen = await open(bytes, (name) => (name.endsWith('.ddy') ? 'A companion.' : null));
    expect(seen).toMatchObject([
      { path: 'a.ddy', why: 'A companion.' },
      { path: 'a.epw', content: 'LOCATION' },
    ]);
  });

  it('opens an archive inside it, but not one inside that', async () => {
    const inmost = await zipBytes({ 'deep.epw': 'LOCATION' });
    const inner = await zipBytes({ 'inner.epw': 'LOCATION,I', 'inmost.zip': inmost });
    expect(await open(await zipBytes({ 'inner.zip': inner, 'outer.epw': 'LOCATION,O' }))).toMatchObject([
      { path: 'inner.zip/inner.epw', content: 'LOCATION,I' },
      { path: 'inner.zip/inmost.zip', why: expect.stringContaining('inside an archive inside') },
      { path: 'outer.epw', content: 'LOCATION,O' },
    ]);
  });

  it('is taken up again at any of its entries, without touching those before', async () => {
    await writeFile(archive(), await zipBytes({ 'a.epw': 'LOCATION,A', 'b.epw': 'LOCATION,B', 'c.epw': 'LOCATION,C' }));
    const seen: (string | number)[] = [];
    for await (const { path: name, entry } of zipMembers({ file: archive(), folder, unwanted: () => null, from: 1 })) {
      seen.push(name, entry);
    }
    expect(seen).toEqual(['b.epw', 1, 'c.epw', 2]);
  });

  it('never lays a file outside its folder, whatever the archive calls it', async () => {
    const bytes = await zipBytes({ 'aaaaaaaaa/evil.epw': 'LOCATION' });
    const evil = Buffer.from(bytes.toString('latin1').replaceAll('aaaaaaaaa/', '../../../x'), 'latin1');
    expect(await open(evil)).toMatchObject([{ path: '../../../xevil.epw', content: 'LOCATION' }]);
  });

  it('leaves out a file that would grow two hundredfold', async () => {
    const seen = await open(await zipBytes({ 'bomb.epw': Buffer.alloc(8 * 1024 * 1024) }));
    expect(seen).toEqual([{ path: 'bomb.epw', why: expect.stringContaining('200 times') }]);
  });

  it('leaves out a file whose real size is not the one that is declared', async () => {
    const bytes = await zipBytes({ 'a.epw': 'LOCATION,A, a line that is long enough to be packed, packed, packed' });
    const at = bytes.indexOf(Buffer.from([0x50, 0x4b, 0x01, 0x02]));
    bytes.writeUInt32LE(10, at + 24);
    expect(await open(bytes)).toEqual([{ path: 'a.epw', why: expect.stringContaining('damaged') }]);
  });

  it('is refused when it is cut off, empty of structure or lists too many files, before anything is taken out', async () => {
    const whole = await zipBytes({ 'a.epw': 'LOCATION' });
    await expect(open(whole.subarray(0, whole.length - 30))).rejects.toThrow(ZipProblem);
    await expect(open(Buffer.from('PK\u0003\u0004 and nothing else'))).rejects.toThrow(/not a whole zip archive/);
    const claims = Buffer.from(whole);
    // The number of files, as the record at the end of the archive has it.
    claims.writeUInt16LE(MOST_MEMBERS + 1, claims.length - 12);
    await expect(open(claims)).rejects.toThrow(/holds 2001 files/);
  });
});

describe('a gzip file', () => {
  it('is known by its first bytes and inflated once', async () => {
    const packed = gzipSync('LOCATION,A');
    expect(isGzip(packed)).toBe(true);
    expect(isGzip(Buffer.from('LOCATION'))).toBe(false);
    expect(Buffer.from(await inflateGzip(packed)).toString()).toBe('LOCATION,A');
  });

  it('is refused when it is cut off or made to fill the memory', async () => {
    const packed = gzipSync('LOCATION,A'.repeat(100));
    await expect(inflateGzip(packed.subarray(0, 20))).rejects.toThrow(/damaged or cut off/);
    await expect(inflateGzip(gzipSync(Buffer.alloc(4 * 1024 * 1024)))).rejects.toThrow(/200 times/);
  });
});
