import { SLOTS_PER_LEAP_YEAR } from '../../conventions.ts';
import type { SourceRow, SourceRows } from './source-rows.ts';

/** Takes the rows of a file one by one into columns that grow: a year of hours fits at once. */
export class RowCollector {
  #columns: SourceRows;
  #count = 0;

  /** @param room rows that fit at once */
  constructor(room = SLOTS_PER_LEAP_YEAR) {
    this.#columns = columnsFor(Math.max(1, room));
  }

  /** Rows so far. */
  get count(): number {
    return this.#count;
  }

  /** Columns with room beyond the rows so far, for a reader that fills them by itself and says afterwards how many it has filled. */
  get columns(): SourceRows {
    return this.#columns;
  }

  /** Sees to it that one more row fits. */
  makeRoom(): void {
    if (this.#count === this.#columns.lines.length) this.#columns = grown(this.#columns);
  }

  /** Counts rows that have been filled in. */
  take(rows: number): void {
    this.#count += rows;
  }

  /** Copies a row, so that a reader may fill the same record again. */
  add(row: SourceRow): void {
    const at = this.#count;
    this.makeRoom();
    const columns = this.#columns;
    columns.lines[at] = row.line;
    columns.years[at] = row.year;
    columns.months[at] = row.month;
    columns.days[at] = row.day;
    columns.hours[at] = row.hour;
    columns.minutes[at] = row.minute;
    columns.dryBulbC[at] = row.dryBulbC;
    columns.dewPointC[at] = row.dewPointC;
    columns.relativeHumidityPct[at] = row.relativeHumidityPct;
    columns.pressurePa[at] = row.pressurePa;
    columns.estimated[at] = row.estimated;
    this.#count = at + 1;
  }

  /** The rows taken; nothing may be added afterwards. */
  finish(): SourceRows {
    const { lines, years, months, days, hours, minutes, estimated, ...values } = this.#columns;
    const count = this.#count;
    return {
      lines: lines.subarray(0, count),
      years: years.subarray(0, count),
      months: months.subarray(0, count),
      days: days.subarray(0, count),
      hours: hours.subarray(0, count),
      minutes: minutes.subarray(0, count),
      dryBulbC: values.dryBulbC.subarray(0, count),
      dewPointC: values.dewPointC.subarray(0, count),
      relativeHumidityPct: values.relativeHumidityPct.subarray(0, count),
      pressurePa: values.pressurePa.subarray(0, count),
      estimated: estimated.subarray(0, count),
    };
  }
}

function columnsFor(rows: number): SourceRows {
  return {
    lines: new Uint32Array(rows),
    years: new Int32Array(rows),
    months: new Uint8Array(rows),
    days: new Uint8Array(rows),
    hours: new Uint8Array(rows),
    minutes: new Uint8Array(rows),
    dryBulbC: new Float64Array(rows),
    dewPointC: new Float64Array(rows),
    relativeHumidityPct: new Float64Array(rows),
    pressurePa: new Float64Array(rows),
    estimated: new Uint8Array(rows),
  };
}

function grown(columns: SourceRows): SourceRows {
  const larger = columnsFor(2 * columns.lines.length);
  larger.lines.set(columns.lines);
  larger.years.set(columns.years);
  larger.months.set(columns.months);
  larger.days.set(columns.days);
  larger.hours.set(columns.hours);
  larger.minutes.set(columns.minutes);
  larger.dryBulbC.set(columns.dryBulbC);
  larger.dewPointC.set(columns.dewPointC);
  larger.relativeHumidityPct.set(columns.relativeHumidityPct);
  larger.pressurePa.set(columns.pressurePa);
  larger.estimated.set(columns.estimated);
  return larger;
}
