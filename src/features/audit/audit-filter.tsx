import { type FormEvent, type ReactNode, useId, useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { teamAuditKinds } from '../../contract/audit.ts';
import { Button } from '../../ui/button.tsx';
import { type AuditView, auditSearch, changedAuditView, type FilterField, isNarrowed } from './audit-view.ts';
import { kindWords } from './audit-words.ts';

const input = 'min-h-9 w-full rounded-md border border-[#918a78] bg-paper px-2.5 text-body';

interface AuditFilterProps {
  readonly view: AuditView;
  readonly people: readonly { readonly id: string; readonly name: string }[];
}

/** What the trail is narrowed to; each choice is a step that Back takes back. */
export function AuditFilter({ view, people }: AuditFilterProps) {
  const navigate = useNavigate();
  const { filter } = view;
  const change = (field: FilterField) => (value: string) =>
    navigate(auditSearch(changedAuditView(view, field, value)), { preventScrollReset: true });
  return (
    <section
      aria-label="Filter of the trail"
      className="no-print grid grid-cols-2 items-end gap-x-3 gap-y-2 sm:flex sm:flex-wrap"
    >
      <Labelled label="From">
        {(id) => <DayField key={filter.from} id={id} value={filter.from} onDay={change('from')} />}
      </Labelled>
      <Labelled label="Until">
        {(id) => <DayField key={filter.until} id={id} value={filter.until} onDay={change('until')} />}
      </Labelled>
      <Labelled label="Person">
        {(id) => (
          <Choice id={id} value={filter.personId} any="Everybody" onChange={change('personId')}>
            {people.map(({ id: personId, name }) => (
              <option key={personId} value={personId}>
                {name}
              </option>
            ))}
          </Choice>
        )}
      </Labelled>
      <Labelled label="Kind">
        {(id) => (
          <Choice id={id} value={filter.kind} any="Every kind" onChange={change('kind')}>
            {teamAuditKinds.map((kind) => (
              <option key={kind} value={kind}>
                {kindWords[kind]}
              </option>
            ))}
          </Choice>
        )}
      </Labelled>
      <ObjectField key={filter.object} value={filter.object ?? ''} onObject={change('object')} />
      {isNarrowed(view) ? (
        <Link to="?" className="py-2 text-fine">
          Show everything
        </Link>
      ) : null}
    </section>
  );
}

function Labelled({ label, children }: { label: string; children: (id: string) => ReactNode }) {
  const id = useId();
  return (
    <div className="min-w-0 sm:w-40">
      <label htmlFor={id} className="block text-fine font-semibold text-soft">
        {label}
      </label>
      {children(id)}
    </div>
  );
}

/** A day counts once it is left whole: a date field also tells of every figure in between. */
function DayField(props: { id: string; value: string | undefined; onDay: (day: string) => void }) {
  const { id, value = '', onDay } = props;
  const [typed, setTyped] = useState(value);
  return (
    <input
      id={id}
      type="date"
      value={typed}
      onChange={({ currentTarget }) => setTyped(currentTarget.value)}
      onBlur={() => typed !== value && onDay(typed)}
      onKeyDown={({ key }) => key === 'Enter' && typed !== value && onDay(typed)}
      className={input}
    />
  );
}

interface ChoiceProps {
  readonly id: string;
  readonly value: string | undefined;
  readonly any: string;
  readonly onChange: (value: string) => void;
  readonly children: ReactNode;
}

function Choice({ id, value, any, onChange, children }: ChoiceProps) {
  return (
    <select
      id={id}
      value={value ?? ''}
      onChange={({ currentTarget }) => onChange(currentTarget.value)}
      className={input}
    >
      <option value="">{any}</option>
      {children}
    </select>
  );
}

function ObjectField({ value, onObject }: { value: string; onObject: (object: string) => void }) {
  const [typed, setTyped] = useState(value);
  const id = useId();
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onObject(typed.trim());
  };
  return (
    <search className="col-span-2 min-w-0 sm:w-80">
      <form onSubmit={submit}>
        <label htmlFor={id} className="block text-fine font-semibold text-soft">
          Name or id of what it was about
        </label>
        <div className="flex gap-2">
          <input
            id={id}
            type="search"
            maxLength={200}
            value={typed}
            onChange={({ currentTarget }) => setTyped(currentTarget.value)}
            className={input}
          />
          <Button type="submit">Find</Button>
        </div>
      </form>
    </search>
  );
}
