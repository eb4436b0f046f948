/** One report of a station: what was measured at one minute, in SI, NaN where missing. */
export interface Report {
  line: number;
  /** Minutes from the beginning of 1970, UTC. */
  minutes: number;
  dryBulbC: number;
  dewPointC: number;
  /** Pressure at the station, and at sea level, Pa. */
  pressurePa: number;
  seaLevelPressurePa: number;
  /** 0 for the report that an hour is named after (FM-12, FM-15), 2 for specials, 1 for every other. */
  typeRank: number;
  /** 0 when the source's codes say that all checks were passed, else 1. */
  qualityRank: number;
}

/** The reports of one station, a column for each value, in the order of the file. */
export class ReportColumns {
  readonly lines: number[] = [];
  readonly minutes: number[] = [];
  readonly dryBulbC: number[] = [];
  readonly dewPointC: number[] = [];
  readonly pressurePa: number[] = [];
  readonly seaLevelPressurePa: number[] = [];
  readonly ranks: number[] = [];

  get count(): number {
    return this.lines.length;
  }

  add(report: Report): void {
    this.lines.push(report.line);
    this.minutes.push(report.minutes);
    this.dryBulbC.push(report.dryBulbC);
    this.dewPointC.push(report.dewPointC);
    this.pressurePa.push(report.pressurePa);
    this.seaLevelPressurePa.push(report.seaLevelPressurePa);
    this.ranks.push(2 * report.typeRank + report.qualityRank);
  }
}
