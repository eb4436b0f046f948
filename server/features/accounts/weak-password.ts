import { readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';

const FOLDER = new URL('../../../data/passwords/', import.meta.url);
const LIST = 'common-passwords.txt.gz';

let list: ReadonlySet<string> | null = null;

/**
 * What makes a password one of the first that others would try; null where nothing does. A password of the shipped list, with or
 * without figures and signs around it, or two of them run together; a short piece over and over; the person's own address or name.
 */
export function weaknessOf(password: string, about: readonly string[] = []): string | null {
  const typed = password.trim().toLowerCase();
  const core = typed.replace(/^[\d\P{L}]+|[\d\P{L}]+$/gu, '');
  if (isCommon(typed) || isCommon(core) || isTwoCommon(core) || core.length < 3)
    return 'Many people use this password, or one like it. Choose another, such as four words that do not belong together.';
  if (repeats(typed))
    return 'This repeats a short piece. Choose another, such as four words that do not belong together.';
  const own = about.map((words) => words.trim().toLowerCase()).filter((words) => words.length >= 4);
  if (own.some((words) => typed === words || core === words))
    return 'This is your own address or name. Choose something that others do not know of you.';
  return null;
}

function isCommon(words: string): boolean {
  list ??= new Set(
    gunzipSync(readFileSync(new URL(LIST, FOLDER)))
      .toString('utf8')
      .trimEnd()
      .split('\n'),
  );
  return list.has(words);
}

function isTwoCommon(words: string): boolean {
  for (let at = 4; at <= words.length - 4; at++)
    if (isCommon(words.slice(0, at)) && isCommon(words.slice(at))) return true;
  return false;
}

/** A piece of up to eight characters over and over, whole or broken off. */
function repeats(words: string): boolean {
  for (let length = 1; length <= Math.min(8, words.length / 2); length++) {
    const piece = words.slice(0, length);
    if (piece.repeat(Math.ceil(words.length / length)).slice(0, words.length) === words) return true;
  }
  return false;
}
