const LONE_SURROGATES = /\p{Surrogate}/gu;
/** Tab, line feed and carriage return are kept. */
const CONTROLS = /(?![\t\n\r])\p{Cc}/gu;

/**
 * Text out of a file as PostgreSQL can hold it: half pairs become U+FFFD, control characters (NUL is refused by the
 * database) become their visible picture.
 */
export function storableText(text: string): string {
  return text.replace(LONE_SURROGATES, '\uFFFD').replace(CONTROLS, visibleControl);
}

/** U+2400 onwards are the pictures of the control characters, in their order. */
function visibleControl(control: string): string {
  const code = control.codePointAt(0) ?? 0;
  return code < 0x20 ? String.fromCodePoint(0x2400 + code) : code === 0x7f ? '\u2421' : '\uFFFD';
}
