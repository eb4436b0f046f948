/** Writes common-passwords.txt.gz anew from the npm package that the README names. */
import { readFileSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { gzipSync } from 'node:zlib';

const SHORTEST = 4;

const main = createRequire(import.meta.url).resolve('@zxcvbn-ts/language-common');
const words: readonly string[] = JSON.parse(readFileSync(path.resolve(main, '../../src/passwords.json'), 'utf8'));
const kept = new Set(words.map((word) => word.toLowerCase()).filter((word) => word.length >= SHORTEST));
const bytes = gzipSync(`${[...kept].join('\n')}\n`, { level: 9 });
// The tenth byte names the system that packed it; without it the same list is the same bytes everywhere.
bytes[9] = 255;
writeFileSync(path.join(import.meta.dirname, 'common-passwords.txt.gz'), bytes);
process.stdout.write(`${kept.size} passwords, ${bytes.length} bytes\n`);
