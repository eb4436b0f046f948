import type { ReadingStep, Severity, WeatherFile } from '../../contract/weather.ts';
import { mayChangeWeather, statusWord, yearWords } from '../../lib/file-words.ts';
import { plural } from '../../lib/format.ts';

export { mayChangeWeather, statusWord, yearWords };

export const stepWord: Readonly<Record<ReadingStep, string>> = {
  received: 'received',
  reading: 'reading',
  reducing: 'reducing',
  storing: 'storing',
};

/** A format as it is printed: the trade's names stand as they are, ours begin a line. */
export function formatWord(format: string): string {
  return format.charAt(0).toUpperCase() + format.slice(1);
}

type Stated = Pick<WeatherFile, 'status' | 'step' | 'failure' | 'findingCounts'>;

/** The status as it is printed, with what qualifies it: "In review, 2 doubts". */
export function statusWords({ status, step, failure, findingCounts }: Stated): string {
  if (failure !== null) return 'Stopped, a fault of ours';
  if (status === 'reading' && step) return step === 'reading' ? 'Reading' : `Reading, ${stepWord[step]}`;
  if (status === 'asks') return `Asks ${plural(Math.max(1, findingCounts.ask), 'question')}`;
  if (status === 'review' && findingCounts.doubt > 0) return `In review, ${plural(findingCounts.doubt, 'doubt')}`;
  return statusWord[status];
}

/** What a derived year came from: "from the typical year", "from the year 2019"; null of a measured one. */
export function parentWords(parent: WeatherFile['parent']): string | null {
  if (parent === null) return null;
  return parent.kind === 'actual' && parent.year !== null ? `from the year ${parent.year}` : 'from the typical year';
}

/** "Korrel Pan, typical year", or the file's own name until a station is known. */
export function recordTitle(file: Pick<WeatherFile, 'name' | 'station' | 'kind' | 'year'>): string {
  if (!file.station) return file.name;
  const year = yearWords(file);
  return year === '–' ? file.station.name : `${file.station.name}, ${year.toLowerCase()}`;
}

/** Gravest first, as findings are listed. */
export const severityOrder: readonly Severity[] = ['refuse', 'ask', 'doubt', 'repair', 'note'];

export const severityTitle: Readonly<Record<Severity, string>> = {
  refuse: 'Why it is refused',
  ask: 'What it asks',
  doubt: 'Doubts: used as they stand, or left out',
  repair: 'Repairs: changed or filled by a rule',
  note: 'Notes',
};
