import { emptyRows, type SourceRows } from './source-rows.ts';

export interface SourceRow {
  line: number;
  year: number;
  month: number;
  day: number;
  hour: number;
  minute: number;
  dryBulbC: number;
  dewPointC: number;
  relativeHumidityPct: number;
  pressurePa: number;
  estimated: number;
}
export class RowCollector {
  readonly #rows = emptyRows();
  get count(): number {
    return this.#rows.lines.length;
  }
  add(row: SourceRow): void {
    const r = this.#rows;
    r.lines.push(row.line);
    r.years.push(row.year);
    r.months.push(row.month);
    r.days.push(row.day);
    r.hours.push(row.hour);
    r.minutes.push(row.minute);
    r.dryBulbC.push(row.dryBulbC);
    r.dewPointC.push(row.dewPointC);
    r.relativeHumidityPct.push(row.relativeHumidityPct);
    r.pressurePa.push(row.pressurePa);
    r.estimated.push(row.estimated);
  }
  finish(): SourceRows {
    return this.#rows;
  }
}
