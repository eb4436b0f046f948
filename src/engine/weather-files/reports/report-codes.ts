/** Quality codes and report types of the integrated surface data: Federal Climate Complex Data Documentation. */

const ACCEPTED = new Set('01459ACIMPRU');
const SUSPECT = new Set('26');
const PASSED = new Set('15');
/** Summaries of a day and of a month: no reading of an hour. */
const SUMMARIES = new Set(['SOD', 'SOM']);
const MAIN_TYPES = new Set(['FM-12', 'FM-15']);
const SPECIAL_TYPE = 'FM-16';

export type CodeVerdict = 'accepted' | 'suspect' | 'erroneous';

/** 3 and 7 are erroneous, 2 and 6 suspect, and so is a code that the documentation does not know. */
export function codeVerdict(code: string): CodeVerdict {
  if (ACCEPTED.has(code)) return 'accepted';
  return SUSPECT.has(code) ? 'suspect' : 'erroneous';
}

export function hasPassedAll(code: string): boolean {
  return PASSED.has(code);
}

export function isSummary(reportType: string): boolean {
  return SUMMARIES.has(reportType);
}

/** Which of two equally near reports an hour takes: the lower rank. */
export function typeRank(reportType: string): number {
  if (MAIN_TYPES.has(reportType)) return 0;
  return reportType === SPECIAL_TYPE ? 2 : 1;
}
