import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useState } from 'react';
import { FormProvider, useForm, useWatch } from 'react-hook-form';
import { type BriefVersionRecord, saveBriefVersion } from '../../contract/briefs.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Notice } from '../../ui/notice.tsx';
import { BriefFieldsForm } from './brief-fields-form.tsx';
import { type BriefKey, presetsQuery } from './brief-queries.ts';
import { mayChangeBriefs } from './brief-words.ts';
import { bodyOfDraft, DraftForm, type DraftProblems, type DraftValues, draftOf, readDraftValues } from './draft.ts';
import { DraftScopeProvider } from './draft-context.ts';
import { DraftMargin } from './draft-margin.tsx';
import { DraftYear } from './draft-year.tsx';
import { useEffectOfDraft } from './use-effect-of-draft.ts';

interface BriefEditorProps {
  readonly briefKey: BriefKey;
  /** The version that the draft begins from. */
  readonly record: BriefVersionRecord;
  readonly onSaved: (version: number) => void;
}

/** The brief as a form, with what it makes of an example year beside it. */
export function BriefEditor({ briefKey, record, onSaved }: BriefEditorProps) {
  const { role } = useTeam();
  const mayChange = mayChangeBriefs(role);
  const presets = useQuery(presetsQuery(briefKey.teamId));
  const form = useForm<DraftValues>({
    defaultValues: draftOf(record.body),
    resolver: zodResolver(DraftForm),
    shouldFocusError: true,
  });
  const values = useWatch({ control: form.control });
  const reading = useMemo(() => readDraftValues(values), [values]);
  const effect = useEffectOfDraft(briefKey, { record, reading });
  const save = useMutation({
    mutationFn: (draft: DraftValues) => {
      const params = { teamId: briefKey.teamId, programmeId: briefKey.programmeId, briefId: briefKey.briefId };
      const body = { basedOn: record.version.version, body: bodyOfDraft(draft) };
      return call(saveBriefVersion, { params, query: {}, body });
    },
    onSuccess: ({ version }) => onSaved(version.version),
  });
  const problems: DraftProblems = { ...problemsOfSaving(save.error), ...(reading.ok ? {} : reading.problems) };
  useWarningBeforeLeaving(mayChange && form.formState.isDirty && !save.isSuccess);
  const preset = presets.data?.items.find(({ id }) => id === record.body.preset)?.body ?? null;
  return (
    <FormProvider {...form}>
      <DraftScopeProvider value={{ problems, preset }}>
        <form
          noValidate
          onSubmit={form.handleSubmit((draft) => save.mutate(draft))}
          className="grid grid-cols-[minmax(0,1fr)] gap-x-12 gap-y-5 lg:grid-cols-[minmax(0,1fr)_23rem]"
        >
          <div className="min-w-0 max-lg:row-start-2">
            <BriefFieldsForm mayChange={mayChange} />
          </div>
          <div className="min-w-0 max-lg:sticky max-lg:top-0 max-lg:z-10 max-lg:row-start-1">
            <div className="grid gap-4 border-line max-lg:-mx-4 max-lg:bg-cloth max-lg:border-b max-lg:px-4 max-lg:py-2 lg:sticky lg:top-4">
              <DraftMargin
                record={record}
                reading={reading}
                effect={effect}
                mayChange={mayChange}
                isSaving={save.isPending}
                onUndo={() => {
                  save.reset();
                  form.reset(draftOf(record.body));
                }}
              />
              {save.isError ? (
                <Notice
                  tone="wrong"
                  live
                  title={isApiError(save.error, 'wrong_state') ? 'Saved by somebody else' : 'Not saved'}
                >
                  {errorSentence(save.error)}
                </Notice>
              ) : null}
            </div>
          </div>
          {effect.now === undefined ? null : (
            <div className="min-w-0 lg:col-span-2">
              <DraftYear preview={effect.now} />
            </div>
          )}
        </form>
      </DraftScopeProvider>
    </FormProvider>
  );
}

/** What the server found where this page did not, by field. */
function problemsOfSaving(error: unknown): DraftProblems {
  if (!isApiError(error)) return {};
  return Object.fromEntries(
    error.problems.map(({ path, message }) => [(path ?? '').replace(/^body\.body\.?/, ''), message]),
  );
}

function useWarningBeforeLeaving(isDirty: boolean): void {
  const [armed] = useState(() => (event: BeforeUnloadEvent) => event.preventDefault());
  useEffect(() => {
    if (!isDirty) return;
    window.addEventListener('beforeunload', armed);
    return () => window.removeEventListener('beforeunload', armed);
  }, [isDirty, armed]);
}
