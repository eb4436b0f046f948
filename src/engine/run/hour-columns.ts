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

/**
 * Every hour as if outdoor air as it is served it whole: t_s = t, no water, nothing lacking. What is found to be otherwise is written
 * over it; the class, what air meets and which stages meet alone are left to the use.
 */
export function fillWithAir(hours: HourColumns): void {
  const { count, dryBulbC } = hours;
  hours.airSupplyC.set(dryBulbC.subarray(0, count));
  hours.supplyC.set(dryBulbC.subarray(0, count));
  hours.supplyRatio.set(hours.humidityRatio.subarray(0, count));
  fillMet(hours);
}

/** What holds of every hour that air meets, whatever the air. */
export function fillMet(hours: HourColumns): void {
  const { count } = hours;
  hours.met.fill(1, 0, count);
  hours.damp.fill(0, 0, count);
  hours.running.fill(runningStages.indexOf('air'), 0, count);
  hours.shortfallK.fill(0, 0, count);
  hours.uncappedShortfallK.fill(0, 0, count);
  hours.evaporatedKgPerKg.fill(0, 0, count);
  hours.share.fill(0, 0, count);
  hours.carriedShare.fill(1, 0, count);
  hours.waterC.fill(Number.NaN, 0, count);
}

/**
 * A year is judged so many demand hours at a time, in one set of columns. A loop over a whole year is compiled while it runs, and what
 * stands behind it is then met unprepared at every call, which costs more than the loop; short loops that are called often are compiled
 * whole. So few hours also stay in the nearest memory from one step to the next.
 */
export const HOURS_PER_BLOCK = 512;

/** Puts the hours of a block behind those that the columns hold. */
export function appendHours(into: HourColumns, block: HourColumns): void {
  const { count: from } = into;
  const added = Object.values(block);
  for (const [place, column] of Object.values(into).entries()) {
    const more = added[place];
    if (typeof column === 'object' && typeof more === 'object') column.set(more.subarray(0, block.count), from);
  }
  into.count = from + block.count;
}
