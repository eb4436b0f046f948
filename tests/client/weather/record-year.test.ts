import { describe, expect, it } from 'vitest';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import { hourFlags } from '../../../src/engine/reduction/hour-flags.ts';
import { packedBytes } from '../../../src/engine/reduction/packed-columns.ts';
import { judgeYear } from '../../../src/engine/run/judge-year.ts';
import { briefHour, briefYear } from '../../../src/features/weather/brief-hour.ts';
import { hourWords, provenanceWords } from '../../../src/features/weather/record-hour-words.ts';
import { type RecordYear, recordYearOf } from '../../../src/features/weather/record-year.ts';
import { presetBrief } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const weatherYear = syntheticYear({
  utcOffsetMin: 120,
  at: (slot) => {
    if (slot === 12) return null;
    const summer = Math.cos((2 * Math.PI * slot) / 8760);
    const day = Math.cos((2 * Math.PI * ((slot % 24) - 14)) / 24);
    return { dryBulbC: 18 + 9 * summer + 8 * day, humidityRatio: 0.005 + 0.002 * summer, pressurePa: 88_900 };
  },
});

weatherYear.packed.flags[12] = hourFlags({ dryBulb: 'missing', humidity: 'missing', pressure: 'missing' });

/** As the server sends them: one column after another. */
function sent(): Uint8Array {
  const { dryBulb, humidityRatio, pressure, flags } = packedBytes(weatherYear.packed);
  return Uint8Array.from([...dryBulb, ...humidityRatio, ...pressure, ...flags]);
}

const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('the hours of a record', () => {
  const year: RecordYear = recordYearOf(sent());

  it('are those that were sent, with wet bulb and depression where all three values are known', () => {
    expect(year.packed).toEqual(weatherYear.packed);
    expect(year.meanPressurePa).toBe(88_900);
    expect([...year.depressionK.entries()].filter(([, valueK]) => Number.isNaN(valueK)).map(([slot]) => slot)).toEqual([
      12,
    ]);
  });

  it('are refused when the bytes are cut short', () => {
    expect(() => recordYearOf(sent().subarray(0, 7 * 8000))).toThrow(/no weather year/);
  });

  it('are read off in a sentence with values and where they come from', () => {
    expect(plain(hourWords(year, 13))).toMatch(
      /^1 Jan, 13:00 to 14:00: dry bulb [\d.]+ °C, wet bulb [\d.]+ °C, depression [\d.]+ K, relative humidity \d+ %\. Measured\.$/,
    );
    expect(plain(hourWords(year, 12))).toBe(
      '1 Jan, 12:00 to 13:00: dry bulb not known, wet bulb not known. Dry bulb missing, humidity missing, pressure missing.',
    );
  });

  it('say which of their values were repaired, estimated or are missing', () => {
    const flags = hourFlags({ dryBulb: 'measured', humidity: 'repaired', pressure: 'estimated' });
    expect(provenanceWords(flags)).toBe('Humidity repaired by a rule, pressure estimated.');
    expect(provenanceWords(hourFlags({ dryBulb: 'missing', humidity: 'missing', pressure: 'measured' }))).toBe(
      'Dry bulb missing, humidity missing.',
    );
  });
});

describe('an hour under a brief', () => {
  const columns = recordYearOf(sent());
  const brief = presetBrief('office');
  const place = { zone: 'Africa/Johannesburg', heightM: 1042, position: { latitude: -26.6, longitude: 20.6 } };
  const judged = briefYear({ brief, columns, year: weatherYear, place });

  it('has the class that the stored run of the same year has, every hour of it', () => {
    const run = judgeYear({
      year: weatherYear,
      brief,
      zone: place.zone,
      heightM: place.heightM,
      position: place.position,
    });
    const classes = (judged.rows ?? []).map(({ hourClass }) => hourClasses.indexOf(hourClass));
    expect(classes).toEqual([...run.hourClassCodes]);
  });

  it('comes with reason, lines from its outdoor air, and the room that the supply makes', () => {
    const slot = (judged.rows ?? []).findIndex(({ hourClass }) =>
      ['direct', 'indirect', 'twostage'].includes(hourClass),
    );
    const hour = briefHour(judged, columns, slot);
    expect(hour?.reason).toMatch(/cooling/);
    expect(hour?.outdoor.tempC).toBe(columns.dryBulbC[slot]);
    expect(hour?.lines.length).toBeGreaterThan(1);
    expect(hour?.room?.tempC).toBeLessThanOrEqual((hour?.setC ?? 0) + 0.01);
    expect(hour?.room?.humidityRatio).toBeGreaterThan(0.003);
  });

  it('is nothing where the weather is not known, and has no class before the station is settled', () => {
    expect(briefHour(judged, columns, 12)).toBeNull();
    const unsettled = briefYear({ brief, columns, year: weatherYear, place: null });
    expect(briefHour(unsettled, columns, 13)).toMatchObject({ hourClass: null, reason: null, room: null });
  });
});
