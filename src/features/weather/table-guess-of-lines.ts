import type { TableGuess } from '../../contract/weather.ts';
import { guessTable } from '../../engine/weather-files/table/guess-table.ts';
import { findLayout } from '../../engine/weather-files/table/table-layout.ts';
import { decodeText } from '../../engine/weather-files/text/decode-text.ts';

/** What a table seems to hold by its first lines alone, to correct the answer of one that has been read; null where they show none. */
export function tableGuessOf(lines: readonly string[]): TableGuess | null {
  const text = decodeText(new TextEncoder().encode(`${lines.join('\n')}\n`));
  if ('notText' in text) return null;
  const layout = findLayout(text);
  if ('reason' in layout) return null;
  const { columns, questions, sample, ...guess } = guessTable(text, layout);
  return {
    ...guess,
    columns: columns.map((column) => ({ ...column, cells: [...column.cells] })),
    questions: questions.map((question) => ({ ...question })),
    sample: sample.map((row) => ({ ...row })),
  };
}
