import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import { Readable } from 'node:stream';
import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import { isOriginalKey, type OriginalStore } from './original-store.ts';

/** An S3-compatible object store that the operator names. */
export interface ObjectStoreSettings {
  readonly endpoint: string;
  readonly region: string;
  readonly bucket: string;
  readonly accessKeyId: string;
  readonly secretAccessKey: string;
}

/** Originals as objects of one bucket, for servers of several machines; keys are the same as in the folder. */
export function createS3Store(settings: ObjectStoreSettings): OriginalStore & { close(): void } {
  const { endpoint, region, bucket: Bucket, accessKeyId, secretAccessKey } = settings;
  // Its version is fixed for the Node.js that this program runs on; the note would stand in every log.
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED ??= 'true';
  const client = new S3Client({
    endpoint,
    region,
    credentials: { accessKeyId, secretAccessKey },
    // The bucket in the path, as every compatible store takes it.
    forcePathStyle: true,
    // The package's own default adds a checksum as a trailer, which compatible stores keep as if it were content.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
  const place = (Key: string) => {
    if (!isOriginalKey(Key)) throw new RangeError(`not a key of an original: ${Key.slice(0, 80)}`);
    return { Bucket, Key };
  };
  const bodyOf = async (key: string) => {
    const { Body } = await client.send(new GetObjectCommand(place(key)));
    if (Body === undefined) throw new Error(`the object store answered ${key} without a body`);
    return Body;
  };

  return {
    async put(key, from) {
      const size = typeof from === 'string' ? (await stat(from)).size : from.length;
      // A whole object of this size is there already: a key stands for its bytes.
      if ((await sizeOf(client, place(key))) === size) return;
      const Body = typeof from === 'string' ? createReadStream(from) : from;
      await client.send(new PutObjectCommand({ ...place(key), Body, ContentLength: size }));
      const kept = await sizeOf(client, place(key));
      if (kept !== size) throw new Error(`the object store kept ${kept} of ${size} bytes of ${key}`);
    },
    async get(key) {
      const body = await bodyOf(key);
      if (!(body instanceof Readable)) throw new TypeError('the object store answered no stream');
      return body;
    },
    async read(key) {
      const body = await bodyOf(key);
      return await body.transformToByteArray();
    },
    async remove(key) {
      await client.send(new DeleteObjectCommand(place(key)));
    },
    close: () => client.destroy(),
  };
}

/** Bytes of an object; null when there is none. */
async function sizeOf(client: S3Client, place: { Bucket: string; Key: string }): Promise<number | null> {
  try {
    const { ContentLength } = await client.send(new HeadObjectCommand(place));
    return ContentLength ?? null;
  } catch (error) {
    if (error instanceof Error && (error.name === 'NotFound' || error.name === 'NoSuchKey')) return null;
    throw error;
  }
}
