import { buffer } from 'node:stream/consumers';
import yazl from 'yazl';

/** A zip archive of these files, in their order. */
export async function zipBytes(
  files: Readonly<Record<string, Buffer | string>>,
  options: { stored?: boolean } = {},
): Promise<Buffer> {
  const zip = new yazl.ZipFile();
  for (const [name, content] of Object.entries(files)) {
    zip.addBuffer(Buffer.from(content), name, { compress: options.stored !== true, mtime: new Date(0) });
  }
  zip.end();
  return await buffer(zip.outputStream);
}
