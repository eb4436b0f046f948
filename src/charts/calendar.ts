/** Days and months of a weather year, without a clock: a year of 365 or 366 days that starts on 1 January. */

export const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;

/** Day of the year, 0 first, on which each month starts. */
export function monthStarts(days: number): number[] {
  const lengths = [31, days === 366 ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
  let start = 0;
  return lengths.map((length) => {
    const first = start;
    start += length;
    return first;
  });
}

/** "3 Jan" of a day of the year, 0 first. @throws RangeError outside the year. */
export function dayLabel(day: number, days: number): string {
  if (!(day >= 0 && day < days)) throw new RangeError(`Day ${day} is outside a year of ${days} days.`);
  const starts = monthStarts(days);
  const month = starts.findLastIndex((start) => start <= day);
  return `${day - (starts[month] ?? 0) + 1} ${monthNames[month] ?? ''}`;
}

/** "13:00 to 14:00": the hour that ends at `hourEnding` (1 to 24) of its day. */
export function hourLabel(hourEnding: number): string {
  const clock = (hour: number) => `${String(hour).padStart(2, '0')}:00`;
  return `${clock(hourEnding - 1)} to ${clock(hourEnding)}`;
}
