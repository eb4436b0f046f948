import type { BriefPreview } from '../../contract/briefs.ts';
import type { ScorePart } from '../../contract/runs.ts';
import { number, sensible } from '../../lib/format.ts';
import { type EffectSides, figure, head, headRight } from './effect-table.ts';

/** How the score of the draft comes about, component by component, each against the saved version. */
export function EffectPartsTable({ now, before, savedVersion }: EffectSides) {
  const sum = sumOfPoints(now);
  return (
    <table className="w-full text-fine">
      <caption className="sr-only">
        Score arithmetic: each component with its anchors, weight and points, and the change from version {savedVersion}
      </caption>
      <thead>
        <tr>
          <th scope="col" className={head}>
            Component
          </th>
          {['Found', 'Scaled', 'Weight', 'Points', 'Change'].map((words) => (
            <th key={words} scope="col" className={headRight}>
              {words}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {now.parts.map((part) => (
          <PartRow
            key={part.component}
            part={part}
            was={before?.parts.find(({ component }) => component === part.component)}
          />
        ))}
      </tbody>
      <tfoot className="border-t border-ink font-semibold">
        <tr>
          <th scope="row" colSpan={4} className="py-0.5 text-left font-semibold">
            {now.score === null ? 'Sum' : `Sum, printed as ${now.score}`}
          </th>
          <td className={figure}>{number(sum, 2)}</td>
          <td className={figure}>{before === undefined ? '' : signedPoints(sum - sumOfPoints(before))}</td>
        </tr>
      </tfoot>
    </table>
  );
}

function PartRow({ part, was }: { part: ScorePart; was: ScorePart | undefined }) {
  const { label, unit, a0, a100, raw, normalised, weight, points } = part;
  const name = (
    <th scope="row" className="border-t border-line py-0.5 text-left font-normal">
      {label}, {unit}
      <span className="block text-soft">
        0 at {sensible(a0)}, 100 at {sensible(a100)}
      </span>
    </th>
  );
  if (raw === null || normalised === null || points === null) {
    return (
      <tr>
        {name}
        <td colSpan={5} className="border-t border-line pl-2 text-right align-bottom text-soft">
          not applicable, its weight is shared
        </td>
      </tr>
    );
  }
  const cell = `border-t border-line py-0.5 ${figure}`;
  return (
    <tr>
      {name}
      <td className={cell}>{sensible(raw)}</td>
      <td className={cell}>{number(normalised, 1)}</td>
      <td className={cell}>{number(weight, 1)}</td>
      <td className={cell}>{number(points, 2)}</td>
      <td className={`${cell} text-soft`}>{was === undefined ? '' : signedPoints(points - (was.points ?? 0))}</td>
    </tr>
  );
}

function sumOfPoints({ parts }: BriefPreview): number {
  return parts.reduce((sum, { points }) => sum + (points ?? 0), 0);
}

/** "+1.25", "−0.40", "0". */
function signedPoints(change: number): string {
  const printed = number(change, 2);
  return printed === '0.00' ? '0' : `${change > 0 ? '+' : ''}${printed}`;
}
