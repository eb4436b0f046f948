import { describe, expect, test } from 'vitest';
import { type RuleName, ruleNames } from '#engine/weather-files/quality/quality-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { type EpwDate, type EpwHour, type EpwOptions, epwBytes, plainHour } from '../../../support/epw-text.ts';
import { faultyFindings, findingsOf, readUsable, remarkable } from '../../../support/readings.ts';

/**
 * The limits are those of the tests' docstrings: HadISD (Dunn et al. 2012 and 2016) for persistence, spikes and records, MADIS
 * and the WMO tolerances of 1993 for steps; what is marked there as ours is ours. The default weather runs in tenths of a degree.
 */
const FIRST_LINE = 9;

/** A year of the default weather with some hours changed; a change gets the plain values of its hour. */
function year(changes: (date: EpwDate, plain: ReturnType<typeof plainHour>) => EpwHour | null): EpwOptions {
  return { hour: (date) => changes(date, plainHour(date)) ?? {} };
}

const at = (slot: number, hours = 1) => ({
  line: slot + FIRST_LINE,
  lastLine: slot + hours - 1 + FIRST_LINE,
  count: hours,
});
const within = (slot: number, first: number, hours: number) => slot >= first && slot < first + hours;
const tenths = (value: number) => Math.round(10 * value) / 10;
const dryAt = (reading: UsableReading, slot: number) => reading.hours.dryBulbC[slot] ?? Number.NaN;
const isMissing = (reading: UsableReading, slot: number) => Number.isNaN(dryAt(reading, slot));

function withRulesOff(options: EpwOptions, rulesOff: readonly RuleName[]): UsableReading {
  const reading = readWeatherFile(epwBytes(options), 'made-up.epw', { rulesOff });
  if (reading.status === 'refused' || reading.hours === null) throw new Error('not read');
  return reading;
}

describe('a step of the dry bulb', () => {
  const high = (riseK: number) =>
    year(({ slot }, plain) => (within(slot, 300, 5) ? { dryBulbC: tenths(plain.dryBulbC + riseK) } : null));

  test('of 20 K and more fails, the hours after it that are as far from the last good one too', () => {
    const reading = readUsable(high(24));
    expect(findingsOf(reading, 'step')).toEqual([
      expect.objectContaining({ severity: 'doubt', variable: 'dry bulb', done: 'left out', ...at(300, 5) }),
    ]);
    // Five hours are a short gap: they are filled between their neighbours.
    expect(reading.hours.flags[302]).toBe(2);
    expect(dryAt(reading, 302)).toBeLessThan(25);
  });

  test('of 12 to under 20 K is a note, and the values stay', () => {
    const reading = readUsable(high(15));
    const [rise, fall] = findingsOf(reading, 'step');
    expect([rise?.severity, rise?.line, fall?.line]).toEqual(['note', 309, 314]);
    expect(dryAt(reading, 302)).toBeCloseTo(dryAt(readUsable({}), 302) + 15, 6);
  });

  test('of 12 to under 20 K is a doubt where a second test fails the same hour', () => {
    const reading = readUsable(
      year(({ slot }, plain) =>
        within(slot, 4100, 5)
          ? { dryBulbC: tenths(plain.dryBulbC - 15), dewPointC: tenths(plain.dryBulbC - 14), relativeHumidityPct: '' }
          : null,
      ),
    );
    expect(findingsOf(reading, 'step').map(({ severity }) => severity)).toContain('doubt');
  });

  test('that falls while the air turns moister and does not return within 3 hours is an outflow and kept, whatever its size', () => {
    const storm = (hours: number) =>
      year(({ slot }, plain) =>
        within(slot, 4095, hours)
          ? { dryBulbC: tenths(plain.dryBulbC - 21), dewPointC: tenths(plain.dewPointC + 2) }
          : null,
      );
    const kept = readUsable(storm(9));
    expect(findingsOf(kept, 'step')[0]).toMatchObject({ severity: 'note', done: 'kept', line: 4104 });
    expect(findingsOf(kept, 'step')[0]?.message).toContain('outflow');
    expect(isMissing(kept, 4096)).toBe(false);
    // Two hours are a return: no storm lets go so soon.
    expect(findingsOf(readUsable(storm(2)), 'step').some(({ severity }) => severity === 'doubt')).toBe(true);
  });

  test('across the joint of two months of a typical year is none, but it is one in an actual year', () => {
    const joint = 31 * 24;
    const cold = (sameYear: boolean) =>
      year(({ slot }, plain) => ({
        ...(sameYear ? { year: 2017 } : {}),
        ...(slot < joint ? { dryBulbC: tenths(plain.dryBulbC - 25), dewPointC: -30 - (slot % 7) } : {}),
      }));
    expect(findingsOf(readUsable(cold(false)), 'step')).toEqual([]);
    expect(findingsOf(readUsable(cold(true)), 'step').length).toBeGreaterThan(0);
  });
});

