import type { Ask, Finding, Severity } from '../../contract/weather.ts';
import { SeverityMark } from './status-mark.tsx';
import { severityOrder, severityTitle } from './weather-words.ts';

interface FindingsProps {
  readonly findings: readonly Finding[];
  readonly asks: readonly Ask[];
  readonly isReading: boolean;
}

interface Row {
  readonly key: string;
  readonly where: string;
  readonly message: string;
  readonly proposal: string | null;
}

/** What was found in the file, gravest first, each with the line it stands on. */
export function Findings({ findings, asks, isReading }: FindingsProps) {
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
                <tr key={row.key}>
                  <td className="w-36 whitespace-nowrap text-soft max-sm:w-24 max-sm:whitespace-normal">{row.where}</td>
                  <td>
                    <p className="max-w-[80ch]">{row.message}</p>
                    {row.proposal ? <p className="max-w-[80ch] text-soft">The file suggests: {row.proposal}</p> : null}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      ))}
    </section>
  );
}

/** A question is one row: the finding says where, the ask what answer is likely. */
function rowsOf(severity: Severity, findings: readonly Finding[], asks: readonly Ask[]): Row[] {
  const found = findings.filter((finding) => finding.severity === severity);
  const rows = found.map((finding, index): Row => {
    const ask = severity === 'ask' ? asks.find(({ what }) => what === finding.code) : undefined;
    const key = `${finding.code}-${finding.line}-${index}`;
    return { key, where: whereOf(finding), message: finding.message, proposal: ask?.proposal ?? null };
  });
  if (severity !== 'ask') return rows;
  const alone = asks.filter(({ what }) => !found.some(({ code }) => code === what));
  return [
    ...rows,
    ...alone.map(({ what, message, proposal }) => ({ key: what, where: 'Whole file', message, proposal })),
  ];
}

function whereOf({ line, column }: Finding): string {
  if (line === null) return 'Whole file';
  return column === null ? `Line ${line}` : `Line ${line}, column ${column}`;
}
