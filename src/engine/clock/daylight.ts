/**
 * Daylight of method 3: the centre of the sun above 0° without refraction at a slot's middle. Declination and equation of
 * time by Spencer 1971 (Fourier series representation of the position of the sun).
 */
import { HOURS_PER_DAY, SLOTS_PER_LEAP_YEAR } from '../conventions.ts';
import { floatColumn } from '../float-column.ts';

/** Degrees, north and east positive. */
export interface Position {
  readonly latitude: number;
  readonly longitude: number;
}

const DEGREES = Math.PI / 180;
const DAYS_PER_YEAR = 365;
/** Minutes per radian of the sun's daily turn, as Spencer's series is printed. */
const MIN_PER_RADIAN = 229.18;
const MIN_PER_DEGREE = 4;
const DEGREES_PER_HOUR = 15;

/**
 * Height of the centre of the sun over the horizon, degrees, without refraction.
 * @param input.slot slot of the year, 0 first
 * @param input.utcOffsetMin minutes that the slots' standard time is ahead of UTC
 */
export function solarAltitudeDeg(input: { slot: number; position: Position; utcOffsetMin: number }): number {
  const { slot, position, utcOffsetMin } = input;
  const minutesLate = (sun.equationOfTimeMin[slot] ?? 0) + MIN_PER_DEGREE * position.longitude - utcOffsetMin;
  const hourAngle = DEGREES * DEGREES_PER_HOUR * (hourOf(slot) + minutesLate / 60 - 12);
  const latitude = DEGREES * position.latitude;
  const sine =
    Math.sin(latitude) * (sun.sineOfDeclination[slot] ?? 0) +
    Math.cos(latitude) * (sun.cosineOfDeclination[slot] ?? 0) * Math.cos(hourAngle);
  return Math.asin(Math.min(Math.max(sine, -1), 1)) / DEGREES;
}

/** Middle of a slot, hours of its day. */
function hourOf(slot: number): number {
  return (slot % HOURS_PER_DAY) + 0.5;
}

/** Where the sun stands in the middle of each slot, whatever the place: many places ask for it. */
const sun = {
  sineOfDeclination: floatColumn(SLOTS_PER_LEAP_YEAR, (slot) => Math.sin(declinationRadians(dayAngleOf(slot)))),
  cosineOfDeclination: floatColumn(SLOTS_PER_LEAP_YEAR, (slot) => Math.cos(declinationRadians(dayAngleOf(slot)))),
  equationOfTimeMin: floatColumn(SLOTS_PER_LEAP_YEAR, (slot) => equationOfTimeMin(dayAngleOf(slot))),
};

function dayAngleOf(slot: number): number {
  const dayOfYear = Math.floor(slot / HOURS_PER_DAY) + 1;
  return (2 * Math.PI * (dayOfYear - 1 + (hourOf(slot) - 12) / 24)) / DAYS_PER_YEAR;
}

function declinationRadians(angle: number): number {
  return (
    0.006918 -
    0.399912 * Math.cos(angle) +
    0.070257 * Math.sin(angle) -
    0.006758 * Math.cos(2 * angle) +
    0.000907 * Math.sin(2 * angle) -
    0.002697 * Math.cos(3 * angle) +
    0.00148 * Math.sin(3 * angle)
  );
}

function equationOfTimeMin(angle: number): number {
  return (
    MIN_PER_RADIAN *
    (0.000075 +
      0.001868 * Math.cos(angle) -
      0.032077 * Math.sin(angle) -
      0.014615 * Math.cos(2 * angle) -
      0.040849 * Math.sin(2 * angle))
  );
}