describe('straight lines', () => {
  /** From 70 °C at one hour on a straight line back to the weather, as a source fills a gap from a bad value. */
  const ramp = (hours: number, dewStays = false) =>
    year(({ slot }, plain) => {
      if (!within(slot, 4100, hours)) return null;
      const share = (slot - 4100) / hours;
      const dew = dewStays ? plain.dewPointC + (slot % 2) : 20 - 10 * share;
      return { dryBulbC: tenths(70 - share * 40), dewPointC: tenths(dew) };
    });

  test('of dry bulb and dew point together that begin at an impossible value are missing to their end', () => {
    const reading = readUsable(ramp(8));
    expect(findingsOf(reading, 'straight-line')).toEqual([
      expect.objectContaining({ severity: 'doubt', variable: 'every value', line: 4109, done: 'left out' }),
    ]);
    for (let slot = 4100; slot < 4107; slot++) expect(isMissing(reading, slot), String(slot)).toBe(true);
    expect(isMissing(reading, 4109)).toBe(false);
  });

  test('of the dry bulb alone, or of fewer than 5 hours, are none', () => {
    expect(findingsOf(readUsable(ramp(8, true)), 'straight-line')).toEqual([]);
    expect(findingsOf(readUsable(ramp(4)), 'straight-line')).toEqual([]);
  });

  test('that join no failed value are kept: most sources fill their gaps so', () => {
    const line = year(({ slot }) =>
      within(slot, 300, 12)
        ? { dryBulbC: tenths(14 + 0.4 * (slot - 300)), dewPointC: tenths(5 + 0.1 * (slot - 300)) }
        : null,
    );
    expect(remarkable(readUsable(line))).toEqual([]);
  });
});

