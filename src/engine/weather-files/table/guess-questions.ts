import type { TableQuestion } from './table-guess.ts';
import type { TableLayout } from './table-layout.ts';
import type { TableMapping } from './table-mapping.ts';

/** What a person must decide before a table is read. */
export function questionsAbout(guess: {
  readonly layout: TableLayout;
  readonly mapping: TableMapping | null;
  /** null where no order of day and month is written. */
  readonly orderIsSure: boolean | null;
}): readonly TableQuestion[] {
  const { layout, mapping, orderIsSure } = guess;
  if (mapping === null) {
    const message = `Which columns hold the time, the dry bulb and a humidity? The table has ${layout.names.length}: ${layout.names.slice(0, 12).join(', ')}${layout.names.length > 12 ? ' …' : ''}.`;
    return [{ about: 'columns', message }];
  }
  const questions: (TableQuestion | null)[] = [
    { about: 'columns', message: 'Do these columns hold what is said beside them?' },
    { about: 'units', message: 'Are these the units? They were guessed from names and values.' },
    mapping.time.scale === 'in stamps'
      ? null
      : {
          about: 'time scale',
          message: 'Are the times in UTC, in local standard time, or in local clock time with daylight saving?',
        },
    {
      about: 'time mark',
      message: 'Does 14:00 mean the reading at 14:00, or the hour that ends or begins at 14:00?',
    },
    orderIsSure === false
      ? { about: 'date order', message: 'No date tells day from month. Does the day come first, or the month?' }
      : null,
    {
      about: 'years',
      message: 'Are the years real, or is this a typical year made of months?',
    },
    mapping.station === null
      ? null
      : { about: 'station', message: `Does the column “${mapping.station}” tell several stations apart?` },
  ];
  return questions.filter((question) => question !== null);
}

/** A mapping in one sentence, for the question that confirms it. */
export function mappingWords(mapping: TableMapping): string {
  const { dewPoint, dryBulb, pressure, relativeHumidity, time, wetBulb } = mapping;
  const degrees = { C: '°C', F: '°F', K: 'K' } as const;
  const parts = [
    `dry bulb from “${dryBulb.column}” in ${degrees[dryBulb.unit]}`,
    dewPoint === null ? null : `dew point from “${dewPoint.column}” in ${degrees[dewPoint.unit]}`,
    relativeHumidity === null
      ? null
      : `relative humidity from “${relativeHumidity.column}” ${relativeHumidity.unit === '%' ? 'in %' : 'as a fraction'}`,
    wetBulb === null ? null : `wet bulb from “${wetBulb.column}” in ${degrees[wetBulb.unit]}`,
    pressure === null
      ? 'no pressure'
      : `pressure from “${pressure.column}” in ${pressure.unit}${pressure.level === 'station' ? '' : ` (${pressure.level})`}`,
    {
      UTC: 'times in UTC',
      standard: 'local standard time',
      clock: 'local clock time',
      'in stamps': 'times with their offset',
    }[time.scale],
  ];
  const sentence = parts.filter((part) => part !== null).join(', ');
  return `${sentence.charAt(0).toUpperCase()}${sentence.slice(1)}.`;
}
