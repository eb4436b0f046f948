/**
 * Stops a test cluster and removes its folders as soon as the test run that started it is gone, however it ended: its
 * standard input is a pipe from that run and ends with it. Argument: JSON { pgCtl, dataDir, user, folders }.
 */
import { spawnSync } from 'node:child_process';
import { rmSync } from 'node:fs';

const { pgCtl, dataDir, user, folders } = JSON.parse(process.argv[2] ?? '{}');
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => undefined);

process.stdin.on('end', () => {
  spawnSync(pgCtl, ['-D', dataDir, '-m', 'immediate', '-w', 'stop'], { ...user, cwd: '/', stdio: 'ignore' });
  for (const folder of folders) rmSync(folder, { recursive: true, force: true });
});
process.stdin.resume();
