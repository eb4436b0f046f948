import type { TableMapping } from './table-mapping.ts';

/** A question about a table, with its possible answers. */
export interface TableQuestion {
  readonly about: 'columns' | 'units' | 'time scale' | 'time mark' | 'date order' | 'years' | 'station';
  readonly message: string;
}

/** A row under the guessed mapping: null where nothing could be read. */
export interface SampleRow {
  readonly line: number;
  /** The time as it stands in the row, `2007-01-31T14:00`, before any change of clock. */
  readonly time: string | null;
  readonly dryBulbC: number | null;
  readonly dewPointC: number | null;
  readonly relativeHumidityPct: number | null;
  readonly wetBulbC: number | null;
  /** As it stands in the column, in Pa. */
  readonly pressurePa: number | null;
}

export interface GuessedColumn {
  readonly name: string;
  /** What the units row or the brackets in the name say; empty without either. */
  readonly unit: string;
  /** The first cells, as text. */
  readonly cells: readonly string[];
}

/** What a table seems to hold. Plain JSON, for a person to confirm or to correct. */
export interface TableGuess {
  /** Tables of the same delimiter, number of fields and names have the same key. */
  readonly shapeKey: string;
  /** null when no guess could be made: no column of times, or none of temperatures. */
  readonly mapping: TableMapping | null;
  readonly questions: readonly TableQuestion[];
  readonly columns: readonly GuessedColumn[];
  /** The first ten rows. */
  readonly sample: readonly SampleRow[];
  /** Minutes between rows. */
  readonly stepMin: number | null;
}
