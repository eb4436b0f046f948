import type { FindingList } from './finding-list.ts';

const LICENCE = /licen[cs]e|copyright|\(c\)|©|®|all rights|terms of use|redistribut|non-?commercial|permission/i;
const SHOWN = 400;

/** Lines that speak of a licence, joined; null without any. */
export function licenceLines(lines: readonly string[]): string | null {
  const found = lines.filter((line) => LICENCE.test(line)).map((line) => line.trim());
  return found.length === 0 ? null : found.join('\n');
}

/** Shows what a file's own words say of its licence. */
export function tellLicence(words: string | null, findings: FindingList): void {
  if (words === null || !LICENCE.test(words)) return;
  findings.add({
    code: 'licence',
    severity: 'note',
    message: () =>
      `The comments of the file speak of its licence: “${words.replace(/\s+/g, ' ').slice(0, SHOWN)}”. They are kept with it.`,
  });
}
