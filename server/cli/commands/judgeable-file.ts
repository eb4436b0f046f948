import type { Brief } from '#engine/brief/brief.ts';
import type { JudgeYearInput } from '#engine/run/judge-year.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { presetBrief, presetNames } from '../../features/briefs/presets.ts';
import { zoneOfStation } from '../../features/stations/zone-of-station.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { readArguments, WrongUse } from './command-arguments.ts';
import { openFile } from './open-file.ts';
import { say } from './print-result.ts';
import { statedOptions } from './stated-options.ts';
import { type WeatherMember, weatherMembers } from './weather-members.ts';

/** A file with the preset that its year is to be judged by. */
export interface JudgeableFile {
  readonly file: string;
  readonly preset: string;
  readonly brief: Brief;
  readonly reading: UsableReading;
  /** The file's own place. */
  readonly place: Pick<JudgeYearInput, 'zone' | 'heightM' | 'position'>;
}

/**
 * Reads `FILE --brief PRESET` and the file. What it asks, and why it cannot be judged, is said on standard error.
 * @returns the exit code where there is nothing to judge: 1 refused, 3 not to be read
 * @throws WrongUse
 */
export async function openJudgeableFile({ args, callerDir }: CommandContext): Promise<JudgeableFile | ExitCode> {
  const stated = readArguments(args);
  const { files, strict, brief: preset } = stated;
  const [file, ...more] = files;
  if (file === undefined || more.length > 0) throw new WrongUse('Name one weather file.');
  if (strict) throw new WrongUse('--strict belongs to the command read.');
  if (preset === null) throw new WrongUse('Name the preset: --brief office.');
  const brief = namedBrief(preset);

  const bytes = await openFile(file, callerDir);
  if (typeof bytes === 'string') {
    say(bytes);
    return 3;
  }
  const members: WeatherMember[] = [];
  for await (const each of weatherMembers(file, bytes)) members.push(each);
  const [member] = members;
  if (member === undefined || members.length > 1 || typeof member.content === 'string') {
    say(
      typeof member?.content === 'string' ? member.content : `${file} holds ${members.length} weather files, not one.`,
    );
    return 1;
  }
  const reading = readWeatherFile(member.content, member.name, await statedOptions(stated, callerDir));
  if (reading.status === 'refused') {
    const reasons = reading.findings.filter(({ severity }) => severity === 'refuse');
    say([`${file} is refused:`, ...reasons.map(({ message }) => message)].join('\n'));
    return 1;
  }
  for (const { message } of reading.asks) say(`${file} asks: ${message}`);
  if (reading.hours === null) return 1;
  const place = placeOf(reading);
  if (place === null) {
    say(`${file} does not say where and how high it was recorded, so its hours cannot be judged.`);
    return 1;
  }
  return { file, preset, brief, reading, place };
}

/** @throws WrongUse when no preset has that name */
function namedBrief(name: string): Brief {
  if (presetNames().includes(name)) return presetBrief(name);
  throw new WrongUse(`There is no preset "${name}". The presets are ${presetNames().join(', ')}.`);
}

function placeOf({ station }: UsableReading): JudgeableFile['place'] | null {
  const { latitude, longitude, elevationM, utcOffsetH } = station;
  if (latitude === null || longitude === null || elevationM === null) return null;
  return {
    zone: zoneOfStation({ latitude, longitude, utcOffsetH: utcOffsetH ?? Math.round(longitude / 15) }),
    heightM: elevationM,
    position: { latitude, longitude },
  };
}
