import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import { MEMBER_BYTES, MOST_RATIO } from './zip-members.ts';

const inflate = promisify(gunzip);

/** Why a gzip file cannot be used, in a sentence. */
export class GzipProblem extends Error {}

const RATIO_FROM_BYTES = 1024 * 1024;

export function isGzip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x1f && bytes[1] === 0x8b;
}

/** The content of a gzip file, inflated once. @throws GzipProblem */
export async function inflateGzip(bytes: Uint8Array): Promise<Uint8Array> {
  // The ratio is told by stopping there: a bomb never comes out whole.
  const most = Math.min(MEMBER_BYTES, Math.max(RATIO_FROM_BYTES, MOST_RATIO * bytes.length));
  try {
    return await inflate(bytes, { maxOutputLength: most });
  } catch (error) {
    const code = error instanceof Error && 'code' in error ? error.code : '';
    if (code === 'ERR_BUFFER_TOO_LARGE') {
      throw new GzipProblem(
        most < MEMBER_BYTES
          ? `This gzip file would grow to more than ${MOST_RATIO} times its packed size, as no weather file does.`
          : 'This gzip file unpacks to more than 64 MB, the most that one file may have.',
      );
    }
    throw new GzipProblem('This gzip file is damaged or cut off. Bring it anew from its source.');
  }
}
