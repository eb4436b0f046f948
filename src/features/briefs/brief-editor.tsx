import { zodResolver } from '@hookform/resolvers/zod';
import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { FormProvider, useForm, useWatch } from 'react-hook-form';
import type { BriefVersionRecord } from '../../contract/briefs.ts';
import { briefDifference } from '../../engine/brief/brief-difference.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { moment } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { useMedia, WIDE } from '../../lib/use-media.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { BriefFieldsForm } from './brief-fields-form.tsx';
import { type BriefKey, presetsQuery } from './brief-queries.ts';
import { mayChangeBriefs } from './brief-words.ts';
import { DraftForm, type DraftProblems, type DraftValues, draftOf, readDraftValues, restoredDraft } from './draft.ts';
import { DraftScopeProvider } from './draft-context.ts';
import { DraftMargin } from './draft-margin.tsx';
import { DraftYear } from './draft-year.tsx';
import { EffectDetails } from './effect-details.tsx';
import type { DraftKey, KeptDraft } from './kept-draft.ts';
import { useEffectOfDraft } from './use-effect-of-draft.ts';
import { useKeptDraft } from './use-kept-draft.ts';
import { problemsOfSaving, useSaveDraft } from './use-save-draft.ts';

interface BriefEditorProps {
  readonly briefKey: BriefKey;
  /** The version that the draft begins from. */
  readonly record: BriefVersionRecord;
  readonly draftKey: DraftKey;
  /** A draft that was left here; null where none was. */
  readonly kept: KeptDraft | null;
  readonly onSaved: (version: number) => void;
}

/** The brief as a form, with what it makes of an example year beside it. */
export function BriefEditor({ briefKey, record, draftKey, kept, onSaved }: BriefEditorProps) {
  const { role } = useTeam();
  const mayChange = mayChangeBriefs(role);
  const savedVersion = record.version.version;
  const isWide = useMedia(WIDE);
  const presets = useQuery(presetsQuery(briefKey.teamId));
  const form = useForm<DraftValues>({
    defaultValues: kept === null ? draftOf(record.body) : restoredDraft(kept.values, record.body),
    resolver: zodResolver(DraftForm),
    shouldFocusError: true,
  });
  const values = useWatch({ control: form.control });
  const reading = useMemo(() => readDraftValues(values), [values]);
  const changes = useMemo(() => (reading.ok ? briefDifference(record.body, reading.brief) : null), [reading, record]);
  const isChanged = changes === null || changes.length > 0;
  const forget = useKeptDraft({
    key: draftKey,
    basedOn: savedVersion,
    values,
    isChanged: mayChange && isChanged,
  });
  const effect = useEffectOfDraft(briefKey, { record, reading });
  const save = useSaveDraft(briefKey, {
    basedOn: savedVersion,
    onSaved: (version) => {
      forget();
      onSaved(version);
    },
  });
  const problems: DraftProblems = { ...problemsOfSaving(save.error), ...(reading.ok ? {} : reading.problems) };
  const preset = presets.data?.items.find(({ id }) => id === record.body.preset)?.body ?? null;
  const undo = () => {
    save.reset();
    form.reset(draftOf(record.body));
  };
  return (
    <FormProvider {...form}>
      <DraftScopeProvider value={{ problems, preset }}>
        <form
          noValidate
          onSubmit={form.handleSubmit((draft) => save.mutate(draft))}
          className="grid grid-cols-[minmax(0,1fr)] gap-x-12 gap-y-5 lg:grid-cols-[minmax(0,1fr)_26rem]"
        >
          <div className="grid min-w-0 content-start gap-5 max-lg:row-start-2">
            {kept === null ? null : <KeptNotice kept={kept} isChanged={isChanged} onDrop={undo} />}
            <BriefFieldsForm mayChange={mayChange} />
          </div>
          <div className="min-w-0 max-lg:sticky max-lg:top-0 max-lg:z-10 max-lg:row-start-1">
            <div className="grid gap-3 border-line max-lg:-mx-4 max-lg:border-b max-lg:bg-cloth max-lg:px-4 max-lg:py-2 lg:sticky lg:top-4 lg:max-h-[calc(100dvh-2rem)] lg:overflow-y-auto lg:pb-2">
              <DraftMargin
                record={record}
                changes={changes}
                problems={problems}
                effect={effect}
                mayChange={mayChange}
                isSaving={save.isPending}
                onUndo={undo}
              />
              <SaveProblem error={save.error} />
              {isWide ? <EffectDetails effect={effect} changes={changes} savedVersion={savedVersion} /> : null}
            </div>
          </div>
          {isWide ? null : <EffectDetails effect={effect} changes={changes} savedVersion={savedVersion} />}
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

function SaveProblem({ error }: { error: unknown }) {
  if (error === null) return null;
  return (
    <Notice tone="wrong" live title={isApiError(error, 'wrong_state') ? 'Saved by somebody else' : 'Not saved'}>
      {errorSentence(error)}
    </Notice>
  );
}

/** Says that the form shows a draft that was left here, until it is dropped or nothing of it is left. */
function KeptNotice({ kept, isChanged, onDrop }: { kept: KeptDraft; isChanged: boolean; onDrop: () => void }) {
  const [isDropped, setDropped] = useState(false);
  if (isDropped || !isChanged) return null;
  const drop = () => {
    setDropped(true);
    onDrop();
  };
  return (
    <Notice live actions={<Button onClick={drop}>Drop the draft, show version {kept.basedOn}</Button>}>
      This is your draft of {moment(kept.keptAt)}, kept on this device and not saved.
    </Notice>
  );
}
