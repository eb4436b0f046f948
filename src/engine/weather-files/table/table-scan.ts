import type { DecodedText } from '../text/decode-text.ts';
import { LineCursor } from '../text/line-cursor.ts';
import { findSeparatedFields, type SeparatedFields, separatedFields, separatedText } from '../text/separated-fields.ts';
import type { TableLayout } from './table-layout.ts';

/** Calls `each` for every line from the first row on, with its fields found. @returns the cursor, at the end of the file */
export function scanTable(
  text: DecodedText,
  layout: TableLayout,
  each: (cursor: LineCursor, fields: SeparatedFields) => void,
): void {
  const cursor = new LineCursor(text);
  const fields = separatedFields(layout.fieldCount + 1);
  while (cursor.next()) {
    if (cursor.line < layout.firstRowLine) continue;
    findSeparatedFields(cursor, layout.separator, fields);
    each(cursor, fields);
  }
}

/** Whether a line has the fields of a row; one more is an empty one after a trailing delimiter. */
export function isRow(cursor: LineCursor, fields: SeparatedFields, layout: TableLayout): boolean {
  const { fieldCount } = layout;
  if (fields.count === fieldCount) return true;
  return fields.count === fieldCount + 1 && separatedText(cursor, fields, fieldCount) === '';
}
