import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { type DutyName, dutyNames, type SiteDuty, type SiteRecord } from '../../contract/site-record.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { type ProgrammeKey, useSiteActs } from './site-queries.ts';

/** Statements, never an assurance: what the law of the place asks goes before them. */
const statements: Readonly<Record<DutyName, { title: string; statement: string }>> = {
  'water safety plan': {
    title: 'Water safety plan',
    statement:
      'Wetted equipment needs a water safety plan against legionella before it is wetted, under local codes and standards (ASHRAE Standard 188 and Guideline 12, or the local equivalents).',
  },
  notification: {
    title: 'Notification',
    statement:
      'Many authorities are told of cooling towers and evaporative condensers before they run; some count hybrid and adiabatic units among them. Ask the authority of the place.',
  },
  noise: {
    title: 'Noise',
    statement:
      'Find the limits by day and by night at the nearest neighbour, and how far away that is. Local rules set them.',
  },
  'drain-down': {
    title: 'Drain-down',
    statement: 'Wetted parts are drained before frost and before they stand idle. Say who does it, and by when.',
  },
};

interface DutiesPanelProps {
  readonly programme: ProgrammeKey;
  readonly record: SiteRecord;
  readonly mayChange: boolean;
}

/** Who sees to what at this site, and by when. */
export function DutiesPanel({ programme, record, mayChange }: DutiesPanelProps) {
  return (
    <section aria-labelledby="duties">
      <h2 id="duties" className="text-name">
        Duties
      </h2>
      <p className="mb-2 max-w-[70ch] text-soft">
        Statements with an owner and a date; they assure nothing. Local law and codes go before them, and a licensed
        engineer is responsible for the design.
      </p>
      <ul>
        {dutyNames.map((duty) => {
          const stored = record.duties.find((each) => each.duty === duty);
          return (
            <DutyRow
              key={`${duty} ${JSON.stringify(stored ?? null)}`}
              programme={programme}
              siteId={record.site.id}
              duty={stored ?? { duty, owner: '', dueOn: null, doneOn: null, note: '' }}
              mayChange={mayChange}
            />
          );
        })}
      </ul>
    </section>
  );
}

interface DutyRowProps {
  readonly programme: ProgrammeKey;
  readonly siteId: string;
  readonly duty: SiteDuty;
  readonly mayChange: boolean;
}

function DutyRow({ programme, siteId, duty, mayChange }: DutyRowProps) {
  const acts = useSiteActs(programme);
  const [draft, setDraft] = useState(duty);
  const isTyping = (['owner', 'dueOn', 'doneOn', 'note'] as const).some((field) => draft[field] !== duty[field]);
  const save = useMutation({
    mutationFn: ({ owner, dueOn, doneOn, note }: SiteDuty) =>
      acts.setDuty(siteId, duty.duty, { owner, dueOn, doneOn, note }),
  });
  const { title, statement } = statements[duty.duty];
  const submit = (event: FormEvent) => {
    event.preventDefault();
    save.mutate(draft);
  };
  const date = (value: string) => (value === '' ? null : value);
  return (
    <li className="border-t border-line py-3">
      <h3 className="text-body text-ink">{title}</h3>
      <p className="max-w-[80ch] text-fine text-soft">{statement}</p>
      {mayChange ? (
        <form
          noValidate
          onSubmit={submit}
          aria-label={title}
          className="mt-2 grid grid-cols-2 items-end gap-x-3 gap-y-2 lg:grid-cols-[12rem_10rem_10rem_minmax(0,1fr)_auto]"
        >
          <TextField
            label="Owner"
            value={draft.owner}
            maxLength={120}
            onChange={(owner) => setDraft({ ...draft, owner })}
          />
          <TextField
            label="By"
            type="date"
            value={draft.dueOn ?? ''}
            onChange={(value) => setDraft({ ...draft, dueOn: date(value) })}
          />
          <TextField
            label="Done on"
            type="date"
            value={draft.doneOn ?? ''}
            onChange={(value) => setDraft({ ...draft, doneOn: date(value) })}
          />
          <TextField
            label="Note"
            value={draft.note}
            maxLength={500}
            onChange={(note) => setDraft({ ...draft, note })}
          />
          <Button type="submit" busy={save.isPending} disabled={!isTyping} className="min-h-10">
            Save
          </Button>
        </form>
      ) : (
        <p className="mt-1">
          {duty.owner === '' ? 'No owner yet' : duty.owner}
          {duty.dueOn === null ? '' : `, by ${duty.dueOn}`}
          {duty.doneOn === null ? '' : `, done on ${duty.doneOn}`}
          {duty.note === '' ? '' : `. ${duty.note}`}
        </p>
      )}
      {save.isError ? (
        <div className="mt-2">
          <Notice tone="wrong" live title="Not saved">
            {errorSentence(save.error)}
          </Notice>
        </div>
      ) : null}
    </li>
  );
}
