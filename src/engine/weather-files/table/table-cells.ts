import type { LineCursor } from '../text/line-cursor.ts';
import { BLANK, NOT_A_NUMBER, numberField } from '../text/number-field.ts';
import { type SeparatedFields, separatedText } from '../text/separated-fields.ts';

const MISSING_WORDS = new Set(['', 'na', 'nan', 'n/a', 'null', 'none', '-', '--', '---', '.', 'm', 'missing', '*']);
const DECIMAL_COMMA = /^[+-]?\d+,\d+$/;

/** The number in a cell: NaN when the cell says that it is missing, null when it holds anything else. */
export function cellNumber(
  cursor: LineCursor,
  fields: SeparatedFields,
  cell: { readonly index: number; readonly decimalComma: boolean },
): number | null {
  const { index } = cell;
  if (index >= fields.count || index >= fields.starts.length) return Number.NaN;
  const found = numberField(cursor.text, fields.starts[index] ?? 0, fields.ends[index] ?? 0);
  if (typeof found === 'number') return found;
  if (found === BLANK) return Number.NaN;
  if (found !== NOT_A_NUMBER) return null;
  const word = separatedText(cursor, fields, index, 40).trim();
  if (cell.decimalComma && DECIMAL_COMMA.test(word)) return Number(word.replace(',', '.'));
  return MISSING_WORDS.has(word.toLowerCase()) ? Number.NaN : null;
}
