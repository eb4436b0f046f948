/**
 * `Math.round` of a number within 32 bits (halves upwards), as an integer of the machine from the start: in a pass over a year it takes
 * a third of the time. 0 for NaN.
 */
export function wholeNumber(value: number): number {
  const whole = (value + 0.5) | 0;
  // Below zero cutting rounds upwards, and just below a half the sum does.
  return whole - 0.5 > value ? whole - 1 : whole;
}
