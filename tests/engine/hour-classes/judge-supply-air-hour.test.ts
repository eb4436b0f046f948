import { describe, expect, test } from 'vitest';
import type { Brief } from '#engine/brief/brief.ts';
import type { HourJudgement } from '#engine/hour-classes/demand-hour.ts';
import { judgeSupplyAirHour } from '#engine/hour-classes/judge-supply-air-hour.ts';
import { humidityRatioFromRelativeHumidity, volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';
import { presetBrief } from '../../support/presets.ts';
import { hourUnder } from './random-hours.ts';

/** The office with fans that heat nothing: supply must reach 21 °C, and numbers can be followed by hand. */
const office = presetBrief('office', {
  fanWPerLs: { air: 0, direct: 0, indirect: 0, dewpoint: 0, twostage: 0, returnAir: 0 },
});

function judge(dryBulbC: number, relativeHumidityPct: number, changes: Partial<Brief> = {}): HourJudgement {
  const pressurePa = 101325;
  const brief = { ...office, ...changes };
  const state = { dryBulbC, relativeHumidityPct, pressurePa, belowZero: 'water' } as const;
  const humidityRatio = humidityRatioFromRelativeHumidity(state);
  const volume = volumeM3PerKg(dryBulbC, humidityRatio, pressurePa);
  return judgeSupplyAirHour(hourUnder(brief, { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volume }), brief);
}

describe('the first match wins', () => {
  test('20 °C outside meets a supply of 21 °C: air', () => {
    expect(judge(20, 50)).toMatchObject({ hourClass: 'air', met: true, running: 'air', shortfallK: 0 });
  });

  test('21.00 °C outside is a tie and met, 21.01 °C is not', () => {
    expect(judge(21, 40).hourClass).toBe('air');
    expect(judge(21.004, 40).hourClass).toBe('air');
    expect(judge(21.01, 40).hourClass).toBe('direct');
  });

  test('warm and dry is met by the direct stage at the x that just reaches the supply', () => {
    const { hourClass, supply, aloneMet } = judge(30, 25);
    expect(hourClass).toBe('direct');
    expect(supply.tempC).toBeCloseTo(21, 9);
    expect(supply.share).toBeGreaterThan(0);
    expect(supply.share).toBeLessThan(1);
    expect(aloneMet).toEqual(['direct', 'twostage']);
  });

  test('the order of the stages is the brief’s', () => {
    expect(judge(30, 25, { stages: ['twostage', 'direct'] }).hourClass).toBe('twostage');
  });

  test('on-off control wets in full', () => {
    const { hourClass, supply } = judge(30, 25, { control: 'on-off' });
    expect(hourClass).toBe('direct');
    expect(supply.share).toBe(1);
    expect(supply.tempC).toBeLessThan(21);
  });

  test('hotter than the direct stage can bring down needs two stages', () => {
    expect(judge(38, 20)).toMatchObject({ hourClass: 'twostage', met: true });
  });

  test('moist outdoor air breaks the room cap where the room is held, even when it is cool: damp by the outside', () => {
    expect(judge(30, 80)).toMatchObject({ hourClass: 'damp', dampBy: 'outside', met: false, running: 'air' });
    expect(judge(20, 100)).toMatchObject({ hourClass: 'damp', dampBy: 'outside' });
  });

  test('cold enough only by too much moisture is damp by the plant', () => {
    const direct = judge(25, 60, { stages: ['direct'] });
    expect(direct).toMatchObject({ hourClass: 'damp', dampBy: 'plant', met: false });
    expect(judge(25, 60, { stages: ['direct'], caps: {} }).hourClass).toBe('direct');
  });

  test('a stage that gains at least 1 K within the caps but misses is short, and runs where it comes nearest', () => {
    const { hourClass, shortfallK, running, supply } = judge(45, 20);
    expect(hourClass).toBe('short');
    expect(running).toBe('twostage');
    expect(shortfallK).toBeCloseTo(supply.tempC - 21, 9);
  });

  test('without a stage that helps, the hour is beyond and outdoor air runs', () => {
    const { hourClass, shortfallK, running } = judge(27, 30, { stages: [] });
    expect([hourClass, running]).toEqual(['beyond', 'air']);
    expect(shortfallK).toBeCloseTo(6, 9);
  });

  test('gaining 1.00 K is short and 0.99 K is beyond', () => {
    const effFor = (gainK: number): Partial<Brief> => ({ stages: ['indirect'], effIndirect: gainK / depressionK });
    const full = judge(40, 20, { stages: ['indirect'], effIndirect: 1, caps: {} });
    const depressionK = 40 - 21 - full.shortfallK;
    expect(judge(40, 20, effFor(1)).hourClass).toBe('short');
    expect(judge(40, 20, effFor(0.99)).hourClass).toBe('beyond');
  });

  test('at the freeze lockout wet parts are drained: frozen, met when outdoor air alone reaches the supply', () => {
    const cold = { freezeLockoutC: 25 };
    expect(judge(20, 50, cold)).toMatchObject({ hourClass: 'frozen', met: true, running: 'air' });
    expect(judge(25, 20, cold)).toMatchObject({ hourClass: 'frozen', met: false, running: 'air' });
    expect(judge(25.01, 20, cold).hourClass).toBe('direct');
  });
});

describe('a wet stage may be tried only', () => {
  test('from the cut-in depression on', () => {
    const depressed = { stages: ['direct'] as const, caps: {}, limit: { kind: 'fixed', tempC: 27 } as const };
    expect(judge(23, 70, depressed).hourClass).toBe('direct');
    expect(judge(23, 70, { ...depressed, cutInDepressionK: 6 }).hourClass).toBe('beyond');
  });

  test('when outdoor air would make the room as warm as its start temperature', () => {
    expect(judge(30, 25, { startRoomTempC: 35 }).hourClass).toBe('direct');
    expect(judge(30, 25, { startRoomTempC: 35.01 }).hourClass).toBe('beyond');
  });

  test('up to the ceiling of outdoor relative humidity', () => {
    expect(judge(30, 25, { maxOutdoorRhPct: 25 }).hourClass).toBe('direct');
    expect(judge(30, 25, { maxOutdoorRhPct: 24.9 }).hourClass).toBe('beyond');
  });
});

describe('the shortfall', () => {
  test('within a cap is that of the lowest supply that keeps it', () => {
    const capped = judge(25, 60, { stages: ['direct'] });
    const uncapped = judge(25, 60, { stages: ['direct'], caps: {} });
    expect(uncapped.shortfallK).toBe(0);
    expect(capped.shortfallK).toBeGreaterThan(0);
    expect(capped.uncappedShortfallK).toBe(0);
    expect(capped.shortfallK).toBeLessThan(25 - 21);
  });

  test('without any state in the caps is that of outdoor air', () => {
    expect(judge(30, 95, { caps: { supplyDewPointC: 10 } }).shortfallK).toBeCloseTo(9, 9);
  });

  test('of a linear load asks for a warmer supply at part load', () => {
    const outdoor = { dryBulbC: 23, humidityRatio: 0.006, pressurePa: 101325, volumeM3PerKg: 0.85 };
    expect(judgeSupplyAirHour(hourUnder(office, outdoor, 1), office).hourClass).toBe('direct');
    expect(judgeSupplyAirHour(hourUnder(office, outdoor, 0.5), office).hourClass).toBe('air');
  });
});
