import type { YearKind } from '#engine/reduction/weather-year.ts';

const ON_EVERY_RESULT = [
  'A screening result is not a design.',
  'Wetted equipment needs a water safety plan against legionella under local codes and standards (ASHRAE Standard 188 and Guideline 12, or the local equivalents).',
  'Heat can harm people and animals: follow local occupational and welfare rules.',
  'A licensed engineer is responsible for the design.',
  'Not assessed: smoke, dust, noise, thermal mass.',
  'The reference’s latent load is not counted, which favours it.',
];
/** What a station gets whose position has no zone of its own. */
const FIXED_OFFSET = /^Etc\//;
const TYPICAL = 'Typical years hide extremes: do not size plant from them.';

/** What must be read with a result. */
export function cautionsOf(shown: { kind: YearKind; zone: string; notes: readonly string[] }): string[] {
  const typical = shown.kind === 'typical' ? [TYPICAL] : [];
  const zone = FIXED_OFFSET.test(shown.zone)
    ? [`No time zone is known at this position: the schedule is read in the fixed offset of the file, ${shown.zone}.`]
    : [];
  return [...typical, ...zone, ...shown.notes, ...ON_EVERY_RESULT];
}
