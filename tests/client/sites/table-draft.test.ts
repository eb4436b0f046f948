import { describe, expect, it } from 'vitest';
import { MOST_PORTION_BYTES } from '../../../src/contract/site-imports.ts';
import { guessSiteColumns } from '../../../src/engine/sites/site-columns.ts';
import { readTableFile } from '../../../src/features/sites/read-table-file.ts';
import { mappingProblem, portionsOf, readTable } from '../../../src/features/sites/table-draft.ts';

const fileOf = (content: string | Uint8Array<ArrayBuffer>) => new File([content], 'sites.csv');

async function readingOf(content: string | Uint8Array<ArrayBuffer>) {
  const table = await readTableFile(fileOf(content));
  return readTable(table, guessSiteColumns(table.heads));
}

describe('a table that somebody brings', () => {
  it('is read with semicolons, decimal commas, quotes and empty lines, each row by its line in the file', async () => {
    const { rows } = await readingOf('School;Lat;Lon;Notes\n\nAlpha;-26,5;28,1;"two\nlines"\nBeta;-27;28;x\n\n');
    expect(rows.map(({ line, site }) => [line, site?.name, site?.latitude, site?.notes])).toEqual([
      [3, 'Alpha', -26.5, 'two\nlines'],
      [5, 'Beta', -27, 'x'],
    ]);
  });

  it('is read in UTF-8, in UTF-16 and in Windows-1252', async () => {
    const text = 'Name,Lat,Lon\nÉcole,1,2\n';
    const utf16 = Uint8Array.from([
      0xff,
      0xfe,
      ...[...text].flatMap((each) => [each.charCodeAt(0) & 255, each.charCodeAt(0) >> 8]),
    ]);
    const latin = Uint8Array.from([...text].map((each) => each.charCodeAt(0)));
    for (const content of [text, `\uFEFF${text}`, utf16, latin]) {
      expect((await readingOf(content)).rows.map(({ site }) => site?.name)).toEqual(['École']);
    }
  });

  it('tells every fault with its line, and counts good rows and doubles', async () => {
    const { faults, good, doubles } = await readingOf('Name,Lat,Lon\nA,1,2\n,95,2\na,3,x\nA,4,5\n');
    expect(faults.map(({ line, column }) => [line, column])).toEqual([
      [3, 'name'],
      [3, 'latitude'],
      [4, 'longitude'],
    ]);
    expect([good, doubles]).toEqual([2, 1]);
  });

  it('is refused in words when there is nothing in it', async () => {
    await expect(readTableFile(fileOf('Name,Lat,Lon\n'))).rejects.toThrow('no row below its heads');
    await expect(readTableFile(fileOf(''))).rejects.toThrow(RangeError);
  });
});

describe('what a mapping still lacks', () => {
  it('is said in a sentence', () => {
    expect(mappingProblem({})).toBe(
      'Say which column holds the name, and which latitude and longitude, or both in one column.',
    );
    expect(mappingProblem({ name: 0, latitude: 1 })).toContain('latitude and longitude');
    expect(mappingProblem({ name: 0, position: 1 })).toBeNull();
  });
});

describe('portions', () => {
  it('keep to the rows and the bytes that the server takes at once, whatever the letters', () => {
    const row = (line: number, notes: string) => ({ line, cells: { name: 'x', notes }, site: null });
    const many = Array.from({ length: 4500 }, (_none, index) => row(index + 2, ''));
    expect(portionsOf(many).map(({ length }) => length)).toEqual([2000, 2000, 500]);
    const long = Array.from({ length: 900 }, (_none, index) => row(index + 2, '🏫'.repeat(2500)));
    const portions = portionsOf(long);
    expect(portions.flat()).toHaveLength(900);
    for (const rows of portions) expect(Buffer.byteLength(JSON.stringify({ rows }))).toBeLessThan(MOST_PORTION_BYTES);
  });
});
