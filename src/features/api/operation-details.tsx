import type { ReactNode } from 'react';
import type { ApiOperation } from '../../contract/api.ts';
import { fileSize, list, number } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { CopyButton } from '../../ui/copy-button.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { curlLine } from './curl-line.ts';
import { limitWords, type SchemaRow, schemaRows, typeWords } from './schema-rows.ts';

export interface DescribedOperation {
  readonly path: string;
  readonly method: string;
  readonly operation: ApiOperation;
}

/** Everything of one operation: who may, what is sent, what comes back, what can go wrong, and a line to try it with. */
export function OperationDetails({ path, method, operation }: DescribedOperation) {
  const { teamId } = useTeam();
  const { parameters, requestBody, responses } = operation;
  const given = parameters.map(({ name, required, schema }): SchemaRow => {
    return { name, type: typeWords(schema), required, limits: limitWords(schema) };
  });
  const body = Object.values(requestBody?.content ?? {})[0]?.schema;
  const [media, answer] = Object.entries(responses['200']?.content ?? {})[0] ?? [];
  const isForPrograms = operation['x-muslin-access'].scopes.length > 0;
  const line = curlLine({ origin: window.location.origin, method, path, operation, own: { teamId } });
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4 pt-2 pb-5 sm:pl-[4.25rem]">
      <p className="max-w-[70ch]">
        {accessWords(operation)} {limitSentence(operation)}
      </p>
      {isForPrograms ? (
        <p className="flex flex-wrap items-baseline gap-x-3">
          <code className="font-mono text-fine [overflow-wrap:anywhere]">{line}</code>
          <CopyButton text={line} what={`a line that calls ${operation.operationId}`} />
        </p>
      ) : null}
      <Fields title="In the address" rows={given} />
      <Fields title="Sent" rows={body === undefined ? [] : schemaRows(body)} />
      {media === 'application/json' || media === 'text/event-stream' ? (
        <Fields title="Answered" rows={schemaRows(answer?.schema ?? {})} isAnswer />
      ) : (
        <Part title="Answered">
          <p>{media === undefined ? 'Nothing but that it is done (204).' : `A file, ${media}.`}</p>
        </Part>
      )}
      <Faults responses={responses} />
    </div>
  );
}

function accessWords(operation: ApiOperation): string {
  const { anyone, roles, scopes } = operation['x-muslin-access'];
  if (anyone) return 'Anybody may.';
  const people = roles.length === 0 ? 'Whoever is signed in may' : `For ${list(roles.map((role) => `${role}s`))}`;
  return scopes.length === 0 ? `${people}; not for tokens.` : `${people}, and tokens with ${list(scopes)}.`;
}

function limitSentence(operation: ApiOperation): string {
  const { requestsPerMinute, bodyBytes, seconds } = operation['x-muslin-limits'];
  const body = bodyBytes === 0 ? '' : ` of ${fileSize(bodyBytes)} at most`;
  return `${number(requestsPerMinute)} requests${body} a minute; answered within ${number(seconds)} s.`;
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section aria-label={title}>
      <h4 className="mb-1 text-fine font-semibold text-soft">{title}</h4>
      {children}
    </section>
  );
}

function Fields({ title, rows, isAnswer = false }: { title: string; rows: readonly SchemaRow[]; isAnswer?: boolean }) {
  if (rows.length === 0) return null;
  return (
    <Part title={title}>
      <ScrollInside label={`${title}, scrolls sideways`}>
        <table className="ruled min-w-[34rem] table-fixed">
          <thead className="sr-only">
            <tr>
              <th scope="col">Field</th>
              <th scope="col">Type</th>
              <th scope="col">Limits</th>
            </tr>
          </thead>
          <tbody>
            {rows.map(({ name, type, required, limits }) => (
              <tr key={`${name} ${type}`}>
                <th scope="row" className="w-2/5 font-mono text-fine [overflow-wrap:anywhere]">
                  {name}
                </th>
                <td className="w-1/4">
                  {type}
                  {required || isAnswer ? '' : ', may be left out'}
                </td>
                <td className="text-soft [overflow-wrap:anywhere]">{limits}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
    </Part>
  );
}

function Faults({ responses }: Pick<ApiOperation, 'responses'>) {
  const faults = Object.entries(responses).filter(([status]) => Number(status) >= 400);
  return (
    <Part title="What can go wrong">
      <ul className="max-w-[90ch]">
        {faults.map(([status, { description }]) => (
          <li key={status} className="grid grid-cols-[2.75rem_minmax(0,1fr)]">
            <span className="font-mono text-fine leading-[inherit]">{status}</span>
            <span className="whitespace-pre-line text-soft">{description}</span>
          </li>
        ))}
      </ul>
    </Part>
  );
}
