import { list } from '../../lib/format.ts';
import type { Mapping } from './mapping-draft.ts';

const unitWords: Readonly<Record<string, string>> = { C: '°C', F: '°F', fraction: '0 to 1' };

const scaleWords: Readonly<Record<Mapping['time']['scale'], string>> = {
  UTC: 'UTC',
  standard: 'local standard time',
  clock: 'local clock time',
  'in stamps': 'the offset that each time carries',
};

const markWords: Readonly<Record<Mapping['time']['mark'], string>> = {
  reading: 'the reading at that time',
  ending: 'the hour that ends then',
  beginning: 'the hour that begins then',
};

/** How a table was read, in a sentence for its columns and one for its times. */
export function mappingSentences(mapping: Mapping): readonly [columns: string, times: string] {
  const { dryBulb, dewPoint, relativeHumidity, wetBulb, pressure, time, years } = mapping;
  const columns = [
    named('dry bulb', dryBulb),
    named('dew point', dewPoint),
    named('relative humidity', relativeHumidity),
    named('wet bulb', wetBulb),
    pressure === null
      ? null
      : `${named('pressure', pressure)}${pressure.level === 'station' ? '' : ` (${pressure.level})`}`,
  ].filter((words) => words !== null);
  const zone = time.zone === null ? '' : ` (${time.zone})`;
  const kind = years === 'actual' ? 'real years' : 'a typical year made of months';
  return [
    `${list(columns)}.`,
    `Times in ${scaleWords[time.scale]}${zone}; each stands for ${markWords[time.mark]}; ${kind}.`,
  ];
}

function named(quantity: string, found: { readonly column: string; readonly unit: string } | null): string | null {
  return found === null ? null : `${quantity} from “${found.column}” in ${unitWords[found.unit] ?? found.unit}`;
}
