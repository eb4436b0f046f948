import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { sampleUpload } from '../../../data/demo/sample-upload.ts';
import { WrongUse } from '../../../server/cli/commands/command-arguments.ts';
import { ledger } from '../../../server/cli/commands/ledger.ts';
import { read } from '../../../server/cli/commands/read.ts';
import { csvRecords } from '../../support/csv-rows.ts';
import { type CommandOutcome, repositoryDir, runCommand, runProgram, startCommand } from '../../support/run-command.ts';
import {
  bytesOfRows,
  globalHourlyLines,
  isdLiteLines,
  tableLines,
  writtenYear,
} from '../../support/weather-writers.ts';
import { zipBytes } from '../../support/zip-bytes.ts';

let folder: string;

beforeAll(async () => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'muslin-files-'));
  mkdirSync(path.join(folder, 'deep'));
  const { text } = sampleUpload();
  writeFileSync(path.join(folder, 'station.epw'), text);
  // Half a world west of where its clock says that it is; and at the sea with the air of 968 m.
  writeFileSync(path.join(folder, 'doubtful.epw'), text.replace(',19.90,2.0,968.0', ',-60.00,2.0,968.0'));
  writeFileSync(path.join(folder, 'asking.epw'), text.replace(',19.90,2.0,968.0', ',19.90,2.0,0.0'));
  writeFileSync(path.join(folder, 'nothing.epw'), '\n'.repeat(8760));
  writeFileSync(path.join(folder, 'empty.epw'), '');
  writeFileSync(path.join(folder, 'packed.epw.gz'), gzipSync(text));
  writeFileSync(path.join(folder, 'empty.json'), '{}');
  const inner = {
    'deep/station.epw': text,
    'deep/station.stat': 'x',
    'inner.epw.gz': gzipSync(text),
    'notes.txt': 'x',
  };
  writeFileSync(path.join(folder, 'folder.zip'), await zipBytes(inner));
  const written = writtenYear(1, 2014);
  const otherYear = writtenYear(2, 2013).slice(0, 60 * 24);
  writeFileSync(path.join(folder, '724666-93067-2015'), bytesOfRows(isdLiteLines(written)));
  writeFileSync(path.join(folder, 'years'), bytesOfRows(isdLiteLines([...otherYear, ...written.slice(0, 60 * 24)])));
  writeFileSync(path.join(folder, 'reports.csv'), bytesOfRows(globalHourlyLines(written)));
  writeFileSync(path.join(folder, 'table.csv'), bytesOfRows(tableLines(written)));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function muslin(...args: string[]): Promise<CommandOutcome> {
  return runCommand(['muslin', ...args], { cwd: folder });
}

/** Every line of standard output is one JSON value, whatever else was said. */
function results(outcome: CommandOutcome): Record<string, unknown>[] {
  return outcome.stdout
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => JSON.parse(line));
}

