import { useQuery } from '@tanstack/react-query';
import { useId, useState } from 'react';
import { type ApiDescription, getApiDescription } from '../../contract/api.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiQuery } from '../../lib/api-query.ts';
import { plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { type DescribedOperation, OperationDetails } from './operation-details.tsx';

/** The API as the server describes it, by noun; each operation unfolds. */
export function ApiReference() {
  const described = useQuery({ ...apiQuery(getApiDescription, { params: {}, query: {} }), staleTime: Infinity });
  if (described.isPending) return <Loading what="the description" />;
  if (described.isError)
    return (
      <Notice tone="wrong" live actions={<Button onClick={() => described.refetch()}>Try again</Button>}>
        {errorSentence(described.error)}
      </Notice>
    );
  return (
    <>
      <section aria-labelledby="begin" className="max-w-[70ch]">
        <h2 id="begin" className="mb-2 text-name">
          How a program begins
        </h2>
        <p>{described.data.info.description}</p>
        <p className="mt-2">
          The whole description in OpenAPI 3.1 stands at <a href={getApiDescription.path}>{getApiDescription.path}</a>.
        </p>
      </section>
      <Operations description={described.data} />
    </>
  );
}

function operationsOf({ paths }: ApiDescription): readonly DescribedOperation[] {
  return Object.entries(paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({ path, method, operation })),
  );
}

function fits({ path, operation }: DescribedOperation, asked: { text: string; onlyPrograms: boolean }): boolean {
  if (asked.onlyPrograms && operation['x-muslin-access'].scopes.length === 0) return false;
  const text = asked.text.trim().toLowerCase();
  return `${path} ${operation.summary} ${operation.operationId}`.toLowerCase().includes(text);
}

function Operations({ description }: { description: ApiDescription }) {
  const [text, setText] = useState('');
  const [onlyPrograms, setOnlyPrograms] = useState(true);
  const id = useId();
  const shown = operationsOf(description).filter((each) => fits(each, { text, onlyPrograms }));
  const groups = description.tags
    .map((tag) => ({ ...tag, operations: shown.filter(({ operation }) => operation.tags.includes(tag.name)) }))
    .filter(({ operations }) => operations.length > 0);
  return (
    <section aria-labelledby="operations">
      <h2 id="operations" className="mb-2 text-name">
        What it takes and answers
      </h2>
      <search className="no-print flex flex-wrap items-end gap-x-5 gap-y-2">
        <div className="w-full sm:w-72">
          <label htmlFor={id} className="block text-fine font-semibold text-soft">
            Path, name or word
          </label>
          <input
            id={id}
            type="search"
            value={text}
            onChange={({ currentTarget }) => setText(currentTarget.value)}
            className="min-h-9 w-full rounded-md border border-[#918a78] bg-paper px-2.5 text-body"
          />
        </div>
        <label className="flex min-h-9 items-center gap-2">
          <input
            type="checkbox"
            checked={onlyPrograms}
            onChange={({ currentTarget }) => setOnlyPrograms(currentTarget.checked)}
            className="size-4 accent-indigo"
          />
          Only what a token may
        </label>
        <p role="status" className="min-h-9 content-center text-soft">
          {plural(shown.length, 'operation')}
        </p>
      </search>
      {groups.map(({ name, description: about, operations }) => (
        <section key={name} aria-labelledby={`of-${name}`} className="mt-7">
          <h3 id={`of-${name}`} className="font-semibold">
            {name}
          </h3>
          <p className="mb-2 text-soft">{about}</p>
          <ul className="border-b border-line">
            {operations.map((each) => (
              <li key={each.operation.operationId} className="border-t border-line">
                <Operation {...each} />
              </li>
            ))}
          </ul>
        </section>
      ))}
    </section>
  );
}

/** What unfolds is drawn when it first does. */
function Operation(described: DescribedOperation) {
  const { path, method, operation } = described;
  const [isOpen, setOpen] = useState(false);
  return (
    <details onToggle={({ currentTarget }) => setOpen(currentTarget.open)}>
      <summary className="grid cursor-pointer list-none grid-cols-[3.5rem_minmax(0,1fr)] gap-x-3 py-2 hover:bg-shade">
        <span className="font-mono text-fine leading-[inherit] font-semibold">{method.toUpperCase()}</span>
        <span>
          <span className="font-mono text-fine leading-[inherit] [overflow-wrap:anywhere]">{shortPath(path)}</span>
          <span className="block text-soft">{operation.summary}</span>
        </span>
      </summary>
      {isOpen ? <OperationDetails {...described} /> : null}
    </details>
  );
}

/** A line may break behind a slash, not within a word. */
function shortPath(path: string): string {
  return path.replaceAll('/', '/\u200b');
}
