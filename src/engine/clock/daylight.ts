/**
 * Daylight of method 3: the centre of the sun above 0° without refraction at a slot's middle. Declination and equation of
 * time by Spencer 1971 (Fourier series representation of the position of the sun).
 */
import { HOURS_PER_DAY } from '../conventions.ts';

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
  const dayOfYear = Math.floor(slot / HOURS_PER_DAY) + 1;
  const hour = (slot % HOURS_PER_DAY) + 0.5;
  const dayAngle = (2 * Math.PI * (dayOfYear - 1 + (hour - 12) / 24)) / DAYS_PER_YEAR;
  const declination = declinationRadians(dayAngle);
  const minutesLate = equationOfTimeMin(dayAngle) + MIN_PER_DEGREE * position.longitude - utcOffsetMin;
  const hourAngle = DEGREES * DEGREES_PER_HOUR * (hour + minutesLate / 60 - 12);
  const latitude = DEGREES * position.latitude;
  const sine =
    Math.sin(latitude) * Math.sin(declination) + Math.cos(latitude) * Math.cos(declination) * Math.cos(hourAngle);
  return Math.asin(Math.min(Math.max(sine, -1), 1)) / DEGREES;
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
