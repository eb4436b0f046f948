import { describe, expect, it } from 'vitest';
import { fixtureFiles, fixtureRecord } from '../../../src/app/gallery/fixtures.ts';
import type { WeatherFileRecord } from '../../../src/contract/weather.ts';
import { draftOfRecord, readAnswers } from '../../../src/features/weather/answer-draft.ts';
import { questionsOf } from '../../../src/features/weather/answer-questions.ts';
import {
  draftOfMapping,
  type Mapping,
  mappingOfDraft,
  mappingProblems,
} from '../../../src/features/weather/mapping-draft.ts';
import { sampleUnder } from '../../../src/features/weather/table-sample.ts';

const mapping: Mapping = {
  time: {
    columns: { form: 'stamp', column: 'time', order: 'year first' },
    scale: 'standard',
    zone: null,
    mark: 'reading',
  },
  years: 'actual',
  dryBulb: { column: 'air', unit: 'C' },
  dewPoint: { column: 'dew', unit: 'C' },
  relativeHumidity: null,
  wetBulb: null,
  pressure: { column: 'press', unit: 'hPa', level: 'station' },
  station: null,
};

function recordWith(change: Partial<WeatherFileRecord>): WeatherFileRecord {
  const [file] = fixtureFiles();
  if (!file) throw new Error('the fixtures hold no file');
  return { ...fixtureRecord({ ...file, status: 'asks' }), answers: {}, asks: [], table: null, ...change };
}

const ask = (what: string, proposal: string | null = null) => ({ what, message: `About ${what}.`, proposal });
const tableOf = (guess: Mapping | null) => ({
  shapeKey: '0011223344556677',
  mapping: guess,
  questions: [],
  columns: ['time', 'air', 'dew', 'press'].map((name) => ({ name, unit: '', cells: [] })),
  sample: [],
  stepMin: 60,
});

describe('the answers of a form', () => {
  it('take the guess of a table as it stands, and leave the place that the file has', () => {
    const record = recordWith({ table: tableOf(mapping), asks: [ask('unit-guess')] });
    expect(readAnswers(draftOfRecord(record), record)).toEqual({ ok: true, answers: { mapping } });
  });

  it('ask for long gaps to be filled, take it back, and keep suspect values only where the source has such marks', () => {
    const record = recordWith({ asks: [] });
    const filled = { ...draftOfRecord(record), handling: { fillLongGaps: true, keepSuspect: true } };
    expect(readAnswers(filled, record)).toEqual({ ok: true, answers: { fillLongGaps: true } });
    const coded = { ...record, file: { ...record.file, format: 'ISD' }, answers: { fillLongGaps: true } };
    const draft = draftOfRecord(coded);
    expect(draft.handling).toEqual({ fillLongGaps: true, keepSuspect: false });
    const changed = { ...draft, handling: { fillLongGaps: false, keepSuspect: true } };
    expect(readAnswers(changed, coded)).toEqual({ ok: true, answers: { fillLongGaps: false, keepSuspect: true } });
  });

  it('say every fault at once, each at its field', () => {
    const record = recordWith({ table: tableOf(null), asks: [ask('unit-guess'), ask('time-repeat')] });
    const draft = draftOfRecord(record);
    const place = { name: ' ', latitude: '95', longitude: 'east', elevationM: '', utcOffsetH: '25:00' };
    const reading = readAnswers(
      { ...draft, place, mapping: { ...draft.mapping, scale: 'clock', zone: 'Nowhere' } },
      record,
    );
    expect(reading.ok ? [] : Object.keys(reading.problems).sort()).toEqual([
      'choices.time-repeat',
      'mapping.dewPoint',
      'mapping.dryBulb',
      'mapping.stamp',
      'mapping.zone',
      'place.latitude',
      'place.longitude',
      'place.name',
      'place.utcOffsetH',
    ]);
  });

  it('stand on top of those that were given before', () => {
    const record = recordWith({
      asks: [ask('elevation-missing')],
      answers: { place: { latitude: -26.6 }, keepSuspect: true },
    });
    const draft = draftOfRecord(record);
    const reading = readAnswers(
      { ...draft, place: { ...draft.place, elevationM: '1042,5', utcOffsetH: '−3:30' } },
      record,
    );
    expect(reading).toEqual({
      ok: true,
      answers: { place: { latitude: -26.6, elevationM: 1042.5, utcOffsetH: -3.5 }, keepSuspect: true },
    });
  });

  it('need a choice, unless the corrected place answers the question too', () => {
    const record = recordWith({ asks: [ask('pressure-elevation', 'Keep the pressure.')] });
    const draft = draftOfRecord(record);
    const unanswered = readAnswers(draft, record);
    expect(unanswered.ok ? {} : unanswered.problems).toEqual({
      'choices.pressure-elevation': 'Choose, or correct the place below.',
    });
    const moved = readAnswers({ ...draft, place: { ...draft.place, elevationM: '1234' } }, record);
    expect(moved).toEqual({ ok: true, answers: { place: { elevationM: 1234 } } });
    const chosen = readAnswers({ ...draft, choices: { 'pressure-elevation': 'elevation' } }, record);
    expect(chosen).toEqual({ ok: true, answers: { answers: { 'pressure-elevation': 'elevation' } } });
  });

  it('mark what the file makes likely and choose nothing by themselves', () => {
    const asks = [
      ask('dew-is-wet-bulb', 'Read the dew-point column as wet bulb.'),
      ask('several-periods', 'Read the first.'),
    ];
    const record = recordWith({ asks });
    expect(questionsOf(record).map(({ proposed }) => proposed)).toEqual(['wet bulb', '1']);
    expect(draftOfRecord(record).choices).toEqual({ 'dew-is-wet-bulb': '', 'several-periods': '' });
  });
});

