import { MISSING_INT16 } from '../../conventions.ts';
import { type FindingList, hoursPhrase } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, leaveOutHour, type TestedHours } from './tested-hours.ts';

const TOGETHER_H = { 100: 24, 50: 12, 10: 12 } as const;

/** Dry bulb, dew point and relative humidity together for 12 hours (24 in files of whole degrees): every value is left out. */
export function stuckTogether(hours: TestedHours, findings: FindingList): void {
  const { dewPoint, dryBulb } = hours;
  const humidity = hours.steps.relativeHumidityPct;
  const shortest = TOGETHER_H[dryBulb.resolution.usual] * hours.steps.stepsPerHour;
  const dry = dryBulb.values;
  const dew = dewPoint.values;
  for (const { start, end } of hours.unbroken) {
    if (!mayHoldRun(dry, { start, end, shortest })) continue;
    let first = start;
    for (let step = start + 1; step <= end; step++) {
      const goesOn =
        step < end &&
        dry[step] === dry[first] &&
        dew[step] === dew[first] &&
        Object.is(humidity[step], humidity[first]);
      if (goesOn) continue;
      if (step - first >= shortest && dry[first] !== MISSING_INT16 && dew[first] !== MISSING_INT16) {
        tellTogether(hours, [first, step], findings);
        for (let each = first; each < step; each++) leaveOutHour(hours, each);
      }
      first = step;
    }
  }
}

/** Whether a stretch may hold a run: one would lie over a sample every half of its length, with the other half of it after that. */
function mayHoldRun(
  values: Int16Array,
  { start, end, shortest }: { start: number; end: number; shortest: number },
): boolean {
  const stride = shortest >> 1;
  for (let sample = start; sample + 2 < end; sample += stride) {
    if (values[sample] === values[sample + 1] && values[sample] === values[sample + 2]) return true;
  }
  return false;
}

function tellTogether(hours: TestedHours, [start, end]: readonly [number, number], findings: FindingList): void {
  const dry = degrees(hours.dryBulb.values[start] ?? 0);
  const dew = degrees(hours.dewPoint.values[start] ?? 0);
  const length = Math.round((end - start) / hours.steps.stepsPerHour);
  tellSpan(
    hours,
    {
      start,
      end,
      code: 'stuck',
      severity: 'doubt',
      variable: 'every value',
      done: 'left out',
      sentence: () =>
        `dry bulb (${dry} °C), dew point (${dew} °C) and relative humidity stay the same together for ${hoursPhrase(length)}; these hours are left out.`,
    },
    findings,
  );
}
