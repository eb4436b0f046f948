import type { Place } from '../../contract/place.ts';
import type { ScorePart } from '../../contract/runs.ts';
import { number, sensible } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

type Shown = NonNullable<Place['shown']>;

/** How the score comes about, to the last figure: anyone can add it up again. */
export function ScoreArithmetic({ shown }: { shown: Shown }) {
  const sum = shown.parts.reduce((points, part) => points + (part.points ?? 0), 0);
  const weights = shown.parts.reduce((total, part) => total + (part.points === null ? 0 : part.weight), 0);
  return (
    <section aria-labelledby="arithmetic">
      <h2 id="arithmetic" className="mb-1 text-name">
        How the score is made
      </h2>
      <ScrollInside label="Score arithmetic, scrolls sideways">
        <table className="ruled min-w-[36rem]">
          <caption className="sr-only">Score arithmetic: each component, its anchors, weight and points</caption>
          <thead>
            <tr>
              <th scope="col">Component</th>
              <th scope="col" className="figure">
                Found
              </th>
              <th scope="col" className="figure">
                0 at
              </th>
              <th scope="col" className="figure">
                100 at
              </th>
              <th scope="col" className="figure">
                Scaled
              </th>
              <th scope="col" className="figure">
                Weight
              </th>
              <th scope="col" className="figure">
                Points
              </th>
            </tr>
          </thead>
          <tbody>
            {shown.parts.map((part) => (
              <PartRow key={part.component} part={part} />
            ))}
          </tbody>
          <tfoot>
            <tr>
              <th scope="row" colSpan={5}>
                {shown.score === null ? 'Sum' : `Sum, printed as ${shown.score}`}
              </th>
              <td className="figure">{number(weights, 1)}</td>
              <td className="figure">{number(sum, 2)}</td>
            </tr>
          </tfoot>
        </table>
      </ScrollInside>
      <p className="mt-1.5 max-w-[70ch] text-fine text-soft">
        Scaled = 100 × (found − 0 at) / (100 at − 0 at), held to 0 and 100. Points = scaled × weight / 100. Anchors and
        weights belong to the brief.
        {shown.geometricMean === null ? '' : ` Geometric mean of the same parts: ${number(shown.geometricMean, 1)}.`}
      </p>
    </section>
  );
}

function PartRow({ part }: { part: ScorePart }) {
  if (part.raw === null || part.normalised === null || part.points === null) {
    return (
      <tr>
        <th scope="row">{part.label}</th>
        <td colSpan={6} className="text-soft">
          not applicable; its weight is shared over the others
        </td>
      </tr>
    );
  }
  return (
    <tr>
      <th scope="row">
        {part.label}, <span className="text-soft">{part.unit}</span>
      </th>
      <td className="figure">{number(part.raw, Math.abs(part.raw) < 10 ? 2 : 1)}</td>
      <td className="figure text-soft">{sensible(part.a0)}</td>
      <td className="figure text-soft">{sensible(part.a100)}</td>
      <td className="figure">{number(part.normalised, 1)}</td>
      <td className="figure">{number(part.weight, 1)}</td>
      <td className="figure font-medium">{number(part.points, 2)}</td>
    </tr>
  );
}
