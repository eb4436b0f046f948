import { useQuery } from '@tanstack/react-query';
import type { TurningChange, WhatWouldPass } from '../../contract/place-doubts.ts';
import { stageWords } from '../../engine/brief/field-words.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { capital, list, sensible } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { type PlaceAsked, type ProgrammeIds, whatWouldPassQuery } from './run-queries.ts';

interface TurningNoteProps {
  readonly ids: ProgrammeIds;
  readonly asked: PlaceAsked;
  /** Tries a change on the whole map; null where the sliders do not have it. */
  readonly onTry: (change: TurningChange) => (() => void) | null;
}

/** The least single change that turns the verdict of this place. */
export function TurningNote({ ids, asked, onTry }: TurningNoteProps) {
  const found = useQuery(whatWouldPassQuery(ids, asked));
  if (found.isError) {
    return (
      <p role="alert">
        {errorSentence(found.error)} <Button onClick={() => found.refetch()}>Try again</Button>
      </p>
    );
  }
  if (found.isPending) return <Loading what="what would turn the verdict" />;
  return <Turning found={found.data} onTry={onTry} />;
}

function Turning({ found, onTry }: { found: WhatWouldPass; onTry: TurningNoteProps['onTry'] }) {
  const { failed, changes, note, bounds } = found;
  return (
    <>
      {failed.length > 0 ? <p className="mb-1">Fails now: {list(failed)}.</p> : null}
      {note === null ? null : <p>{capital(note)}.</p>}
      {changes.length === 0 ? null : (
        <table className="ruled max-w-[44rem]">
          <caption className="sr-only">Single changes at which the verdict turns, the least first</caption>
          <thead>
            <tr>
              <th scope="col">One change</th>
              <th scope="col" className="figure">
                Now
              </th>
              <th scope="col" className="figure">
                Passes at
              </th>
              <th scope="col" className="figure">
                Score
              </th>
              <th scope="col">
                <span className="sr-only">Try</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {changes.map((change) => (
              <TurningRow key={`${change.path}-${change.stage ?? ''}`} change={change} act={onTry(change)} />
            ))}
          </tbody>
        </table>
      )}
      {bounds.length === 0 ? null : (
        <p className="mt-1 max-w-[70ch] text-fine text-soft">Looked for within these bounds: {list(bounds)}.</p>
      )}
    </>
  );
}

function TurningRow({ change, act }: { change: TurningChange; act: (() => void) | null }) {
  const { label, stage, from, to, unit, score } = change;
  return (
    <tr>
      <th scope="row">{stage === null ? label : `Permit ${stageWords(stage)} cooling`}</th>
      <td className="figure">{from === null ? '' : sensible(from, unit)}</td>
      <td className="figure font-medium">{to === null ? '' : sensible(to, unit)}</td>
      <td className="figure">{score ?? '–'}</td>
      <td className="figure">
        {act === null ? null : (
          <Button look="quiet" className="min-h-6!" onClick={act}>
            Try on the map
          </Button>
        )}
      </td>
    </tr>
  );
}
