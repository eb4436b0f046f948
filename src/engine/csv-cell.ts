/**
 * Text as a cell of a table that leaves the product (RFC 4180). A spreadsheet takes some texts for formulas, and names come from
 * files and people that anybody may be: what is kept is as it was written, and only a table that leaves is guarded.
 */

/** Beginnings that a spreadsheet may take for the start of a formula (OWASP, CSV Injection), behind white space as well. */
const FORMULA = /^(?:\s*[=+\-@＝＋－＠]|[\t\r\n])/;
const MARKED_FORMULA = /^'+(?:\s*[=+\-@＝＋－＠]|[\t\r\n])/;

/** A text with a mark before it that keeps a spreadsheet from computing it; the same text where there is nothing to guard. */
export function guarded(text: string): string {
  // A text that begins with the mark itself before such a character gets one more, so that reading it back loses nothing.
  return FORMULA.test(text) || MARKED_FORMULA.test(text) ? `'${text}` : text;
}

/** What `guarded` was given. */
export function withoutGuard(text: string): string {
  return MARKED_FORMULA.test(text) ? text.slice(1) : text;
}

/** A text as a cell of comma-separated values, guarded, and in quotes where it needs them. */
export function textCell(text: string): string {
  const safe = guarded(text);
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
