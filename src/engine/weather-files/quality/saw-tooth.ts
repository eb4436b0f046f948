import { MISSING_INT16 } from '../../conventions.ts';
import { monthNames } from '../../reduction/calendar.ts';
import { VALUE } from '../assembly/source-rows.ts';
import { type FindingList, whole } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { leaveOut, type StepSpan, type TestedHours } from './tested-hours.ts';

const JUMP = 1_000;
const MOST_SHARE = 0.02;

/** A month whose dew point jumps by more than 10 K from one hour to the next in over 2 % of its hours loses its humidity. */
export function sawTooth(hours: TestedHours, findings: FindingList): void {
  const { bounds, values } = hours.dewPoint;
  if (bounds.change <= JUMP) return;
  hours.months.forEach((month, index) => {
    let jumps = 0;
    let before = MISSING_INT16;
    for (let step = month.start; step < month.end; step++) {
      const value = values[step] ?? MISSING_INT16;
      const change = value - before;
      if ((change > JUMP || change < -JUMP) && value !== MISSING_INT16 && before !== MISSING_INT16) jumps++;
      before = value;
    }
    if (jumps <= MOST_SHARE * (month.end - month.start)) return;
    tell(hours, { month, jumps, name: monthNames[index] ?? '' }, findings);
    for (let step = month.start; step < month.end; step++) {
      leaveOut(hours, step, VALUE.dewPoint);
      hours.steps.relativeHumidityPct[step] = Number.NaN;
    }
  });
}

function tell(
  hours: TestedHours,
  { jumps, month, name }: { month: StepSpan; jumps: number; name: string },
  findings: FindingList,
): void {
  tellSpan(
    hours,
    {
      ...month,
      code: 'saw-tooth',
      severity: 'doubt',
      variable: 'humidity',
      done: 'left out',
      sentence: () =>
        `in ${name} the dew point jumps by more than 10 K from one value to the next ${whole(jumps)} times, over 2 % of the month; the humidity of the month is left out.`,
    },
    findings,
  );
}
