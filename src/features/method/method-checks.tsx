import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { errorSentence } from '../../lib/api-error.ts';
import { plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { type CheckRun, checkRunsQuery } from './check-runs.ts';

const tagWords: Readonly<Record<string, string>> = {
  seen: 'read in the source',
  computed: 'worked out from the formula named',
  definition: 'follows from the definition',
  'from memory': 'field knowledge, not confirmed',
};

/** Every published value, run in the engine when the page is opened. */
export function MethodChecks() {
  const runs = useQuery(checkRunsQuery);
  const [areOpen, setAreOpen] = useState(false);
  const answers = runs.data?.flatMap((run) => run.answers) ?? [];
  const held = answers.filter(({ holds }) => holds).length;
  return (
    <section aria-labelledby="checks" className="mt-10">
      <h2 id="checks" className="mb-2 text-name">
        Checks against published values
      </h2>
      <p className="mb-3 max-w-[70ch]">
        Published, computed and defined values, each run in the engine of this page just now. What is tagged “from
        memory” is field knowledge and no standard’s wording.
      </p>
      {runs.isPending ? <p role="status">Running the checks in the engine.</p> : null}
      {runs.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => runs.refetch()}>Try again</Button>}>
          {errorSentence(runs.error)}
        </Notice>
      ) : null}
      {runs.data ? (
        <>
          <div className="mb-3 flex flex-wrap items-baseline gap-x-4 gap-y-2">
            <p role="status" className={`font-semibold ${held === answers.length ? 'text-moss' : 'text-madder'}`}>
              {plural(runs.data.length, 'check')}: {held} of {plural(answers.length, 'value')} hold.
            </p>
            <Button onClick={() => setAreOpen(!areOpen)}>{areOpen ? 'Close all' : 'Open all'}</Button>
          </div>
          <ul aria-label="Checks" className="border-b border-line">
            {runs.data.map((run) => (
              <OneCheck key={`${run.check.id} ${areOpen}`} run={run} isOpen={areOpen} />
            ))}
          </ul>
        </>
      ) : null}
    </section>
  );
}

function OneCheck({ run: { check, answers, isComparison }, isOpen }: { run: CheckRun; isOpen: boolean }) {
  const held = answers.filter(({ holds }) => holds).length;
  return (
    <li className="border-t border-line">
      <details open={isOpen}>
        <summary className="cursor-pointer py-2">
          <span className="inline-block w-11 font-semibold">{check.id}</span>
          {check.what}
          <span
            className={`ml-2 whitespace-nowrap font-semibold ${held === answers.length ? 'text-moss' : 'text-madder'}`}
          >
            {held === answers.length
              ? `holds, ${answers.length} of ${answers.length}`
              : `does not hold, ${held} of ${answers.length}`}
          </span>
        </summary>
        <div className="pb-4 pl-11 max-sm:pl-0">
          <p className="mb-2 max-w-[70ch] text-fine text-soft">
            Source: {check.source}.
            {isComparison ? ' A formula of others, for comparison alone: no result of the product uses it.' : ''}
          </p>
          <ScrollInside label={`${check.id}, scrolls sideways`}>
            <table className="ruled min-w-[44rem]">
              <caption className="sr-only">{`${check.id}: expected and found`}</caption>
              <thead>
                <tr>
                  <th scope="col">What goes in</th>
                  <th scope="col">Expected</th>
                  <th scope="col">Tolerance</th>
                  <th scope="col">The engine gives</th>
                  <th scope="col">Holds</th>
                </tr>
              </thead>
              <tbody>
                {answers.map((answer) => (
                  <tr key={`${answer.input} ${answer.expected} ${answer.tolerance}`}>
                    <th scope="row">{answer.input}</th>
                    <td>
                      {answer.expected}
                      <span className="block text-fine text-soft">{tagWords[answer.tag] ?? answer.tag}</span>
                    </td>
                    <td className="whitespace-nowrap">{answer.tolerance}</td>
                    <td>{answer.found}</td>
                    <td className={answer.holds ? 'text-moss' : 'font-semibold text-madder'}>
                      {answer.holds ? 'yes' : 'no'}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </ScrollInside>
        </div>
      </details>
    </li>
  );
}
