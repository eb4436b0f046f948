/** The mapped values of a row in SI, pressure as it stands in its column. */
import type { LineCursor } from '../text/line-cursor.ts';
import type { SeparatedFields } from '../text/separated-fields.ts';
import { celsius, pascals, percent } from './convert-units.ts';
import { cellNumber } from './table-cells.ts';
import type { TableLayout } from './table-layout.ts';
import type { TableMapping, TemperatureColumn } from './table-mapping.ts';

/** Codes of a missing value: nothing that a table of air holds in any unit. */
const CODES = new Set([-9999, -9999.9, -9900, -999.9, -999, -99.9, -99, 999.9, 9999, 9999.9, 99_999, 999_999]);
const MOST_RELATIVE_HUMIDITY_PCT = 999;

export interface RowValues {
  dryBulbC: number;
  dewPointC: number;
  relativeHumidityPct: number;
  wetBulbC: number;
  pressurePa: number;
}

/** Reads the values; NaN where missing. A cell that is no number is given to `fault` by the index of its column. */
export function valuesReader(
  mapping: TableMapping,
  layout: TableLayout,
): (cursor: LineCursor, fields: SeparatedFields, fault: (index: number) => void) => RowValues {
  const { decimalComma, names } = layout;
  const place = (column: string | undefined) => (column === undefined ? -1 : names.indexOf(column));
  const { dewPoint, dryBulb, pressure, relativeHumidity, wetBulb } = mapping;
  const [dryAt, dewAt, rhAt, wetAt, pressureAt] = [dryBulb, dewPoint, relativeHumidity, wetBulb, pressure].map(
    (column) => place(column?.column),
  );
  return (cursor, fields, fault) => {
    const number = (index = -1) => {
      if (index < 0) return Number.NaN;
      const value = cellNumber(cursor, fields, { index, decimalComma });
      if (value === null) fault(index);
      return value === null || CODES.has(value) ? Number.NaN : value;
    };
    const temperature = (index: number | undefined, column: TemperatureColumn | null) =>
      celsius(number(index), column?.unit ?? 'C');
    const humidity = number(rhAt);
    return {
      dryBulbC: temperature(dryAt, dryBulb),
      dewPointC: temperature(dewAt, dewPoint),
      relativeHumidityPct:
        humidity < 0 || humidity >= MOST_RELATIVE_HUMIDITY_PCT
          ? Number.NaN
          : percent(humidity, relativeHumidity?.unit ?? '%'),
      wetBulbC: temperature(wetAt, wetBulb),
      pressurePa: pascals(number(pressureAt), pressure?.unit ?? 'Pa'),
    };
  };
}
