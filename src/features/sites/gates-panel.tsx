import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useEffect, useState } from 'react';
import type { SiteRecord } from '../../contract/site-record.ts';
import { ASKED_OF_EVERY_PLACE } from '../../engine/score/gates.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import type { SiteDesk } from './use-site-desk.ts';

type Gate = SiteRecord['site']['gates'][number];

const PANEL = 'gates';
const answers = [
  { value: 'not known', word: 'Not known' },
  { value: 'pass', word: 'Pass' },
  { value: 'fail', word: 'Fail' },
] as const;

/** Gates in a few words more. */
const meaning: Readonly<Record<string, string>> = {
  'water available': 'Legally and on the peak day; the utility’s written answer outranks any map of water stress.',
  'exclusions of use': 'Anything about the use that rules wetted cooling out.',
  hygiene: 'Clinical or food hygiene, and those at risk who breathe the air.',
};

interface GatesPanelProps {
  readonly record: SiteRecord;
  readonly desk: SiteDesk;
  readonly mayChange: boolean;
}

/** Conditions outside the score, as a person answers them for this site. */
export function GatesPanel({ record, desk, mayChange }: GatesPanelProps) {
  const stored = gatesOf(record);
  const [draft, setDraft] = useState<readonly Gate[] | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const gates = draft ?? stored;
  const { setTyping } = desk;
  useEffect(() => setTyping(PANEL, draft !== null), [setTyping, draft]);
  const save = useMutation({
    mutationFn: (answered: readonly Gate[]) =>
      desk.save({ gates: answered.filter(({ answer, note }) => answer !== 'not known' || note !== '') }),
    onSuccess: () => setDraft(null),
  });
  const change = (gate: string, next: Partial<Gate>) =>
    setDraft(gates.map((each) => (each.gate === gate ? { ...each, ...next } : each)));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const unsaid = gates.find(({ answer, note }) => answer === 'fail' && note.trim() === '');
    setProblem(unsaid ? `Say why “${unsaid.gate}” fails: the note is printed in place of the score.` : null);
    if (!unsaid) save.mutate(gates.map((each) => ({ ...each, note: each.note.trim() })));
  };
  return (
    <form noValidate onSubmit={submit} aria-labelledby="gates" className="grid gap-3">
      <div>
        <h2 id="gates" className="text-name">
          Constraints
        </h2>
        <p className="max-w-[70ch] text-soft">
          Gates outside the score. One that fails excludes the site, with its note; one not known stands beside the
          score and is answered or waived before sign-off.
        </p>
      </div>
      <ul className="grid gap-3">
        {gates.map(({ gate, answer, note }) => (
          <li
            key={gate}
            className="grid gap-x-4 gap-y-1.5 border-t border-line pt-2.5 sm:grid-cols-[14rem_9rem_minmax(0,1fr)]"
          >
            <div>
              <p className="font-medium first-letter:uppercase">{gate}</p>
              {meaning[gate] === undefined ? null : <p className="text-fine text-soft">{meaning[gate]}</p>}
            </div>
            {mayChange ? (
              <>
                <select
                  aria-label={`Answer for ${gate}`}
                  value={answer}
                  onChange={({ currentTarget }) =>
                    change(gate, {
                      answer: answers.find(({ value }) => value === currentTarget.value)?.value ?? answer,
                    })
                  }
                  className="min-h-9 self-start rounded-md border border-[#918a78] bg-paper px-2.5 text-body"
                >
                  {answers.map(({ value, word }) => (
                    <option key={value} value={value}>
                      {word}
                    </option>
                  ))}
                </select>
                <input
                  aria-label={`Note on ${gate}`}
                  value={note}
                  maxLength={500}
                  placeholder={answer === 'fail' ? 'Why it fails' : 'Note: by whom, on what paper'}
                  onChange={({ currentTarget }) => change(gate, { note: currentTarget.value })}
                  className="min-h-9 min-w-0 self-start rounded-md border border-[#918a78] bg-paper px-2.5 text-body"
                />
              </>
            ) : (
              <p className="sm:col-span-2">
                <span className="font-medium">{answers.find(({ value }) => value === answer)?.word}</span>
                {note === '' ? '' : `. ${note}`}
              </p>
            )}
          </li>
        ))}
      </ul>
      {problem !== null || (save.isError && !isApiError(save.error, 'conflict')) ? (
        <Notice tone="wrong" live title="Not saved">
          {problem ?? errorSentence(save.error)}
        </Notice>
      ) : null}
      {mayChange ? (
        <div className="flex flex-wrap items-center gap-3">
          <Button type="submit" look="primary" busy={save.isPending} disabled={draft === null}>
            Save the constraints
          </Button>
          {draft === null ? null : (
            <Button look="quiet" onClick={() => setDraft(null)}>
              Take back what was changed
            </Button>
          )}
          <span role="status" className="text-fine text-soft">
            {save.isSuccess && draft === null ? 'Saved.' : ''}
          </span>
        </div>
      ) : null}
    </form>
  );
}

/** What every place is asked, what the programme's briefs ask besides, and what was answered for a brief that is gone. */
function gatesOf({ site, askedGates }: SiteRecord): readonly Gate[] {
  const asked = [...new Set([...ASKED_OF_EVERY_PLACE, ...askedGates, ...site.gates.map(({ gate }) => gate)])];
  return asked.map(
    (gate) => site.gates.find((each) => each.gate === gate) ?? { gate, answer: 'not known' as const, note: '' },
  );
}
