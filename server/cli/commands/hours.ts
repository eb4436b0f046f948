import { briefSentence } from '#engine/brief/brief-sentence.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import { hoursCsv, weatherYearText } from '#engine/run/hours-csv.ts';
import { hoursTable } from '#engine/run/hours-table.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { openJudgeableFile } from './judgeable-file.ts';
import { printTable } from './print-result.ts';

/** `muslin hours FILE --brief PRESET`: every hour of the file's year under the preset, as a table. */
export async function hours(context: CommandContext): Promise<ExitCode> {
  const opened = await openJudgeableFile(context);
  if (typeof opened === 'number') return opened;
  const { file, preset, brief, reading, place } = opened;
  const table = hoursTable({ year: reduceYear(reading).year, brief, ...place, lines: reading.hours.lines });
  await printTable(
    hoursCsv(table, {
      file,
      station: reading.station.name,
      weatherYear: weatherYearText(reading),
      licence: null,
      brief: preset,
      briefSentence: briefSentence(brief),
      zone: place.zone,
    }),
  );
  return 0;
}
