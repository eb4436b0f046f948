import { TableMappingBody } from '#contract/weather-answers.ts';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';
import { standardZoneAt } from '../../features/stations/standard-zone-at.ts';
import { shippedRelief } from '../../tiles/relief.ts';
import { type CommandArguments, WrongUse } from './command-arguments.ts';
import { openFile } from './open-file.ts';

/**
 * What the command line says of its files: the place, the mapping of a table, zones by position and the shipped relief.
 * @throws WrongUse on a mapping that is none
 */
export async function statedOptions(args: CommandArguments, callerDir: string): Promise<ReadOptions> {
  const mapping = args.columns === null ? null : await openMapping(args.columns, callerDir);
  return {
    zoneAt: standardZoneAt,
    relief: shippedRelief(),
    ...(args.place === null ? {} : { place: args.place }),
    ...(mapping === null ? {} : { mapping }),
  };
}

async function openMapping(file: string, callerDir: string): Promise<TableMapping> {
  const bytes = await openFile(file, callerDir);
  if (typeof bytes === 'string') throw new WrongUse(bytes);
  const parsed = TableMappingBody.safeParse(jsonOf(bytes, file));
  if (parsed.success) return parsed.data;
  const faults = parsed.error.issues.map(({ message, path }) => `${path.join('.') || 'the whole'}: ${message}`);
  throw new WrongUse(`${file} is no mapping of a table. ${faults.join(' ')}`);
}

function jsonOf(bytes: Uint8Array, file: string): unknown {
  try {
    return JSON.parse(new TextDecoder().decode(bytes));
  } catch {
    throw new WrongUse(`${file} is not JSON.`);
  }
}
