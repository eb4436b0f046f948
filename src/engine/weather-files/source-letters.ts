const INTERPOLATED = 0x42;
const INTERPOLATED_LONG = 0x43;
const MODELLED = 0x45;
const RECEIVED = 0x41;

/** Source letters of values that are interpolated (B, C) or modelled (E), as a byte. */
export function isEstimatedLetter(letter: number | undefined): boolean {
  return letter === INTERPOLATED || letter === INTERPOLATED_LONG || letter === MODELLED;
}

/** Whether a source letter says anything: A as received, or one of the estimated. */
export function isTellingLetter(letter: number | undefined): boolean {
  return letter === RECEIVED || isEstimatedLetter(letter);
}
