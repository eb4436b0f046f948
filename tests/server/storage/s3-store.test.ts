import { createHash, randomBytes } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { buffer } from 'node:stream/consumers';
import S3rver from 's3rver';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ConfigError, readConfig } from '../../../server/config.ts';
import { originalKey } from '../../../server/storage/original-store.ts';
import { createS3Store } from '../../../server/storage/s3-store.ts';

let folder: string;
let objects: S3rver;
let store: ReturnType<typeof createS3Store>;
const bytes = randomBytes(300_000);
const key = originalKey(createHash('sha256').update(bytes).digest('hex'));

/** What that server takes for a key and its secret. */
const ACCESS = 'S3RVER';

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'muslin-objects-'));
  const options = { address: '127.0.0.1', port: 0, silent: true, directory: path.join(folder, 'objects') };
  objects = new S3rver({ ...options, configureBuckets: [{ name: 'originals' }] });
  const { port } = await objects.run();
  const endpoint = `http://127.0.0.1:${port}`;
  store = createS3Store({
    endpoint,
    region: 'us-east-1',
    bucket: 'originals',
    accessKeyId: ACCESS,
    secretAccessKey: ACCESS,
  });
  await writeFile(path.join(folder, 'a.epw'), bytes);
});
afterAll(async () => {
  store.close();
  await objects.close();
  await rm(folder, { recursive: true, force: true });
});

describe('the store of originals in an object store', () => {
  it('gives back the very bytes, as a stream and whole, and keeps what is there', async () => {
    await store.put(key, path.join(folder, 'a.epw'));
    await store.put(key, path.join(folder, 'a.epw'));
    expect(Buffer.compare(await buffer(await store.get(key)), bytes)).toBe(0);
    expect(Buffer.compare(await store.read(key), bytes)).toBe(0);
  });

  it('puts a broken object right when the same bytes come again', async () => {
    const short = path.join(folder, 'short');
    await writeFile(short, bytes.subarray(0, 10));
    const other = originalKey(createHash('sha256').update('other').digest('hex'));
    await store.put(other, short);
    await store.put(other, path.join(folder, 'a.epw'));
    expect(Buffer.compare(await store.read(other), bytes)).toBe(0);
  });

  it('throws for what is not there, and removing that is no fault', async () => {
    await store.remove(key);
    await store.remove(key);
    await expect(store.read(key)).rejects.toThrow();
    await expect(store.get(key)).rejects.toThrow();
  });

  it('takes no key but that of an original', async () => {
    await expect(store.read('../secrets.json')).rejects.toThrow(RangeError);
  });
});

describe('the settings of an object store', () => {
  const whole = {
    S3_ENDPOINT: 'https://objects.example.org',
    S3_BUCKET: 'originals',
    S3_ACCESS_KEY_ID: 'key',
    S3_SECRET_ACCESS_KEY: 'a secret',
  };

  it('are none, or whole', () => {
    expect(readConfig({}).objectStore).toBeNull();
    expect(readConfig(whole).objectStore).toEqual({
      endpoint: 'https://objects.example.org',
      region: 'us-east-1',
      bucket: 'originals',
      accessKeyId: 'key',
      secretAccessKey: 'a secret',
    });
  });

  it('say every fault at once and never a secret', () => {
    const faults = () => readConfig({ S3_ENDPOINT: 'objects', S3_SECRET_ACCESS_KEY: 'a secret', PORT: 'x' });
    expect(faults).toThrow(ConfigError);
    expect(faults).toThrow(/S3_ENDPOINT="objects"[\s\S]*S3_BUCKET, S3_ACCESS_KEY_ID are missing/);
    expect(faults).not.toThrow(/a secret/);
  });
});