describe('stuck values', () => {
  const stuck = (hours: number, hour: EpwHour) =>
    year(({ slot }, plain) =>
      within(slot, 4000, hours) ? { dewPointC: tenths(plain.dewPointC + (slot % 2)), ...hour } : null,
    );

  test.each([
    ['dryBulbC', 24],
    ['dewPointC', 48],
  ] as const)('%s in tenths of a degree fails after %d hours and is missing', (column, longest) => {
    const value = { dryBulbC: 31.34, dewPointC: 11.34 }[column];
    expect(findingsOf(readUsable(stuck(longest - 1, { [column]: value })), 'stuck')).toEqual([]);
    const reading = readUsable(stuck(longest, { [column]: value }));
    expect(findingsOf(reading, 'stuck')).toEqual([
      expect.objectContaining({ severity: 'doubt', done: 'left out', ...at(4000, longest) }),
    ]);
    expect(Number.isNaN(reading.hours.humidityRatio[4010])).toBe(true);
  });

  test('in a file of whole degrees last longer: 40 hours of dry bulb, 80 of dew point, which from 48 is told and kept', () => {
    const whole = (hours: number, column: 'dryBulbC' | 'dewPointC') =>
      year(({ slot }, plain) => ({
        dryBulbC: Math.round(plain.dryBulbC + (slot % 2)),
        dewPointC: Math.round(plain.dewPointC - (slot % 2)),
        ...(within(slot, 4000, hours) ? { [column]: { dryBulbC: 47, dewPointC: 16 }[column] } : {}),
      }));
    expect(findingsOf(readUsable(whole(39, 'dryBulbC')), 'stuck')).toEqual([]);
    expect(findingsOf(readUsable(whole(40, 'dryBulbC')), 'stuck')[0]).toMatchObject({ done: 'left out', count: 40 });
    expect(findingsOf(readUsable(whole(47, 'dewPointC')), 'stuck')).toEqual([]);
    const kept = readUsable(whole(60, 'dewPointC'));
    expect(findingsOf(kept, 'stuck')[0]).toMatchObject({ severity: 'doubt', done: 'kept', count: 60 });
    expect(isMissing(kept, 4010)).toBe(false);
    expect(findingsOf(readUsable(whole(80, 'dewPointC')), 'stuck')[0]).toMatchObject({ done: 'left out', count: 80 });
  });

  test('together, dry bulb, dew point and relative humidity, fail after 12 hours', () => {
    const together = (hours: number) => stuck(hours, { dryBulbC: 31.3, dewPointC: 11.3, relativeHumidityPct: 29 });
    expect(findingsOf(readUsable(together(11)), 'stuck')).toEqual([]);
    expect(findingsOf(readUsable(together(12)), 'stuck')).toEqual([
      expect.objectContaining({ variable: 'every value', done: 'left out', ...at(4000, 12) }),
    ]);
  });

  test('are counted in hours where a file has several records an hour', () => {
    const twice = (hours: number) => ({ ...stuck(hours, { dryBulbC: 31.34 }), recordsPerHour: 2 });
    expect(findingsOf(readUsable(twice(23)), 'stuck')).toEqual([]);
    expect(findingsOf(readUsable(twice(24)), 'stuck')).toEqual([
      expect.objectContaining({ variable: 'dry bulb', done: 'left out', count: 24 }),
    ]);
  });

  test('at the same hour of 15 days in a row are missing', () => {
    const daily = (days: number) =>
      year(({ slot, hour }) => (within(slot, 3960, 24 * days) && hour === 3 ? { dryBulbC: 27.7 } : null));
    expect(findingsOf(readUsable(daily(14)), 'stuck')).toEqual([]);
    const reading = readUsable(daily(15));
    expect(findingsOf(reading, 'stuck')).toEqual([expect.objectContaining({ count: 15, variable: 'dry bulb' })]);
    expect(findingsOf(reading, 'stuck')[0]?.message).toContain('at the same hour of 15 days in a row');
  });

  test('of whole days that repeat the day before are missing: 5 days of dry bulb, 2 of dew point', () => {
    const first = 3648;
    const repeated = (days: number, column: 'dryBulbC' | 'dewPointC') =>
      year(({ slot, hour, month }) => {
        if (!within(slot, first, 24 * days)) return null;
        const plain = plainHour({ slot: first + hour - 1, month, day: 1, hour });
        return { [column]: tenths(plain[column] + (column === 'dewPointC' ? hour / 10 : 0)) };
      });
    expect(findingsOf(readUsable(repeated(4, 'dryBulbC')), 'stuck')).toEqual([]);
    expect(findingsOf(readUsable(repeated(5, 'dryBulbC')), 'stuck')).toEqual([
      expect.objectContaining({ variable: 'dry bulb', ...at(first, 120) }),
    ]);
    expect(findingsOf(readUsable(repeated(2, 'dewPointC')), 'stuck')).toEqual([
      expect.objectContaining({ variable: 'dew point', ...at(first, 48) }),
    ]);
  });

  test('a 29 February that copies the 28th is a note and kept', () => {
    const leap = 59 * 24;
    const reading = readUsable({
      slots: 8784,
      hour: (date) => (within(date.slot, leap, 24) ? plainHour({ ...date, slot: date.slot - 24 }) : {}),
    });
    expect(findingsOf(reading, 'stuck')).toEqual([]);
    expect(findingsOf(reading, 'leap-day').map(({ severity }) => severity)).toContain('note');
    expect(reading.gaps.missing.every((hours) => hours === 0)).toBe(true);
  });
});

