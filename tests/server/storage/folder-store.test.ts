import { createHash, randomBytes } from 'node:crypto';
import { mkdtemp, readdir, rm, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { buffer } from 'node:stream/consumers';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createFolderStore } from '../../../server/storage/folder-store.ts';
import { originalKey } from '../../../server/storage/original-store.ts';
import { ReusableBytes } from '../../../server/storage/reusable-bytes.ts';

let folder: string;
const bytes = randomBytes(100_000);
const key = originalKey(createHash('sha256').update(bytes).digest('hex'));

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'muslin-store-'));
});
afterAll(async () => {
  await rm(folder, { recursive: true, force: true });
});

async function upload(name: string, content: Uint8Array): Promise<string> {
  const file = path.join(folder, name);
  await writeFile(file, content);
  return file;
}

describe('the store of originals', () => {
  it('gives back the very bytes, as a stream and whole', async () => {
    const store = createFolderStore(path.join(folder, 'round'));
    await store.put(key, await upload('a.epw', bytes));
    expect(Buffer.compare(await buffer(await store.get(key)), bytes)).toBe(0);
    expect(Buffer.compare(await store.read(key), bytes)).toBe(0);
  });

  it('reads one after another into the same memory, a shorter one after a longer', async () => {
    const store = createFolderStore(path.join(folder, 'memory'));
    const memory = new ReusableBytes();
    const read: Uint8Array[] = [];
    for (const content of [bytes, Buffer.from('short'), Buffer.alloc(0)]) {
      const its = originalKey(createHash('sha256').update(content).digest('hex'));
      await store.put(its, content);
      const found = await store.read(its, memory);
      expect(Buffer.compare(found, content)).toBe(0);
      read.push(found);
    }
    expect(new Set(read.map(({ buffer }) => buffer)).size).toBe(1);
    const large = memory.take(9 * 2 ** 20);
    expect(large).toHaveLength(9 * 2 ** 20);
    expect(large.buffer).not.toBe(memory.take(1).buffer);
  });

  it('takes bytes as it takes a file', async () => {
    const root = path.join(folder, 'bytes');
    const store = createFolderStore(root);
    await store.put(key, bytes);
    expect(Buffer.compare(await store.read(key), bytes)).toBe(0);
    expect((await stat(path.join(root, key))).mode & 0o777).toBe(0o600);
  });

  it('keeps an original readable by the server alone, and leaves nothing beside it', async () => {
    const root = path.join(folder, 'modes');
    await createFolderStore(root).put(key, await upload('b.epw', bytes));
    expect((await stat(path.join(root, key))).mode & 0o777).toBe(0o600);
    expect((await stat(path.join(root, key.slice(0, 2)))).mode & 0o777).toBe(0o700);
    expect(await readdir(path.dirname(path.join(root, key)))).toEqual([path.basename(key)]);
  });

  it('stores the same key put twice at once as one original', async () => {
    const root = path.join(folder, 'twice');
    const store = createFolderStore(root);
    const file = await upload('c.epw', bytes);
    await Promise.all([store.put(key, file), store.put(key, file), store.put(key, file)]);
    expect(await readdir(path.dirname(path.join(root, key)))).toEqual([path.basename(key)]);
  });

  it('leaves nothing behind when the upload cannot be read', async () => {
    const root = path.join(folder, 'gone');
    const store = createFolderStore(root);
    await expect(store.put(key, path.join(folder, 'no such file'))).rejects.toThrow('ENOENT');
    expect(await readdir(path.dirname(path.join(root, key)))).toEqual([]);
    await expect(store.read(key)).rejects.toThrow('ENOENT');
    await expect(store.get(key)).rejects.toThrow('ENOENT');
  });

  it('removes an original, and is content when it is gone already', async () => {
    const store = createFolderStore(path.join(folder, 'removed'));
    await store.put(key, await upload('d.epw', bytes));
    await store.remove(key);
    await store.remove(key);
    await expect(store.read(key)).rejects.toThrow('ENOENT');
  });

  it('takes no key that did not come from a fingerprint', async () => {
    const store = createFolderStore(path.join(folder, 'keys'));
    const wrong = ['../../etc/passwd', 'ab/cd/../../x', '', `${key}/x`, key.toUpperCase(), `/${key}`];
    for (const name of wrong) await expect(store.read(name)).rejects.toThrow('not a key of an original');
    expect(() => originalKey('../x')).toThrow('not a SHA-256 fingerprint');
    expect(() => originalKey(`${'a'.repeat(64)}\n`)).toThrow('not a SHA-256 fingerprint');
    expect(wrong).toHaveLength(6);
  });
});
