/**
 * The one sequential ramp, dry sand to soaked indigo. It stands for "how much evaporation can do" (score, depression)
 * and for nothing else. Its lightness falls all the way, so it survives colour-vision deficiency and a grey printer.
 */

type RampStop = { readonly share: number; readonly colour: string };

export const RAMP_STOPS: readonly RampStop[] = [
  { share: 0, colour: '#efe4cb' },
  { share: 0.2, colour: '#d9d3b6' },
  { share: 0.4, colour: '#a7bfb2' },
  { share: 0.6, colour: '#6a9fa9' },
  { share: 0.8, colour: '#3a6f92' },
  { share: 1, colour: '#1c3a6b' },
];

/**
 * The ramp's colour as `#rrggbb`.
 *
 * Channels are mixed in sRGB, as a CSS gradient does, so that a legend painted with `RAMP_GRADIENT` and a mark filled
 * with this function agree to the last digit.
 *
 * @param share 0 (dry sand) to 1 (soaked indigo); values outside are held at the ends
 * @throws RangeError when the share is not a number: a place without a figure has no colour
 */
export function rampColour(share: number): string {
  if (Number.isNaN(share)) throw new RangeError('The ramp needs a number; a place without a figure has no colour.');
  const held = Math.min(1, Math.max(0, share));
  const upperIndex = RAMP_STOPS.findIndex((stop) => stop.share >= held);
  const upper = RAMP_STOPS[upperIndex];
  const lower = RAMP_STOPS[upperIndex - 1];
  if (upper === undefined || lower === undefined) return upper?.colour ?? '';
  const part = (held - lower.share) / (upper.share - lower.share);
  const from = channels(lower.colour);
  const to = channels(upper.colour);
  return `#${from.map((value, index) => twoDigits(value + ((to[index] ?? value) - value) * part)).join('')}`;
}

/** The whole ramp as a CSS gradient, sand at the start. */
export const RAMP_GRADIENT = `linear-gradient(to right, ${RAMP_STOPS.map(
  (stop) => `${stop.colour} ${Math.round(stop.share * 100)}%`,
).join(', ')})`;

function channels(colour: string): number[] {
  return [1, 3, 5].map((start) => Number.parseInt(colour.slice(start, start + 2), 16));
}

function twoDigits(channel: number): string {
  return Math.round(channel).toString(16).padStart(2, '0');
}
