/**
 * The demand hours of a judged year, one column per figure, in slot order: what ledgers, tables and tallies are counted from.
 * Objects per hour are made of it only where a single hour is looked at (`judged-hour.ts`). NaN stands for a figure that does
 * not apply.
 */

/** What runs, as a position in this list; 0: nothing does. */
export const runningStages = [null, 'air', 'direct', 'indirect', 'dewpoint', 'twostage', 'tower'] as const;

/** Why an hour is `damp`, as a position in this list. */
export const dampReasons = [null, 'outside', 'plant'] as const;

export interface HourColumns {
  /** How many demand hours there are; the columns may be longer. */
  count: number;
  /**
   * Whether the state of each hour is wanted too: outdoor air, limit, load and air supply. Where years are only counted it is left
   * out, which saves ten of the columns.
   */
  detail: boolean;
  readonly slot: Uint16Array;
  /** Position in `hourClasses`. */
  readonly classCode: Uint8Array;
  /** 1 where the hour is met; where air alone meets it. */
  readonly met: Uint8Array;
  readonly airMeets: Uint8Array;
  readonly damp: Uint8Array;
  readonly running: Uint8Array;
  /** Bit n: `runningStages[n]` would meet the hour as the only one installed. */
  readonly aloneMet: Uint8Array;
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
  readonly pressurePa: Float64Array;
  readonly volumeM3PerKg: Float64Array;
  readonly setC: Float64Array;
  readonly supplyAimC: Float64Array;
  readonly loadFraction: Float64Array;
  readonly shortfallK: Float64Array;
  readonly uncappedShortfallK: Float64Array;
  readonly airSupplyC: Float64Array;
  readonly supplyC: Float64Array;
  readonly supplyRatio: Float64Array;
  readonly evaporatedKgPerKg: Float64Array;
  readonly share: Float64Array;
  readonly carriedShare: Float64Array;
  readonly waterC: Float64Array;
  readonly evaporatedLitres: Float64Array;
  readonly makeUpLitres: Float64Array;
  readonly coolingKwh: Float64Array;
  readonly kwh: Float64Array;
  readonly referenceKwh: Float64Array;
  readonly backUpKw: Float64Array;
}

/** Columns with room for so many demand hours, none filled in. */
export function hourColumns(hours: number): HourColumns {
  const bytes = () => new Uint8Array(hours);
  const numbers = () => new Float64Array(hours);
  return {
    count: 0,
    detail: true,
    slot: new Uint16Array(hours),
    classCode: bytes(),
    met: bytes(),
    airMeets: bytes(),
    damp: bytes(),
    running: bytes(),
    aloneMet: bytes(),
    dryBulbC: numbers(),
    humidityRatio: numbers(),
    pressurePa: numbers(),
    volumeM3PerKg: numbers(),
    setC: numbers(),
    supplyAimC: numbers(),
    loadFraction: numbers(),
    shortfallK: numbers(),
    uncappedShortfallK: numbers(),
    airSupplyC: numbers(),
    supplyC: numbers(),
    supplyRatio: numbers(),
    evaporatedKgPerKg: numbers(),
    share: numbers(),
    carriedShare: numbers(),
    waterC: numbers(),
    evaporatedLitres: numbers(),
    makeUpLitres: numbers(),
    coolingKwh: numbers(),
    kwh: numbers(),
    referenceKwh: numbers(),
    backUpKw: numbers(),
  };
}
