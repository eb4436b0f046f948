/** What is said about gaps, repairs and estimates once the hours stand. */
import { monthNames, monthStartSlots } from '../../reduction/calendar.ts';
import { dryBulbProvenance, hasRepair, humidityProvenance } from '../../reduction/hour-flags.ts';
import { MONTH_COUNTS_FROM_PCT, MOST_REPAIRED_PCT } from '../../reduction/month-completeness.ts';
import { type FindingList, hoursPhrase, whole, wholeShare } from '../finding-list.ts';
import type { HourColumns } from '../weather-file-reading.ts';
import { forEachRun, linesOfRun } from './step-columns.ts';

const REPAIRED_DOUBT_PCT = 10;
const ESTIMATED_DOUBT_PCT = 40;

/**
 * Tells every gap: hours without a row, or without a dry bulb or a humidity in it.
 * @param input.gap 1 where a slot lacked one of them before it was filled
 * @param input.longFilled 1 where a slot was filled from the days around
 * @param input.quietEdgeHours so many absent hours at the beginning or the end of the year are not told
 */
export function tellGaps(
  input: { hours: HourColumns; gap: Uint8Array; longFilled: Uint8Array; quietEdgeHours: number },
  findings: FindingList,
): void {
  const { gap, hours, longFilled, quietEdgeHours } = input;
  forEachRun(gap, (start, end) => {
    const atEdge = start === 0 || end === gap.length;
    const own = linesOfRun(hours.lines, start, end);
    if (atEdge && own.first === 0 && end - start <= quietEdgeHours) return;
    const before = hours.lines[start - 1] ?? 0;
    const after = hours.lines[end] ?? 0;
    let filled = 0;
    for (let slot = start; slot < end; slot++) if (isKnown(hours, slot)) filled++;
    const where = own.first > 0 ? `on line ${own.first}` : before > 0 ? `after line ${before}` : `before line ${after}`;
    const what = own.first > 0 ? 'have no usable dry bulb or humidity, first' : 'are absent';
    const done =
      filled === 0
        ? 'They stay missing.'
        : filled === end - start
          ? `They are filled ${longFilled.subarray(start, end).includes(1) ? 'from the days before and after' : 'on a straight line between their neighbours'}.`
          : `${hoursPhrase(filled)} of them could be filled; the rest stay missing.`;
    findings.add({
      code: 'time-gap',
      severity: 'note',
      done: filled === 0 ? 'left missing' : filled === end - start ? 'filled' : 'filled in part',
      line: own.first || before || after,
      lastLine: own.last || before || after,
      count: end - start,
      message: () =>
        end - start === 1
          ? `1 hour ${own.first > 0 ? 'has no usable dry bulb or humidity,' : 'is absent'} ${where}. It ${filled === 1 ? 'is filled on a straight line between its neighbours' : 'stays missing'}.`
          : `${hoursPhrase(end - start)} ${what} ${where}. ${done}`,
    });
  });
}

function isKnown(hours: HourColumns, slot: number): boolean {
  return !Number.isNaN((hours.dryBulbC[slot] ?? Number.NaN) + (hours.humidityRatio[slot] ?? Number.NaN));
}

/**
 * Tells months that do not count, and a much repaired year; refuses a file without one whole month.
 * @param input.humidityPresent 1 where an hour has a humidity, even one that waits for a pressure
 */
export function tellCoverage(input: { hours: HourColumns; humidityPresent: Uint8Array }, findings: FindingList): void {
  const { known, monthPct, repaired } = countPresent(input);
  const slotCount = input.hours.flags.length;
  const short = monthPct.flatMap((pct, index) =>
    pct < MONTH_COUNTS_FROM_PCT ? [`${monthNames[index]} (${Math.floor(pct)} %)`] : [],
  );
  if (short.length === monthPct.length) {
    findings.add({
      code: 'too-few-rows',
      severity: 'refuse',
      count: known,
      message: () =>
        `Only ${hoursPhrase(known)} of the year have dry bulb and humidity, and no month has 90 % of its hours: nothing can be counted. Bring a file with whole months.`,
    });
    return;
  }
  if (short.length > 0) {
    findings.add({
      code: 'coverage',
      severity: 'doubt',
      count: slotCount - known,
      message: () =>
        `${short.length === 1 ? 'One month has' : `${short.length} months have`} fewer than 90 % of the hours and do${short.length === 1 ? 'es' : ''} not count: ${short.join(', ')}. Annual figures are withheld; the other months are shown.`,
    });
  }
  tellRepaired((100 * repaired) / slotCount, repaired, findings);
}

/** Hours with dry bulb and humidity, those of them with a repaired value, and the share of each month, %. */
function countPresent(input: { hours: HourColumns; humidityPresent: Uint8Array }): {
  known: number;
  repaired: number;
  monthPct: readonly number[];
} {
  const { dryBulbC, flags } = input.hours;
  const starts = monthStartSlots(flags.length);
  let known = 0;
  let repaired = 0;
  const monthPct = monthNames.map((_name, month) => {
    const [start = 0, end = 0] = [starts[month], starts[month + 1]];
    let present = 0;
    for (let slot = start; slot < end; slot++) {
      if (Number.isNaN(dryBulbC[slot]) || input.humidityPresent[slot] === 0) continue;
      present++;
      if (hasRepair(flags[slot] ?? 0)) repaired++;
    }
    known += present;
    return (100 * present) / (end - start);
  });
  return { known, repaired, monthPct };
}

function tellRepaired(pct: number, repaired: number, findings: FindingList): void {
  if (pct <= REPAIRED_DOUBT_PCT) return;
  const withheld = pct > MOST_REPAIRED_PCT ? ' That is more than 35 %, so annual figures are withheld.' : '';
  findings.add({
    code: 'much-repaired',
    severity: 'doubt',
    count: repaired,
    message: () => `${whole(repaired)} hours, ${wholeShare(pct)} of the year, hold a repaired value.${withheld}`,
  });
}

/** Tells what the source's own flags say about the hours. */
export function tellSourceFlags(input: { hours: HourColumns; informative: boolean }, findings: FindingList): void {
  if (!input.informative) {
    findings.add({
      code: 'source-flags-uniform',
      severity: 'note',
      message: () =>
        'The source flags are the same in every row or are not there: they do not tell measured values from estimated ones.',
    });
    return;
  }
  const { flags } = input.hours;
  let estimated = 0;
  for (let slot = 0; slot < flags.length; slot++) {
    const flag = flags[slot] ?? 0;
    if (flag === 0) continue;
    if (dryBulbProvenance(flag) === 'estimated' || humidityProvenance(flag) === 'estimated') estimated++;
  }
  if (estimated === 0) return;
  const pct = (100 * estimated) / flags.length;
  findings.add({
    code: 'source-estimated',
    severity: pct >= ESTIMATED_DOUBT_PCT ? 'doubt' : 'note',
    count: estimated,
    message: () =>
      `By the source's own flags dry bulb or humidity is interpolated or modelled in ${whole(estimated)} hours, ${wholeShare(pct)} of the year.`,
  });
}