describe('the mapping of a table in a form', () => {
  it('comes out as it went in, in every way in which times are written', () => {
    const forms: Mapping['time']['columns'][] = [
      mapping.time.columns,
      { form: 'date and time', date: 'day', time: 'clock', order: 'day first' },
      { form: 'parts', year: null, month: 'm', day: 'd', hour: 'h', minute: null, hours: 'hours and minutes' },
      { form: 'serial days', column: 'time', system: 1904 },
      { form: 'epoch', column: 'time', unit: 'ms' },
    ];
    for (const columns of forms) {
      const held: Mapping = { ...mapping, time: { ...mapping.time, columns }, years: 'typical' };
      expect(mappingOfDraft(draftOfMapping(held))).toEqual(held);
      expect(mappingProblems(draftOfMapping(held))).toEqual({});
    }
  });

  it('gives one column one meaning', () => {
    const twice = draftOfMapping({ ...mapping, dewPoint: { column: 'air', unit: 'C' } });
    expect(mappingProblems(twice)).toEqual({ dewPoint: '“air” is chosen above already. One column holds one thing.' });
  });

  it('shows the first rows of the original as it reads them now', () => {
    const rows = Array.from({ length: 30 }, (_none, hour) => {
      const time = new Date(Date.UTC(2023, 0, 1, hour)).toISOString().slice(0, 16).replace('T', ' ');
      return `${time},68.0,50.0,900.5`;
    });
    const lines = ['time,air,dew,press', ...rows];
    const names = ['time', 'air', 'dew', 'press'];
    const inFahrenheit: Mapping = {
      ...mapping,
      dryBulb: { column: 'air', unit: 'F' },
      dewPoint: { column: 'dew', unit: 'F' },
    };
    const sample = sampleUnder(lines, inFahrenheit, names);
    expect(sample).toHaveLength(10);
    expect(sample?.[0]?.dryBulbC).toBeCloseTo(20, 10);
    expect(sample?.[0]).toMatchObject({ line: 2, time: '2023-01-01T00:00', pressurePa: 90_050 });
    expect(sampleUnder(lines, mapping, ['other', 'names'])).toBeNull();
  });
});
