import { useFormContext, useWatch } from 'react-hook-form';
import { componentWords } from '../../engine/brief/field-words.ts';
import { isRecord } from '../../engine/brief/fields.ts';
import { number, sensible } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import type { DraftValues } from './draft.ts';
import { useDraftScope } from './draft-context.ts';
import { inputLook, numberOf, ProblemNote } from './field-row.tsx';

const columns = [
  ['weight', 'Weight'],
  ['a0', '0 at'],
  ['a100', '100 at'],
] as const;

/** Components with their weights, which add up to 100, and the values that score 0 and 100. */
export function ScoreFields() {
  const { problems } = useDraftScope();
  const value: unknown = useWatch<DraftValues>({ name: 'score' });
  const parts = Array.isArray(value) ? value.filter(isRecord) : [];
  const sum = parts.reduce((total, { weight }) => total + (typeof weight === 'number' ? weight : 0), 0);
  return (
    <>
      <p className="pb-1 text-fine text-soft">
        Source: ours, a policy choice that the client accepts or changes. A component that does not apply to a place
        shares its weight over the others.
      </p>
      <ScrollInside label="Score weights and anchors, scrolls sideways">
        <table className="ruled min-w-[24rem]">
          <caption className="sr-only">Weight and anchors of each component</caption>
          <thead>
            <tr>
              <th scope="col">Component</th>
              {columns.map(([name, words]) => (
                <th key={name} scope="col" className="figure">
                  {words}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {parts.map((part, index) => (
              <ScoreRow key={String(part.component)} component={String(part.component)} path={`score.${index}`} />
            ))}
          </tbody>
          <tfoot>
            <tr>
              <th scope="row">Sum of weights, to be 100</th>
              <td className="figure">{sensible(sum)}</td>
              <td colSpan={2} />
            </tr>
          </tfoot>
        </table>
      </ScrollInside>
      <ProblemNote id="score-problem">{problems.score}</ProblemNote>
    </>
  );
}

function ScoreRow({ component, path }: { component: string; path: string }) {
  const { register } = useFormContext<DraftValues>();
  const { problems, preset } = useDraftScope();
  const byDefault = preset?.score.find((part) => part.component === component);
  const found = columns.flatMap(([name]) => problems[`${path}.${name}`] ?? []);
  const words = componentWords(component);
  return (
    <tr>
      <th scope="row">
        {words.charAt(0).toUpperCase() + words.slice(1)}
        {byDefault ? (
          <span className="block text-fine text-soft">
            Preset: {number(byDefault.weight)}, {byDefault.a0} to {byDefault.a100}
          </span>
        ) : null}
        <ProblemNote id={`${path}-problem`}>{found.length === 0 ? undefined : found.join(' ')}</ProblemNote>
      </th>
      {columns.map(([name, column]) => (
        <td key={name} className="figure">
          <input
            {...register(`${path}.${name}`, { setValueAs: numberOf })}
            aria-label={`${words}: ${column.toLowerCase()}`}
            aria-invalid={problems[`${path}.${name}`] === undefined ? undefined : true}
            type="text"
            inputMode="decimal"
            autoComplete="off"
            className={`${inputLook(problems[`${path}.${name}`] !== undefined)} w-16 text-right`}
          />
        </td>
      ))}
    </tr>
  );
}
