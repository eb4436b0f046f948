import { dayLabel, hourLabel, monthNames } from '../../charts/calendar.ts';
import { classWords } from '../../charts/hour-class-words.ts';
import type { HourClass } from '../../engine/hour-classes/hour-class.ts';

/** Which hours of a run are listed: a bar, a cell of month by hour, a day of the cloth. */
export interface HourChoice {
  readonly hourClass?: HourClass;
  readonly met?: 'yes' | 'no';
  /** 1 to 12. */
  readonly month?: number;
  /** Hour of day by its end, 1 to 24. */
  readonly hour?: number;
  /** Day of the year, 1 first. */
  readonly day?: number;
}

/** "Too humid outside, in Jan, 13:00 to 14:00". */
export function hourChoiceWords({ hourClass, met, month, hour, day }: HourChoice, days: number): string {
  const what =
    hourClass === undefined
      ? met === 'no'
        ? 'Hours not met'
        : met === 'yes'
          ? 'Hours met'
          : 'Hours'
      : classWords[hourClass];
  return [
    what,
    ...(day === undefined ? [] : [dayLabel(day - 1, days)]),
    ...(month === undefined ? [] : [monthNames[month - 1] ?? '']),
    ...(hour === undefined ? [] : [hourLabel(hour)]),
  ].join(', ');
}