describe('a spike', () => {
  const spike = (hours: number, jumpK: number, column: 'dryBulbC' | 'dewPointC' = 'dryBulbC', first = 4100) =>
    year(({ slot }, plain) => (within(slot, first, hours) ? { [column]: tenths(plain[column] + jumpK) } : null));

  test.each([1, 2, 3])('of %d hours is missing and filled as a short gap', (hours) => {
    const reading = readUsable(spike(hours, -16, 'dewPointC'));
    expect(findingsOf(reading, 'spike')).toEqual([
      expect.objectContaining({ severity: 'repair', variable: 'dew point', ...at(4100, hours) }),
    ]);
    expect(reading.hours.flags[4100]).toBe(2 << 2);
  });

  test('of 4 hours, of under 6 K, or between hours that do not agree, is none', () => {
    expect(findingsOf(readUsable(spike(4, -16, 'dewPointC')), 'spike')).toEqual([]);
    expect(findingsOf(readUsable(spike(1, -5.5, 'dewPointC')), 'spike')).toEqual([]);
    const turn = year(({ slot }, plain) =>
      slot === 4100
        ? { dewPointC: tenths(plain.dewPointC - 16) }
        : slot > 4100
          ? { dewPointC: tenths(plain.dewPointC + 4) }
          : null,
    );
    expect(findingsOf(readUsable(turn), 'spike')).toEqual([]);
  });

  test('in a month in which the dry bulb changes fast has to stand out of its changes', () => {
    // Hour by hour 2 K up and 2 K down over the plain weather: the middle half of the changes is 4 K wide, so 6 times it is 24 K.
    const restless = year(({ slot }, plain) => ({
      dryBulbC: tenths(plain.dryBulbC + (slot % 2 === 0 ? 1 : -1) + (slot === 300 ? 15 : 0)),
    }));
    expect(findingsOf(readUsable(restless), 'spike')).toEqual([]);
    expect(findingsOf(readUsable(spike(1, 15, 'dryBulbC', 300)), 'spike')).toHaveLength(1);
  });
});

describe('other tests of the hours', () => {
  test('zeros for 2 hours and more stand for nothing, but fog at 0 °C is weather', () => {
    const zeros = (relativeHumidityPct: number | string, hours: number) =>
      year(({ slot }) => (within(slot, 300, hours) ? { dryBulbC: 0, dewPointC: 0, relativeHumidityPct } : null));
    expect(findingsOf(readUsable(zeros(0, 2)), 'zero-fill')).toEqual([
      expect.objectContaining({ severity: 'doubt', done: 'left out', ...at(300, 2) }),
    ]);
    expect(findingsOf(readUsable(zeros(0, 1)), 'zero-fill')).toEqual([]);
    expect(findingsOf(readUsable(zeros(100, 2)), 'zero-fill')).toEqual([]);
    // Without a relative humidity the hours around decide: here they are far from 0 °C.
    expect(findingsOf(readUsable(zeros('', 2)), 'zero-fill')).toHaveLength(1);
  });

  test('a relative humidity of 0 beside a pressure of 0 is a row of zeros, whatever its temperatures', () => {
    const zeros = year(({ slot }) => (within(slot, 300, 3) ? { relativeHumidityPct: 0, pressurePa: 0 } : null));
    expect(findingsOf(readUsable(zeros), 'zero-fill')).toEqual([expect.objectContaining(at(300, 3))]);
  });

  test('a block from another climate is missing, though no step leads to it', () => {
    const slide = (slot: number) => Math.min(10, slot - 4100, 4160 - slot);
    const block = year(({ slot }, plain) =>
      within(slot, 4100, 60)
        ? { dryBulbC: tenths(plain.dryBulbC - 11 * Math.max(0, slide(slot))), dewPointC: -99, relativeHumidityPct: '' }
        : null,
    );
    const found = findingsOf(readUsable(block), 'other-climate');
    expect(found[0]).toMatchObject({ severity: 'doubt', variable: 'dry bulb', done: 'left out' });
  });

  test('a dry bulb beyond the record of its continent is a doubt, and used', () => {
    const hot = (location: string) =>
      readUsable({
        location,
        hour: (date) => (date.slot === 4815 ? { dryBulbC: plainHour(date).dryBulbC + 11.5 } : {}),
      });
    const spain = hot('Made-up Field,-,Nowhere,Invented,-,38.0,-4.0,1.0,337.0');
    expect(findingsOf(spain, 'range')).toEqual([
      expect.objectContaining({ severity: 'doubt', done: 'kept', line: 4824, count: 1 }),
    ]);
    expect(findingsOf(spain, 'range')[0]?.message).toContain('record of Europe, -58.1 to 48 °C');
    expect(dryAt(spain, 4815)).toBeGreaterThan(48);
    expect(findingsOf(hot('Made-up Field,-,Nowhere,Invented,-,33.45,-111.98,-7.0,337.0'), 'range')).toEqual([]);
  });

  test('a month of saw-tooth dew points loses its humidity, and 2 % of jumps are borne', () => {
    const teeth = (every: number) =>
      year(({ slot, month }, plain) =>
        month === 5 && slot % every === 0 ? { dewPointC: tenths(plain.dewPointC - 11), relativeHumidityPct: 20 } : null,
      );
    const reading = withRulesOff(teeth(24), ['spike']);
    const [found] = findingsOf(reading, 'saw-tooth');
    expect(found).toMatchObject({ severity: 'doubt', variable: 'humidity', done: 'left out', count: 744 });
    expect(found?.message).toContain('in May');
    expect(reading.hours.humidityRatio.filter((ratio) => Number.isNaN(ratio))).toHaveLength(744);
    // 7 teeth are 14 jumps, 1.9 % of the 744 hours.
    expect(findingsOf(withRulesOff(teeth(104), ['spike']), 'saw-tooth')).toEqual([]);
  });
});

