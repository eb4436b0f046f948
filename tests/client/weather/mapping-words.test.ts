import { expect, test } from 'vitest';
import { mappingSentences } from '../../../src/features/weather/mapping-words.ts';

test('how a table was read is told by its columns, units, time scale and what its times mean', () => {
  expect(
    mappingSentences({
      time: {
        columns: { form: 'stamp', column: 'when', order: 'day first' },
        scale: 'clock',
        zone: 'Africa/Gaborone',
        mark: 'ending',
      },
      years: 'actual',
      dryBulb: { column: 'T2m', unit: 'F' },
      dewPoint: null,
      relativeHumidity: { column: 'RH', unit: '%' },
      wetBulb: null,
      pressure: { column: 'QNH', unit: 'hPa', level: 'altimeter' },
      station: null,
    }),
  ).toEqual([
    'dry bulb from “T2m” in °F, relative humidity from “RH” in % and pressure from “QNH” in hPa (altimeter).',
    'Times in local clock time (Africa/Gaborone); each stands for the hour that ends then; real years.',
  ]);
});
