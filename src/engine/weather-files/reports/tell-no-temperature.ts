import { type FindingList, whole } from '../finding-list.ts';

/** Station-years without any temperature exist in the collections. */
export function tellNoTemperature(reports: number, findings: FindingList): void {
  findings.add({
    code: 'no-temperature',
    severity: 'refuse',
    count: reports,
    message: () =>
      reports === 0
        ? 'The file holds no report of an hour. Bring a file with the readings of a station.'
        : `None of the ${whole(reports)} reports holds a temperature: every one is the code for missing. Bring a station-year with temperatures.`,
  });
}