describe('muslin read', () => {
  let both: CommandOutcome;

  beforeAll(async () => {
    both = await muslin('read', 'station.epw', 'nothing.epw');
  });

  it('answers one line per file in the order given, with the keys that were promised', () => {
    const [station, nothing, ...more] = results(both);
    expect(both.code).toBe(1);
    expect(more).toEqual([]);
    expect([station?.file, nothing?.file]).toEqual(['station.epw', 'nothing.epw']);
    expect(Object.keys(station ?? {})).toEqual([
      ...['file', 'format', 'status', 'asks', 'station', 'hours', 'measured', 'estimated', 'repaired', 'missing'],
      ...['assumedPressure', 'belowZero', 'meanDryBulbC', 'meanWetBulbC', 'depressionHours', 'maxDepressionK'],
      ...['design', 'findings'],
    ]);
    expect(Object.keys(Object(station?.station))).toEqual([
      ...['name', 'latitude', 'longitude', 'elevationM', 'utcOffsetH'],
    ]);
    expect(Object.keys(Object(station?.depressionHours))).toEqual(Array.from({ length: 25 }, (_, k) => String(k + 1)));
    expect(nothing).toMatchObject({ status: 'refused', findings: [{ severity: 'refuse' }] });
  });

  it('counts every hour once', () => {
    const { hours, measured, estimated, repaired, missing } = results(both)[0] ?? {};
    expect(hours).toBe(8760);
    expect(Number(measured) + Number(estimated) + Number(repaired) + Number(missing)).toBe(8760);
  });

  it('ends with 0 for files in doubt and files that ask, and under --strict with 1 for one in doubt', async () => {
    const lenient = await muslin('read', 'doubtful.epw', 'asking.epw');
    expect(lenient.code).toBe(0);
    expect(results(lenient)).toMatchObject([{ status: 'review' }, { status: 'asks' }]);
    expect((await muslin('read', '--strict', 'doubtful.epw')).code).toBe(1);
    expect((await muslin('read', '--strict', 'asking.epw')).code).toBe(0);
  });

  it('counts paths from where the caller stands, also through npm from another folder', async () => {
    const cwd = path.join(folder, 'deep');
    const args = ['--prefix', repositoryDir, 'run', '-s', 'muslin', '--', 'read', '../station.epw'];
    const outcome = await startCommand(args, { program: 'npm', programArgs: [], cwd }).ended;
    expect(outcome).toMatchObject({ code: 0, stderr: '' });
    expect(results(outcome)).toMatchObject([{ file: '../station.epw', status: 'review' }]);
  });

  it('reads the others when one is not there, and says so with code 3', async () => {
    const outcome = await muslin('read', 'absent.epw', 'station.epw', 'deep');
    expect(outcome.code).toBe(3);
    expect(outcome.stderr).toContain('absent.epw cannot be read: there is no such file.');
    expect(outcome.stderr).toContain('deep cannot be read: it is a folder.');
    expect(results(outcome).map(({ file }) => file)).toEqual(['station.epw']);
  });

  it('refuses an empty file, and opens archives: each member that may be weather has a line', async () => {
    const outcome = await muslin('read', 'empty.epw', 'packed.epw.gz', 'folder.zip');
    expect(outcome.code).toBe(1);
    expect(results(outcome).map(({ file, status }) => `${file} ${status}`)).toEqual([
      ...['empty.epw refused', 'packed.epw.gz review', 'folder.zip!/deep/station.epw review'],
      ...['folder.zip!/inner.epw.gz review', 'folder.zip!/notes.txt refused'],
    ]);
  });

  it('asks for the place that a file does not say, finds the zone of one in UTC, and shows what a table seems to hold', async () => {
    const outcome = await muslin('read', '724666-93067-2015', 'reports.csv', 'table.csv');
    expect(outcome.code).toBe(0);
    const [lite, reports, table] = results(outcome);
    expect(lite).toMatchObject({ format: 'ISD-Lite', status: 'asks', station: { latitude: null } });
    expect(reports).toMatchObject({ format: 'Global Hourly', status: 'review', station: { utcOffsetH: -7 } });
    expect(table).toMatchObject({ format: 'table', status: 'asks', hours: null });
    expect(Object(table?.table).sample).toHaveLength(10);
  });

  it('takes the place from --place, answers from --answers and the mapping of a table from --columns', async () => {
    const [guessed] = results(await muslin('read', 'table.csv'));
    writeFileSync(path.join(folder, 'map.json'), JSON.stringify(Object(guessed?.table).mapping));
    writeFileSync(path.join(folder, 'answers.json'), '{"answers": {"pressure-elevation": "pressure"}}');
    const said = ['--place=38.5,-105.25,1000,-7', '--columns=map.json', '--answers=answers.json'];
    const [table, ...years] = results(await muslin('read', ...said, 'table.csv', 'years'));
    expect(table).toMatchObject({ status: 'review', asks: [], hours: 8760, missing: 0, station: { elevationM: 1000 } });
    // A line for every year of a file of several.
    expect(years.map(({ file, part }) => [file, part])).toEqual([
      ['years', '2013'],
      ['years', '2014'],
    ]);
  });
});

describe('muslin ledger', () => {
  it('puts every hour in one class and answers with the keys that were promised', async () => {
    const outcome = await muslin('ledger', 'station.epw', '--brief', 'office');
    expect(outcome.code).toBe(0);
    const [ledger, ...more] = results(outcome);
    expect(more).toEqual([]);
    expect(Object.keys(ledger ?? {})).toEqual([
      ...['file', 'brief', 'methodVersion', 'hours', 'classes', 'demand', 'met', 'verdict', 'failed', 'score'],
      ...['scoreExact', 'grade', 'parts', 'gates'],
    ]);
    const classes: Record<string, number> = Object(ledger?.classes);
    expect(Object.keys(classes)).toEqual([
      ...['closed', 'missing', 'idle', 'frozen', 'damp', 'air', 'direct', 'indirect', 'dewpoint', 'twostage'],
      ...['short', 'beyond'],
    ]);
    expect(Object.values(classes).reduce((sum, count) => sum + count, 0)).toBe(8760);
    expect(ledger?.score).toBe(Math.round(Number(ledger?.scoreExact)));
  });

  it('says the refusing sentences of a file that cannot be used, with code 1', async () => {
    const outcome = await muslin('ledger', 'nothing.epw', '--brief', 'office');
    expect(outcome).toMatchObject({ code: 1, stdout: '' });
    expect(outcome.stderr).toContain('nothing.epw');
  });

  it.each(['Office', 'palace'])('names the presets when asked for %s', async (brief) => {
    const outcome = await muslin('ledger', 'station.epw', '--brief', brief);
    expect(outcome).toMatchObject({ code: 2, stdout: '' });
    expect(outcome.stderr).toContain('office');
  });
});

