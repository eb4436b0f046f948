import { parseArgs } from 'node:util';
import type { StatedPlace } from '#engine/weather-files/read-options.ts';

/** Wrong use of a command; the message says what. Ends it with code 2. */
export class WrongUse extends Error {
  override readonly name = 'WrongUse';
}

export interface CommandArguments {
  readonly files: readonly string[];
  readonly strict: boolean;
  readonly brief: string | null;
  /** What `--place` says of the stations. */
  readonly place: Required<Omit<StatedPlace, 'name'>> | null;
  /** File with the mapping of a table. */
  readonly columns: string | null;
  /** File with answers to what a file asks. */
  readonly answers: string | null;
}

const PLACE_PARTS = [
  { name: 'latitude', low: -90, high: 90 },
  { name: 'longitude', low: -180, high: 180 },
  { name: 'elevation', low: -500, high: 9000 },
  { name: 'offset from UTC', low: -12, high: 14 },
] as const;

/**
 * Reads what follows the command's name.
 * @throws WrongUse
 */
export function readArguments(args: readonly string[]): CommandArguments {
  const { positionals, values } = parsed(args);
  return {
    files: positionals,
    strict: values.strict,
    brief: values.brief ?? null,
    place: values.place === undefined ? null : readPlace(values.place),
    columns: values.columns ?? null,
    answers: values.answers ?? null,
  };
}

function parsed(args: readonly string[]) {
  try {
    return parseArgs({
      args: [...args],
      options: {
        strict: { type: 'boolean', default: false },
        brief: { type: 'string' },
        place: { type: 'string' },
        columns: { type: 'string' },
        answers: { type: 'string' },
      },
      allowPositionals: true,
    });
  } catch (error) {
    throw new WrongUse(error instanceof Error ? error.message : String(error));
  }
}

/** `LAT,LON,ELEVATION_M,UTC_OFFSET_H`. */
function readPlace(text: string): NonNullable<CommandArguments['place']> {
  const parts = text.split(',').map((part) => (part.trim() === '' ? Number.NaN : Number(part)));
  const fits = PLACE_PARTS.every(({ high, low }, index) => {
    const value = parts[index] ?? Number.NaN;
    return value >= low && value <= high;
  });
  if (!fits || parts.length !== PLACE_PARTS.length) {
    const wanted = PLACE_PARTS.map(({ high, low, name }) => `${name} (${low} to ${high})`).join(', ');
    throw new WrongUse(
      `--place wants four numbers with commas between them: ${wanted}. Example: --place=-30.1,19.9,968,2`,
    );
  }
  const [latitude = 0, longitude = 0, elevationM = 0, utcOffsetH = 0] = parts;
  return { latitude, longitude, elevationM, utcOffsetH };
}
