import type { Brief } from './brief.ts';
import type { Fields } from './fields.ts';
import { parseHours } from './schedule-hours.ts';

type Schedule = Pick<Brief, 'clock' | 'months' | 'weekdays' | 'hours'>;

export function readSchedule(fields: Fields): Schedule {
  const written = fields.raw('hours') ?? '';
  const hours = fields.has('hours') ? String(written) : '0-24';
  if (typeof written !== 'string' || parseHours(hours) === null) {
    const shown = written === '' ? '' : `, not "${hours.slice(0, 40)}"`;
    fields.fault('hours', `opening and closing such as 8-18, at most 0-24, or daylight are needed${shown}`);
  }
  const dates = fields.list('dates', (date) => date);
  if (dates.length > 0) fields.fault('dates', 'single dates are not part of a schedule yet; leave the list empty');
  return {
    clock: fields.choice('clock', ['civil', 'standard']),
    months: readMonths(fields),
    weekdays: fields.choice('weekdays', ['all', 'mon-fri']),
    hours,
  };
}

function readMonths(fields: Fields): Brief['months'] {
  const value = fields.raw('months');
  if (value === undefined || value === 'all') return 'all';
  const months = fields.list('months', (month, path) => {
    if (typeof month === 'number' && Number.isInteger(month) && month >= 1 && month <= 12) return month;
    fields.fault('months', `${path} is no month: "all" or numbers from 1 to 12 are needed`);
    return 1;
  });
  if (Array.isArray(value) && months.length === 0) fields.fault('months', 'at least one month is needed, or "all"');
  return [...new Set(months)].toSorted((one, other) => one - other);
}
