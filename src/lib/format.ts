/**
 * Numbers, places and dates as they are printed. A number and its unit are held together by a no-break space; a
 * negative number has a true minus sign. Nothing is printed with more digits than its source carries.
 */
const NO_BREAK = '\u00a0';

const formats = new Map<number, Intl.NumberFormat>();

/** `decimals` digits after the point, thousands separated by commas: 8,760. */
export function number(value: number, decimals = 0): string {
  let format = formats.get(decimals);
  if (!format) {
    format = new Intl.NumberFormat('en', { minimumFractionDigits: decimals, maximumFractionDigits: decimals });
    formats.set(decimals, format);
  }
  const printed = format.format(value);
  return (/[1-9]/.test(printed) ? printed : printed.replace('-', '')).replace('-', '−');
}

export function withUnit(value: number, unit: string, decimals = 0): string {
  return unit === '' ? number(value, decimals) : `${number(value, decimals)}${NO_BREAK}${unit}`;
}

export const hours = (value: number) => withUnit(value, 'h');
export const temperatureC = (value: number, decimals = 1) => withUnit(value, '°C', decimals);
export const differenceK = (value: number, decimals = 1) => withUnit(value, 'K', decimals);
export const percent = (value: number, decimals = 1) => withUnit(value, '%', decimals);
/** Given in Pa: 889 hPa. */
export const pressureHPa = (valuePa: number) => withUnit(valuePa / 100, 'hPa');
export const metres = (value: number) => withUnit(value, 'm');

/** Three significant digits, at most one decimal: for litres, kilowatt hours and raw values of any size. */
export function sensible(value: number, unit = ''): string {
  const size = Math.abs(value);
  const decimals = size >= 100 || Number.isInteger(value) ? 0 : size >= 1 ? 1 : 2;
  return withUnit(value, unit, decimals);
}

/** A share that stops short of 100 % or 0 % never prints as if it reached it: 99.97 is "99.9 %". */
export function share(valuePct: number): string {
  if (valuePct === 100 || valuePct === 0) return percent(valuePct, 0);
  return percent(Math.min(99.9, Math.max(0.1, valuePct)), 1);
}

export function position(place: { latitude: number; longitude: number }): string {
  const ns = `${number(Math.abs(place.latitude), 2)}°${NO_BREAK}${place.latitude < 0 ? 'S' : 'N'}`;
  const ew = `${number(Math.abs(place.longitude), 2)}°${NO_BREAK}${place.longitude < 0 ? 'W' : 'E'}`;
  return `${ns}, ${ew}`;
}

/** UTC+2, UTC−3:30, UTC. */
export function utcOffset(offsetH: number): string {
  const minutes = Math.round(Math.abs(offsetH) * 60);
  if (minutes === 0) return 'UTC';
  const rest = minutes % 60;
  const sign = offsetH < 0 ? '−' : '+';
  return `UTC${sign}${Math.floor(minutes / 60)}${rest === 0 ? '' : `:${String(rest).padStart(2, '0')}`}`;
}

const BYTE_UNITS = ['bytes', 'kB', 'MB', 'GB'] as const;

export function fileSize(bytes: number): string {
  let value = bytes;
  let step = 0;
  while (value >= 1000 && step < BYTE_UNITS.length - 1) {
    value /= 1000;
    step += 1;
  }
  const unit = BYTE_UNITS[step] ?? 'bytes';
  return withUnit(value, unit, step === 0 || value >= 10 ? 0 : 1);
}

/** The first 8 hexadecimal digits in two groups: enough to compare by eye. */
export function shortFingerprint(fingerprint: string): string {
  return `${fingerprint.slice(0, 4)}${NO_BREAK}${fingerprint.slice(4, 8)}`;
}

/** A moment in the reader's own time zone: 12 Nov 2026, 14:05. */
export function moment(iso: string, timeZone?: string): string {
  const at = new Date(iso);
  const zone = timeZone === undefined ? {} : { timeZone };
  const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', ...zone });
  const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', hourCycle: 'h23', ...zone });
  return `${day.format(at).replace('Sept', 'Sep')}, ${time.format(at)}`;
}

/** Seconds to wait, in words: "40 seconds", "5 minutes". */
export function waitingTime(seconds: number): string {
  if (seconds < 90) return plural(Math.max(1, Math.ceil(seconds)), 'second');
  return plural(Math.ceil(seconds / 60), 'minute');
}

/** The words with their first letter in upper case. */
export function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** Ends a sentence that was written without its full stop, and keeps its figures with their units. */
export function sentence(text: string): string {
  const held = text.replace(/(\d) (?=%|°C)/g, `$1${NO_BREAK}`);
  return /[.!?]$/.test(held) ? held : `${held}.`;
}

export function plural(count: number, noun: string, many = `${noun}s`): string {
  return `${number(count)} ${count === 1 ? noun : many}`;
}

/** "a", "a and b", "a, b and c". */
export function list(items: readonly string[]): string {
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} and ${items.at(-1) ?? ''}`;
}
