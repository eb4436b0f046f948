import { spawn } from 'node:child_process';
import { once } from 'node:events';
import path from 'node:path';
import { createInterface } from 'node:readline';

const ROOT = path.resolve(import.meta.dirname, '../..');
const SCRIPT = path.join(ROOT, 'data/demo/write-demo.ts');

/**
 * The weather files of the demo, one after the other as a process of its own has written them to the folder.
 * @throws Error when they could not be written
 */
export async function* writtenDemoFiles(folder: string): AsyncGenerator<string, void, undefined> {
  const writer = spawn(process.execPath, ['--import', 'tsx', SCRIPT, folder], {
    cwd: ROOT,
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const ended = once(writer, 'exit');
  ended.catch(() => undefined);
  try {
    for await (const name of createInterface({ input: writer.stdout })) yield path.join(folder, name);
    const [code, signal] = await ended;
    if (code !== 0) throw new Error(`the weather of the demo could not be written (${signal ?? `code ${code}`})`);
  } finally {
    writer.kill();
  }
}
