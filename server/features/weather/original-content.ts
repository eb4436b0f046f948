import { GzipProblem, inflateGzip, isGzip } from '../../storage/inflate-gzip.ts';

/** What is inside a gzip file, whatever its name; any other file is its own content. */
export async function contentOf(original: Uint8Array): Promise<Uint8Array | GzipProblem> {
  if (!isGzip(original)) return original;
  try {
    return await inflateGzip(original);
  } catch (error) {
    if (error instanceof GzipProblem) return error;
    throw error;
  }
}
