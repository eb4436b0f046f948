import { describe, expect, test } from 'vitest';
import type { Brief } from '#engine/brief/brief.ts';
import { humidityRatioFromRelativeHumidity } from '#engine/psychrometrics/moist-air.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import type { ReportedHours } from '#engine/run/run-result.ts';
import { startReports } from '#engine/run/tally-reported.ts';
import { presetBrief } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

interface Supplied {
  readonly supplyC: number;
  readonly supplyRatio: number;
  readonly supplyAimC: number;
  readonly loadFraction: number;
  readonly pressurePa: number;
}

/** What is counted of some hours, which come in blocks of one. */
function reportOf(brief: Brief, hours: readonly Supplied[]): ReportedHours[] {
  const reports = startReports(brief);
  for (const hour of hours) {
    reports?.add({
      count: 1,
      supplyC: Float64Array.of(hour.supplyC),
      supplyRatio: Float64Array.of(hour.supplyRatio),
      supplyAimC: Float64Array.of(hour.supplyAimC),
      loadFraction: Float64Array.of(hour.loadFraction),
      pressurePa: Float64Array.of(hour.pressurePa),
    });
  }
  return reports?.ofYear() ?? [];
}

/** Supply whose room, 5 K warmer, is at 26 °C with this relative humidity, %, before its own moisture. */
function supplyFor(roomPct: number, supplyRatio?: null): Supplied {
  const room = { dryBulbC: 26, relativeHumidityPct: roomPct, pressurePa: 101325, belowZero: 'water' } as const;
  const ratio = supplyRatio === null ? Number.NaN : humidityRatioFromRelativeHumidity(room);
  return { supplyC: 21, supplyRatio: ratio, supplyAimC: 21, loadFraction: 1, pressurePa: 101325 };
}

const clinic = presetBrief('clinic', { dwRoomKgKg: 0 });

describe('what a brief asks to have reported', () => {
  test('lower humidity limits count hours of the room and make no class; a tie is not under', () => {
    const hours = [supplyFor(39.98), supplyFor(40), supplyFor(60), supplyFor(20)];
    expect(reportOf(clinic, hours)).toEqual([{ what: 'room under 40 % relative humidity', hours: 2 }]);
  });

  test('a supply that is colder than asked is taken as mixed up to what is asked', () => {
    const cold = { ...supplyFor(39.98), supplyC: 10 };
    expect(reportOf(clinic, [cold])[0]?.hours).toBe(1);
  });

  test('of a hall is not counted: its humidity is its own', () => {
    const hall = presetBrief('hall-allowable');
    expect(reportOf(hall, [supplyFor(30, null)])).toEqual([
      { what: 'supply under 8 % relative humidity', hours: null },
    ]);
  });

  test('the presets’ own texts are read, another is said not to be counted', () => {
    // Saturation at 26 °C is 3.363 kPa (ASHRAE Fundamentals 2017 ch. 1 eq. 6): 94.1 % leaves 0.2 kPa, 58.4 % leaves 1.4.
    const hours = [supplyFor(96), supplyFor(80), supplyFor(50)];
    const brief = presetBrief('glasshouse', {
      dTroomK: 5,
      dwRoomKgKg: 0,
      reported: [...presetBrief('glasshouse').reported, 'noise'],
    });
    expect(reportOf(brief, hours)).toEqual([
      { what: 'vapour pressure deficit below 0.2 kPa', hours: 1 },
      { what: 'vapour pressure deficit above 1.4 kPa', hours: 1 },
      { what: 'noise', hours: null },
    ]);
  });

  test('comes with every run: a dairy counts its hours over 68, at least those over 72', () => {
    const year = syntheticYear({ at: (slot) => ({ dryBulbC: 18 + (slot % 24), humidityRatio: 0.009 }) });
    const { reported, ledger } = judgeYear({ year, brief: presetBrief('dairy'), zone: 'UTC', heightM: 0 });
    expect(reported.map(({ what }) => what)).toEqual(['THI over 68']);
    expect(reported[0]?.hours).toBeGreaterThanOrEqual(ledger.demand - ledger.met);
    expect(judgeYear({ year, brief: presetBrief('office'), zone: 'UTC', heightM: 0 }).reported).toEqual([]);
  });
});
