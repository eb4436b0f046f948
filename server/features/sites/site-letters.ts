const LETTERS = 26;
const FIRST = 'a'.charCodeAt(0);

/** Letters of the n-th site of a programme, from 1: a to z, then aa, ab … zz, aaa. */
export function siteLetters(number: number): string {
  let letters = '';
  for (let rest = number; rest > 0; rest = Math.floor((rest - 1) / LETTERS)) {
    letters = String.fromCharCode(FIRST + ((rest - 1) % LETTERS)) + letters;
  }
  return letters;
}
