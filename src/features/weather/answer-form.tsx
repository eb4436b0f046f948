import { useMutation } from '@tanstack/react-query';
import { FormProvider, type Resolver, useForm } from 'react-hook-form';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import { answerWeatherFile, type FileAnswers } from '../../contract/weather-reading.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { problemsOfError } from '../../lib/form-problems.ts';
import { plural } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { type AnswerDraft, draftOfRecord, readAnswers } from './answer-draft.ts';
import { placeAsks, questionsOf, showsPlace } from './answer-questions.ts';
import { HandlingField } from './handling-field.tsx';
import { PlaceForm } from './place-form.tsx';
import { QuestionField } from './question-field.tsx';
import { SampleTable } from './sample-table.tsx';
import { TableMapping } from './table-mapping.tsx';
import { useWeatherChanged } from './weather-queries.ts';

interface AnswerFormProps {
  readonly record: WeatherFileRecord;
  readonly onAnswered: (answers: FileAnswers) => void;
}

/** Everything that a file asks, in one form; it is read anew by what is sent. */
export function AnswerForm({ record, onAnswered }: AnswerFormProps) {
  const { teamId } = useTeam();
  const changed = useWeatherChanged();
  const form = useForm<AnswerDraft, unknown, FileAnswers>({
    defaultValues: draftOfRecord(record),
    resolver: resolverOf(record),
  });
  const answer = useMutation({
    mutationFn: (body: FileAnswers) =>
      call(answerWeatherFile, { params: { teamId, fileId: record.file.id }, query: {}, body }),
    onSuccess: (_file, answers) => onAnswered(answers),
    onError: (error) => {
      for (const [field, message] of Object.entries(problemsOfError(error)?.fields ?? {}))
        form.setError(fieldOfPath(field), { message });
    },
    onSettled: changed,
  });
  const questions = questionsOf(record);
  const chosen = new Set<string>(questions.map(({ code }) => code));
  const faults = countFaults(form.formState.errors);
  const formFault = form.formState.errors.root?.message;
  return (
    <FormProvider {...form}>
      <form
        noValidate
        aria-labelledby="answering"
        className="grid grid-cols-[minmax(0,1fr)] gap-6"
        onSubmit={form.handleSubmit((answers) => answer.mutate(answers))}
      >
        {record.table === null ? null : (
          <>
            <TableMapping table={record.table} />
            <SampleTable record={record} />
          </>
        )}
        {questions.map((question) => (
          <QuestionField key={question.code} question={question} />
        ))}
        {showsPlace(record) ? (
          <PlaceForm asks={placeAsks(record.asks).filter(({ what }) => !chosen.has(what))} />
        ) : null}
        <HandlingField record={record} />
        {answer.isError || formFault ? (
          <Notice tone="wrong" live title="Not answered">
            {formFault ?? errorSentence(answer.error)}
          </Notice>
        ) : null}
        <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
          <Button type="submit" look="primary" busy={answer.isPending}>
            Answer and read the file again
          </Button>
          <p role="status" className={faults > 0 ? 'font-medium text-madder' : 'text-fine text-soft'}>
            {faults > 0 ? `${plural(faults, 'fault')} to mend in the fields above.` : lastWords(record)}
          </p>
        </div>
      </form>
    </FormProvider>
  );
}

function lastWords({ table }: WeatherFileRecord): string {
  return table === null
    ? 'Your name is kept with the answer.'
    : 'How the table is read is remembered: other files of its shape are read too, and do not ask again for their columns.';
}

type Fault = { readonly type: string; readonly message: string };
type ErrorTree = { readonly [name: string]: unknown };

/** The form is valid when its answers can be sent; else every fault stands at its field. */
function resolverOf(record: WeatherFileRecord): Resolver<AnswerDraft, unknown, FileAnswers> {
  return (draft) => {
    const reading = readAnswers(draft, record);
    if (reading.ok) return { values: reading.answers, errors: {} };
    const errors: Record<string, Fault | Record<string, Fault>> = {};
    const groups: Record<string, Record<string, Fault>> = {};
    for (const [path, message] of Object.entries(reading.problems)) {
      const [group = '', name] = path.split('.');
      const fault = { type: 'custom', message };
      if (name === undefined) errors.root = fault;
      else groups[group] = { ...groups[group], [name]: fault };
    }
    Object.assign(errors, groups);
    return { values: {}, errors };
  };
}

function countFaults(errors: ErrorTree): number {
  return Object.entries(errors)
    .filter(([group]) => group !== 'root')
    .reduce((sum, [, group]) => sum + Object.keys(group ?? {}).length, 0);
}

/** Fields of the form by the path of the request. */
const serverFields = {
  'place.name': 'place.name',
  'place.latitude': 'place.latitude',
  'place.longitude': 'place.longitude',
  'place.elevationM': 'place.elevationM',
  'place.utcOffsetH': 'place.utcOffsetH',
  'mapping.time.zone': 'mapping.zone',
  'mapping.dryBulb.column': 'mapping.dryBulb',
  'mapping.dewPoint.column': 'mapping.dewPoint',
  'mapping.pressure.column': 'mapping.pressure',
} as const;

function fieldOfPath(path: string) {
  return Object.entries(serverFields).find(([each]) => each === path)?.[1] ?? 'root';
}
