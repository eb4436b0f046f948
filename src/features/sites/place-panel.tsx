import { useMutation } from '@tanstack/react-query';
import { useEffect } from 'react';
import { FormProvider, useForm } from 'react-hook-form';
import type { SiteRecord } from '../../contract/site-record.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { draftOfSite, patchOf, type SiteDraft, type SiteValues, siteResolver } from './site-draft.ts';
import { SiteFields } from './site-fields.tsx';
import type { ProgrammeKey } from './site-queries.ts';
import type { SiteDesk } from './use-site-desk.ts';

interface PlacePanelProps {
  readonly programme: ProgrammeKey;
  readonly record: SiteRecord;
  readonly desk: SiteDesk;
}

const PANEL = 'place';

/** Name, position, height, load and notes, saved together. */
export function PlacePanel({ programme, record, desk }: PlacePanelProps) {
  const form = useForm<SiteDraft, unknown, SiteValues>({
    defaultValues: draftOfSite(record.site, record.notes),
    resolver: siteResolver,
  });
  const { isDirty, dirtyFields } = form.formState;
  const { setTyping } = desk;
  useEffect(() => setTyping(PANEL, isDirty), [setTyping, isDirty]);
  // What others, or another panel, have stored shows here unless something is being typed.
  const { reset } = form;
  useEffect(() => {
    if (!isDirty) reset(draftOfSite(record.site, record.notes));
  }, [record, isDirty, reset]);
  const save = useMutation({
    mutationFn: (values: SiteValues) => desk.save(patchOf(values, dirtyFields)),
    onSuccess: (site, { notes }) => reset(draftOfSite(site, notes ?? '')),
  });
  return (
    <FormProvider {...form}>
      <form
        noValidate
        aria-labelledby="place-and-load"
        className="grid gap-4"
        onSubmit={form.handleSubmit((values) => save.mutate(values))}
      >
        <h2 id="place-and-load" className="text-name">
          Place and load
        </h2>
        <SiteFields programme={programme} />
        {save.isError && !isApiError(save.error, 'conflict') ? (
          <Notice tone="wrong" live title="Not saved">
            {errorSentence(save.error)}
          </Notice>
        ) : null}
        <div className="flex flex-wrap items-center gap-3">
          <Button type="submit" look="primary" busy={save.isPending} disabled={!isDirty}>
            Save place and load
          </Button>
          {isDirty ? (
            <Button look="quiet" onClick={() => reset(draftOfSite(record.site, record.notes))}>
              Take back what was typed
            </Button>
          ) : null}
          <span role="status" className="text-fine text-soft">
            {save.isSuccess && !isDirty ? 'Saved.' : ''}
          </span>
        </div>
      </form>
    </FormProvider>
  );
}
