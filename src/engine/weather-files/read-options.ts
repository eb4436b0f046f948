import type { QualityOptions } from './quality/quality-options.ts';
import type { TableMapping } from './table/table-mapping.ts';

/** What a person or the caller says of the place; it goes before what the file says. */
export interface StatedPlace {
  readonly name?: string;
  /** Degrees, north and east positive. */
  readonly latitude?: number;
  readonly longitude?: number;
  readonly elevationM?: number;
  /** Hours that standard time is ahead of UTC. */
  readonly utcOffsetH?: number;
}

/** The zone of a position: its IANA name, and the hours that its standard time is ahead of UTC. */
export interface StationZone {
  readonly zone: string;
  readonly utcOffsetH: number;
}

/** Answers to what a file asks, by the code of the question; places are answered by `place`, tables by `mapping`. */
export interface Answers {
  /** Convert the column from sea level to the station, or take it as it stands. */
  readonly 'pressure-sea-level'?: 'convert' | 'keep';
  /** Which to believe: the pressure column, or the elevation (then its standard atmosphere is taken). */
  readonly 'pressure-elevation'?: 'pressure' | 'elevation';
  readonly 'dew-is-wet-bulb'?: 'wet bulb' | 'dew point' | 'relative humidity';
  /** Of a pressure column whose values look like hectopascals. */
  readonly 'unit-guess'?: 'hectopascals' | 'pascals';
  /** The period to read, counted from 1. */
  readonly 'several-periods'?: number;
  /** Of two rows with one time: keep the first, or move the second copy to the day that is absent. */
  readonly 'time-repeat'?: 'first' | 'absent day';
  /** The place stands as the file has it. */
  readonly 'place-sign'?: 'as written';
}

/** What is known of a file beside its bytes. */
export interface ReadOptions extends QualityOptions {
  readonly place?: StatedPlace;
  /** Looks up the zone of a position, for formats in UTC that name none; null where it is not known. */
  readonly zoneAt?: (latitude: number, longitude: number) => StationZone | null;
  /** The confirmed mapping of a table. */
  readonly mapping?: TableMapping;
  readonly answers?: Answers;
  /** Which station-year of a file that holds several, by the `part` of its reading; left out, the first. */
  readonly part?: string;
  /** Keeps values that the source's quality codes call suspect. */
  readonly keepSuspect?: boolean;
}
