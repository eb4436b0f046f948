import type { TableGuess } from '../../contract/weather.ts';
import { sampleRows } from '../../engine/weather-files/table/sample-rows.ts';
import { findLayout } from '../../engine/weather-files/table/table-layout.ts';
import { decodeText } from '../../engine/weather-files/text/decode-text.ts';
import type { Mapping } from './mapping-draft.ts';

export type SampleRow = TableGuess['sample'][number];

/**
 * The first rows of a table under a mapping, read by the engine itself from the first lines of the original. Null when those
 * lines alone do not show the table that was found in the whole file.
 */
export function sampleUnder(
  lines: readonly string[],
  mapping: Mapping,
  names: readonly string[],
): readonly SampleRow[] | null {
  const text = decodeText(new TextEncoder().encode(`${lines.join('\n')}\n`));
  if ('notText' in text) return null;
  const layout = findLayout(text);
  if ('reason' in layout || layout.names.join('\n') !== names.join('\n')) return null;
  return sampleRows(text, layout, mapping);
}
