/**
 * Writes the weather files of the demo into a folder: `node --import tsx data/demo/write-demo.ts FOLDER`.
 * Prints the name of each file on a line of its own as soon as it is complete.
 */
import { mkdirSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { demoWeatherFile } from './demo-weather-file.ts';
import { demoStations } from './stations.ts';

const [folder] = process.argv.slice(2);
if (folder === undefined) {
  console.error('Say into which folder: node --import tsx data/demo/write-demo.ts FOLDER');
  process.exit(2);
}
mkdirSync(folder, { recursive: true });
for (const station of demoStations) {
  const { name, text } = demoWeatherFile(station);
  const unfinished = path.join(folder, `${name}.unfinished`);
  writeFileSync(unfinished, text);
  renameSync(unfinished, path.join(folder, name));
  console.log(name);
}
