import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { whyNoWeatherFile } from '../../features/weather/no-weather-file.ts';
import { GzipProblem, inflateGzip, isGzip } from '../../storage/inflate-gzip.ts';

/** A weather file to read: a file as it is, what a gzip file holds, or a member of a zip, `archive.zip!/member.epw`. */
export interface WeatherMember {
  readonly name: string;
  /** Its content, or why it cannot be had, in a sentence. */
  readonly content: Uint8Array | string;
}

/** The weather files in what was opened; what an archive holds beside them gives none. */
export async function* weatherMembers(name: string, bytes: Uint8Array): AsyncGenerator<WeatherMember> {
  if (isGzip(bytes)) yield { name, content: await inflated(bytes) };
  else if (bytes[0] === 0x50 && bytes[1] === 0x4b) yield* membersOfZip(name, bytes);
  else yield { name, content: bytes };
}

async function inflated(bytes: Uint8Array): Promise<Uint8Array | string> {
  try {
    return await inflateGzip(bytes);
  } catch (error) {
    if (error instanceof GzipProblem) return error.message;
    throw error;
  }
}

async function* membersOfZip(name: string, bytes: Uint8Array): AsyncGenerator<WeatherMember> {
  const { isZip, ZipProblem, zipMembers } = await import('../../storage/zip-members.ts');
  const folder = await mkdtemp(path.join(os.tmpdir(), 'muslin-read-'));
  const file = path.join(folder, 'archive');
  try {
    await writeFile(file, bytes, { mode: 0o600 });
    if (!(await isZip(file))) {
      yield { name, content: bytes };
      return;
    }
    for await (const member of zipMembers({ file, folder, unwanted: whyNoWeatherFile })) {
      const shown = `${name}!/${member.path}`;
      if (member.kind === 'member') yield* weatherMembers(shown, await readFile(member.temporaryPath));
      else if (whyNoWeatherFile(member.path) === null) yield { name: shown, content: member.why };
    }
  } catch (error) {
    if (!(error instanceof ZipProblem)) throw error;
    yield { name, content: error.message };
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}
