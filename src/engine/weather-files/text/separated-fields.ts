import { textBetween } from './decode-text.ts';
import type { LineCursor } from './line-cursor.ts';

const SPACE = 0x20;
const TAB = 0x09;
const QUOTE = 0x22;

/** Where the fields of the present line stand, blanks around them and quotation marks taken off. */
export interface SeparatedFields {
  readonly starts: Int32Array;
  readonly ends: Int32Array;
  /** Fields of the line; those beyond the arrays are counted only. */
  count: number;
}

/** Room for the fields of a line. @param most fields whose places are kept */
export function separatedFields(most: number): SeparatedFields {
  return { starts: new Int32Array(most), ends: new Int32Array(most), count: 0 };
}

/**
 * Finds the fields of the present line in one pass over its bytes. A field that begins with a quotation mark runs to the next
 * one that is not doubled, so it may hold the separator; quoted line breaks do not occur in hourly tables and end the field.
 * @param separator the byte between two fields
 */
export function findSeparatedFields(cursor: LineCursor, separator: number, fields: SeparatedFields): void {
  const { bytes } = cursor.text;
  const { end } = cursor;
  let count = 0;
  let at = cursor.start;
  for (;;) {
    let start = at;
    while (start < end && isBlank(bytes[start]) && bytes[start] !== separator) start++;
    const quoted = bytes[start] === QUOTE && start < end;
    let last = quoted ? closingQuote(bytes, start + 1, end) : start;
    const contentEnd = last;
    while (last < end && bytes[last] !== separator) last++;
    if (count < fields.starts.length) {
      fields.starts[count] = quoted ? start + 1 : start;
      fields.ends[count] = quoted ? contentEnd : withoutBlanks(bytes, start, last);
    }
    count++;
    if (last >= end) break;
    at = last + 1;
  }
  fields.count = count;
}

function isBlank(byte: number | undefined): boolean {
  return byte === SPACE || byte === TAB;
}

function closingQuote(bytes: Uint8Array, start: number, end: number): number {
  let at = start;
  while (at < end) {
    if (bytes[at] !== QUOTE) at++;
    else if (bytes[at + 1] === QUOTE && at + 1 < end) at += 2;
    else return at;
  }
  return end;
}

function withoutBlanks(bytes: Uint8Array, start: number, end: number): number {
  let last = end;
  while (last > start && isBlank(bytes[last - 1])) last--;
  return last;
}

/** Text of one field, at most `limit` bytes of it; empty beyond the last. */
export function separatedText(cursor: LineCursor, fields: SeparatedFields, index: number, limit = 200): string {
  if (index < 0 || index >= fields.count || index >= fields.starts.length) return '';
  const start = fields.starts[index] ?? 0;
  return textBetween(cursor.text, start, Math.min(fields.ends[index] ?? start, start + limit)).replaceAll('""', '"');
}

/** Character position of a field on its line, counted from 1. */
export function columnOfField(cursor: LineCursor, fields: SeparatedFields, index: number): number {
  return textBetween(cursor.text, cursor.start, fields.starts[index] ?? cursor.start).length + 1;
}
