export interface PsychrometricRange {
  /** Whole fives, °C. */
  readonly minC: number;
  readonly maxC: number;
  /** kg/kg, whole 5 g. */
  readonly maxRatio: number;
}

export interface ChartScale {
  readonly x: (tempC: number) => number;
  readonly y: (humidityRatio: number) => number;
}

export const chartBox = { width: 760, height: 430, left: 14, right: 34, top: 20, bottom: 36 } as const;

export function chartScale({ minC, maxC, maxRatio }: PsychrometricRange): ChartScale {
  const width = chartBox.width - chartBox.left - chartBox.right;
  const height = chartBox.height - chartBox.top - chartBox.bottom;
  return {
    x: (tempC) => chartBox.left + (width * (tempC - minC)) / (maxC - minC),
    y: (humidityRatio) => chartBox.top + height * (1 - humidityRatio / maxRatio),
  };
}

/** A chart that holds every hour with a little room; rooms are held near 26 °C, so it always reaches 30. */
export function rangeOf(columns: {
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
}): PsychrometricRange {
  let [lowC, highC, wettest] = [0, 30, 0.01];
  for (const value of columns.dryBulbC) {
    if (value < lowC) lowC = value;
    if (value > highC) highC = value;
  }
  for (const value of columns.humidityRatio) if (value > wettest) wettest = value;
  return {
    minC: 5 * Math.floor(lowC / 5),
    maxC: 5 * Math.ceil((highC + 1) / 5),
    maxRatio: Math.ceil((wettest + 0.0015) * 200) / 200,
  };
}