describe('muslin hours', () => {
  it('writes a table whose classes add up to those of the ledger, under its units and its sources', async () => {
    const outcome = await muslin('hours', 'station.epw', '--brief', 'office');
    expect(outcome).toMatchObject({ code: 0, stderr: '' });
    const rows = csvRecords(outcome.stdout);
    expect(rows).toHaveLength(8760);
    const [ledger] = results(await muslin('ledger', 'station.epw', '--brief', 'office'));
    for (const [hourClass, hours] of Object.entries(Object(ledger?.classes))) {
      expect(rows.filter((row) => row.class === hourClass).length, hourClass).toBe(hours);
    }
    expect(outcome.stdout).toContain(`# method version,${String(ledger?.methodVersion)}\n# brief,office\n`);
    expect(outcome.stdout).toContain('# file,station.epw\n');
    // An EPW has eight header lines.
    expect([rows[0]?.file_line, rows.at(-1)?.file_line]).toEqual(['9', '8768']);
  });

  it('is one whole table through a pipe', async () => {
    const through = ['-c', 'node "$0" muslin hours station.epw --brief office | tail -n 1', runProgram];
    const outcome = await startCommand(through, { program: 'sh', programArgs: [], cwd: folder }).ended;
    expect(outcome.stdout).toMatch(/^2030-01-01 00:00,.*,8768\n$/);
  });

  it('guards a station that is named like a formula', async () => {
    const { text } = sampleUpload();
    writeFileSync(path.join(folder, 'formula.epw'), text.replace(/^LOCATION,[^,]*/, 'LOCATION,=1+cmd()'));
    const outcome = await muslin('hours', 'formula.epw', '--brief', 'office');
    expect(outcome.stdout).toContain("\n# station,'=1+cmd()\n");
  });

  it('says the refusing sentences with code 1, a missing file with 3 and wrong use with 2, and writes no table', async () => {
    const refused = await muslin('hours', 'nothing.epw', '--brief', 'office');
    expect(refused).toMatchObject({ code: 1, stdout: '' });
    expect(refused.stderr).toContain('nothing.epw is refused');
    expect(await muslin('hours', 'absent.epw', '--brief', 'office')).toMatchObject({ code: 3, stdout: '' });
    expect(await muslin('hours', 'station.epw', '--brief', 'palace')).toMatchObject({ code: 2, stdout: '' });
  });
});

describe('wrong use', () => {
  it.each([
    ['no command', []],
    ['an unknown command', ['rank']],
    ['an unknown option', ['read', 'station.epw', '--fast']],
    ['no brief', ['ledger', 'station.epw']],
  ])('ends with 2 and words on standard error: %s', async (_what, args) => {
    const outcome = await muslin(...args);
    expect(outcome).toMatchObject({ code: 2, stdout: '' });
    expect(outcome.stderr).not.toBe('');
  });

  it.each([
    ['a place of three numbers', read, ['station.epw', '--place', '1,2,3']],
    ['a place beyond the Earth', read, ['station.epw', '--place=91,2,3,4']],
    ['a mapping that is not there', read, ['station.epw', '--columns=absent.json']],
    ['a mapping that is none', read, ['station.epw', '--columns=empty.json']],
    ['answers that are no answers', read, ['station.epw', '--answers=station.epw']],
    ['no file', read, []],
    ['an option of the other command', read, ['station.epw', '--brief', 'office']],
    ['two files where one is read', ledger, ['station.epw', 'nothing.epw', '--brief', 'office']],
  ])('is told before anything is read: %s', async (_what, command, args) => {
    const signal = new AbortController().signal;
    await expect(command({ args, callerDir: folder, rootDir: repositoryDir, signal })).rejects.toThrow(WrongUse);
  });

  it('is not what --help is', async () => {
    expect((await muslin('--help')).code).toBe(0);
  });
});
