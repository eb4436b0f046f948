import { classWords } from '../../charts/hour-class-words.ts';
import type { HourList, ListedHour } from '../../contract/hour-list.ts';
import { differenceK, number, percent, sentence, temperatureC, withUnit } from '../../lib/format.ts';

const NONE = '–';

/** One hour in a sentence: its state, its class, why, and what is lacking. */
export function hourSentence(hour: ListedHour, list: Pick<HourList, 'limitUnit'>): string {
  const state =
    hour.dryBulbC === null
      ? ''
      : ` ${[
          temperatureC(hour.dryBulbC),
          ...(hour.wetBulbC === null ? [] : [`wet bulb ${temperatureC(hour.wetBulbC)}`]),
          ...(hour.relativeHumidityPct === null ? [] : [`${percent(hour.relativeHumidityPct, 0)} RH`]),
        ].join(', ')}.`;
  const short = hour.shortfall === null || hour.shortfall <= 0 ? '' : ` ${shortfallWords(hour, list)} short.`;
  const why = hour.reason === '' ? '' : ` ${sentence(hour.reason.charAt(0).toUpperCase() + hour.reason.slice(1))}`;
  return `${classWords[hour.hourClass]}.${state}${why}${short}`;
}

export function shortfallWords({ shortfall }: ListedHour, { limitUnit }: Pick<HourList, 'limitUnit'>): string {
  if (shortfall === null || shortfall <= 0) return NONE;
  return limitUnit === '°C' ? differenceK(shortfall) : withUnit(shortfall, 'points', 1);
}

/** A figure, or a dash where it is not known. */
export function figure(value: number | null, decimals = 1): string {
  return value === null ? NONE : number(value, decimals);
}

/** "14 Jul 13:00" of an end such as 2029-07-14T13:00. */
export function endWords(stamp: string): string {
  const [, month = '1', day = '', time = ''] = /^\d+-(\d+)-(\d+)T(\d\d:\d\d)/.exec(stamp) ?? [];
  const names = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
  return `${Number(day)}\u00a0${names[Number(month) - 1] ?? ''} ${time}`;
}
