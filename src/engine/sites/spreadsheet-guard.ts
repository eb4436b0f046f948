/** Text that a spreadsheet would take for a formula. It is kept as it was written; only a table that leaves the product is guarded. */

/** First characters that a spreadsheet may take for the start of a formula (OWASP, CSV Injection). */
const FORMULA = /^[=+\-@\t\r＝＋－＠]/;

/** A text cell with a mark before it that keeps a spreadsheet from computing it; the same text where there is nothing to guard. */
export function guarded(text: string): string {
  // A text that begins with the mark itself before such a character gets one more, so that reading it back loses nothing.
  return FORMULA.test(text) || /^'+[=+\-@\t\r＝＋－＠]/.test(text) ? `'${text}` : text;
}

/** What `guarded` was given. */
export function withoutGuard(text: string): string {
  return /^'+[=+\-@\t\r＝＋－＠]/.test(text) ? text.slice(1) : text;
}
