import { describe, expect, test } from 'vitest';
import { clockOfBrief } from '#engine/clock/clock-of-brief.ts';
import { solarAltitudeDeg } from '#engine/clock/daylight.ts';
import { openSlots } from '#engine/clock/open-slots.ts';
import { presetBrief } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const glasshouse = presetBrief('glasshouse');
const year = syntheticYear({ at: () => ({ dryBulbC: 20, humidityRatio: 0.008 }) });

function openHoursOf(position: { latitude: number; longitude: number }, utcOffsetMin = 0, changes = {}): Uint8Array {
  const brief = { ...glasshouse, ...changes };
  return openSlots(brief, clockOfBrief({ year: { ...year, utcOffsetMin }, brief, zone: 'UTC', position }));
}

function count(open: Uint8Array, fromDay = 0, toDay = 365): number {
  return open.subarray(fromDay * 24, toDay * 24).reduce((sum, value) => sum + value, 0);
}

/** Days of the year, 0 first. */
const MARCH_20 = 78;
const JUNE_21 = 171;
const DECEMBER_21 = 354;

describe('the height of the sun', () => {
  function noonAltitude(day: number, latitude: number): number {
    const hours = Array.from({ length: 24 }, (_, hour) => day * 24 + hour);
    const altitudes = hours.map((slot) =>
      solarAltitudeDeg({ slot, position: { latitude, longitude: 0 }, utcOffsetMin: 0 }),
    );
    return Math.max(...altitudes);
  }

  test('over the pole is the declination: 23.4° at the solstices, 0° at the equinox (definition)', () => {
    expect(Math.abs(noonAltitude(JUNE_21, 90) - 23.44)).toBeLessThan(0.1);
    expect(Math.abs(noonAltitude(DECEMBER_21, -90) - 23.44)).toBeLessThan(0.1);
    expect(Math.abs(noonAltitude(MARCH_20, 90))).toBeLessThan(0.5);
  });

  test('is the same at mirrored hours but for the equation of time, 16 min early in November, 14 late in February (from memory)', () => {
    // The sun stands highest 4 min later for each degree to the west; the longitude that levels 11:30 and 12:30 tells by
    // how much noon by the sun differs from noon by the clock.
    const levelAt = (day: number): number => {
      const tilt = (longitude: number): number =>
        solarAltitudeDeg({ slot: day * 24 + 11, position: { latitude: 0, longitude }, utcOffsetMin: 0 }) -
        solarAltitudeDeg({ slot: day * 24 + 12, position: { latitude: 0, longitude }, utcOffsetMin: 0 });
      let low = -10;
      let high = 10;
      while (high - low > 1e-6) {
        const middle = (low + high) / 2;
        if (tilt(middle) < 0) low = middle;
        else high = middle;
      }
      return low * -4;
    };
    expect(Math.abs(levelAt(306) - 16.4)).toBeLessThan(0.5);
    expect(Math.abs(levelAt(42) + 14.2)).toBeLessThan(0.5);
  });
});

describe('a schedule of daylight', () => {
  test('at the equator opens 12 slots every day', () => {
    expect(count(openHoursOf({ latitude: 0, longitude: 0 }))).toBe(365 * 12);
  });

  test('in the far north opens every slot of the summer solstice and none of the winter one', () => {
    const open = openHoursOf({ latitude: 80, longitude: 0 });
    expect(count(open, JUNE_21, JUNE_21 + 1)).toBe(24);
    expect(count(open, DECEMBER_21, DECEMBER_21 + 1)).toBe(0);
  });

  test('follows the place, not the clock of the file: 90° to the east the day begins six hours earlier', () => {
    const greenwich = openHoursOf({ latitude: 40, longitude: 0 });
    const east = openHoursOf({ latitude: 40, longitude: 90 });
    const eastInItsZone = openHoursOf({ latitude: 40, longitude: 90 }, 360);
    expect(count(east.subarray(0, 8760 - 6))).toBeGreaterThan(4000);
    const shifted = greenwich.subarray(6 + 24).filter((value, slot) => value !== east[slot + 24]).length;
    // The declination moves on in six hours, so that a few slots at the edge of the day differ.
    expect(shifted).toBeLessThan(40);
    expect(greenwich.filter((value, slot) => value !== eastInItsZone[slot]).length).toBeLessThan(40);
  });

  test('keeps to the months of the brief', () => {
    const july = openHoursOf({ latitude: 45, longitude: 0 }, 0, { months: [7] });
    expect(count(july)).toBe(count(july, 181, 212));
    expect(count(july)).toBeGreaterThan(31 * 14);
  });

  test('is part of the clock that a run is keyed by, and only there', () => {
    const at = { year, zone: 'UTC', position: { latitude: 1, longitude: 2 } };
    expect(clockOfBrief({ ...at, brief: glasshouse }).daylightAt).toEqual({ latitude: 1, longitude: 2 });
    expect(clockOfBrief({ ...at, brief: presetBrief('office') })).not.toHaveProperty('daylightAt');
  });
});
