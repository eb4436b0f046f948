import { useId, useState } from 'react';
import type { Ask, Finding, Severity } from '../../contract/weather.ts';
import { number } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { SeverityMark } from '../../ui/status-mark.tsx';
import { FindingRows } from './finding-rows.tsx';
import { severityOrder, severityTitle } from './weather-words.ts';

interface FindingsProps {
  /** The file whose original the reader may look at; without it rows cannot be shown. */
  readonly originalOf?: string | null;
  readonly findings: readonly Finding[];
  readonly asks: readonly Ask[];
  readonly isReading: boolean;
}

interface Row {
  readonly key: string;
  readonly where: string;
  readonly message: string;
  readonly proposal: string | null;
  /** null of a question that stands on no line. */
  readonly finding: Finding | null;
}

/** What was found in the file, gravest first, each with the line it stands on. */
export function Findings({ originalOf = null, findings, asks, isReading }: FindingsProps) {
  const groups = severityOrder
    .map((severity) => ({ severity, rows: rowsOf(severity, findings, asks) }))
    .filter(({ rows }) => rows.length > 0);
  if (isReading) return null;
  return (
    <section aria-labelledby="findings">
      <h2 id="findings" className="mb-2 text-name">
        What was found in the file
      </h2>
      {groups.length === 0 ? <p className="text-soft">Nothing to remark.</p> : null}
      {groups.map(({ severity, rows }) => (
        <div key={severity} className="mb-4">
          <h3 className="mb-1 flex items-center gap-2">
            <SeverityMark severity={severity} />
            {severityTitle[severity]}
          </h3>
          <table className="ruled">
            <caption className="sr-only">{severityTitle[severity]}</caption>
            <thead className="sr-only">
              <tr>
                <th scope="col">Where</th>
                <th scope="col">What</th>
              </tr>
            </thead>
            <tbody>
              {rows.map((row) => (
                <FindingRow key={row.key} row={row} originalOf={originalOf} />
              ))}
            </tbody>
          </table>
        </div>
      ))}
    </section>
  );
}

interface FindingRowProps {
  readonly row: Row;
  readonly originalOf: string | null;
}

function FindingRow({ row, originalOf }: FindingRowProps) {
  const [isOpen, setIsOpen] = useState(false);
  const id = useId();
  const { finding } = row;
  const line = finding?.line ?? null;
  return (
    <tr>
      <td className="w-36 text-soft max-sm:w-24">
        <span className="sm:whitespace-nowrap">{row.where}</span>
      </td>
      <td className="max-w-0">
        <p className="max-w-[80ch]">{row.message}</p>
        {finding ? <Facts finding={finding} /> : null}
        {row.proposal ? <p className="max-w-[80ch] text-soft">The file suggests: {row.proposal}</p> : null}
        {originalOf !== null && finding !== null && line !== null ? (
          <>
            <Button
              look="quiet"
              className="no-print text-fine"
              aria-expanded={isOpen}
              aria-controls={id}
              aria-label={`${isOpen ? 'Hide' : 'Show'} the rows, ${row.where}`}
              onClick={() => setIsOpen(!isOpen)}
            >
              {isOpen ? 'Hide the rows' : 'Show the rows'}
            </Button>
            <div id={id}>{isOpen ? <FindingRows fileId={originalOf} finding={{ ...finding, line }} /> : null}</div>
          </>
        ) : null}
      </td>
    </tr>
  );
}

/** Variable, how much, what was done: as far as the finding says them apart. */
function Facts({ finding }: { finding: Finding }) {
  const { variable, count, done } = finding;
  const words = [
    variable === null ? null : sentenceCase(variable),
    count > 1 ? `${number(count)} rows` : null,
    done,
  ].filter((word) => word !== null);
  return words.length === 0 ? null : <p className="text-fine text-soft">{sentenceCase(words.join(', '))}</p>;
}

function sentenceCase(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}`;
}

/** A question is one row: the finding says where, the ask what answer is likely. */
function rowsOf(severity: Severity, findings: readonly Finding[], asks: readonly Ask[]): Row[] {
  const found = findings.filter((finding) => finding.severity === severity);
  const rows = found.map((finding, index): Row => {
    const ask = severity === 'ask' ? asks.find(({ what }) => what === finding.code) : undefined;
    const key = `${finding.code}-${finding.line}-${index}`;
    return { key, where: whereOf(finding), message: finding.message, proposal: ask?.proposal ?? null, finding };
  });
  if (severity !== 'ask') return rows;
  const alone = asks.filter(({ what }) => !found.some(({ code }) => code === what));
  return [
    ...rows,
    ...alone.map(({ what, message, proposal }) => ({
      key: what,
      where: 'Whole file',
      message,
      proposal,
      finding: null,
    })),
  ];
}

function whereOf({ line, lastLine, column }: Finding): string {
  if (line === null) return 'Whole file';
  if (lastLine !== null && lastLine > line) return `Lines ${line} to ${lastLine}`;
  return column === null ? `Line ${line}` : `Line ${line}, column ${column}`;
}