describe('the tests as a whole', () => {
  const faults = year(({ slot, month }, plain) => {
    if (within(slot, 300, 2)) return { dryBulbC: 0, dewPointC: 0, relativeHumidityPct: 0 };
    if (within(slot, 1000, 30)) return { dryBulbC: 18.4 };
    if (slot === 2000) return { dewPointC: tenths(plain.dewPointC - 16) };
    if (within(slot, 3000, 4)) return { dryBulbC: tenths(plain.dryBulbC + 24) };
    if (within(slot, 5000, 8))
      return { dryBulbC: tenths(70 - 5 * (slot - 5000)), dewPointC: tenths(20 - (slot - 5000)) };
    if (slot === 6000) return { pressurePa: 60_000 };
    if (month === 11 && slot % 12 === 0) return { dewPointC: tenths(plain.dewPointC - 11), relativeHumidityPct: 20 };
    return null;
  });

  test('find each fault once, in whole sentences, and leave the plain weather alone', () => {
    const reading = readUsable(faults);
    const codes = new Set(reading.findings.map(({ code }) => code));
    for (const code of ['zero-fill', 'stuck', 'spike', 'step', 'range', 'straight-line', 'pressure-range'] as const) {
      expect(codes.has(code), code).toBe(true);
    }
    expect(faultyFindings(reading)).toEqual([]);
    expect(remarkable(readUsable({}))).toEqual([]);
  });

  test('can each be switched off: what is off finds nothing, and the values stand', () => {
    for (const rule of ruleNames) {
      const codes = withRulesOff(faults, [rule]).findings.map(({ code, severity }) => `${code} ${severity}`);
      // What no weather reaches is left out whatever is off.
      if (rule !== 'range')
        expect(
          codes.filter((code) => code.startsWith(`${rule} `)),
          rule,
        ).toEqual([]);
    }
    const asItStands = withRulesOff(faults, ruleNames);
    expect(dryAt(asItStands, 1010)).toBe(18.4);
    expect(dryAt(asItStands, 300)).toBe(0);
    expect(asItStands.hours.pressurePa[6000]).toBe(60_000);
    expect(remarkable(asItStands).filter((text) => !text.startsWith('time-gap'))).toEqual(['range doubt']);
  });

  test('an hour that an earlier test has left out counts for no later one', () => {
    // 30 stuck hours of which 10 are beyond the range: 20 remain, and 24 would fail.
    const mixed = year(({ slot }, plain) =>
      within(slot, 4000, 30) ? { dryBulbC: slot % 3 === 0 ? 75 : 33.3, dewPointC: plain.dewPointC } : null,
    );
    expect(findingsOf(readUsable(mixed), 'stuck')).toEqual([]);
  });
});
