import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { emptyDraft, readClimateDraft } from './climate-draft.ts';
import { ClimateForm } from './climate-form.tsx';
import { ClimatePreview } from './climate-preview.tsx';
import { ClimateSources } from './climate-sources.tsx';
import { SaveDerived } from './save-derived.tsx';
import { recordQuery } from './weather-queries.ts';
import { mayChangeWeather, recordTitle } from './weather-words.ts';

/** Makes a year of another climate out of an accepted one. */
export function ClimatePage() {
  const { teamId } = useTeam();
  const { fileId = '' } = useParams();
  const record = useQuery(recordQuery(teamId, fileId));
  return (
    <article className="mx-auto w-full max-w-[76rem] flex-1 bg-paper px-8 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Change the climate</PageTitle>
      {record.isPending ? <Loading what="the weather year" /> : null}
      {record.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => record.refetch()}>Try again</Button>}>
          {errorSentence(record.error)}
        </Notice>
      ) : null}
      {record.data ? <Climate record={record.data} /> : null}
    </article>
  );
}

function Climate({ record }: { record: WeatherFileRecord }) {
  const { teamId, role } = useTeam();
  const { file } = record;
  const why = whyNot(record, mayChangeWeather(role));
  return (
    <>
      <Link to={paths.weatherFile.to(teamId, file.id)} className="mb-3 inline-block text-fine">
        {recordTitle(file)}
      </Link>
      <h1 className="text-title">Change the climate of this year</h1>
      <p className="mt-1.5 mb-6 max-w-[70ch] text-soft">
        Its hours are shifted and stretched month by month (Belcher, Hacker and Powell, 2005). What you save is a
        derived year: tested against every brief, always shown beside this one, in no score of the station.
      </p>
      {why === null ? <Editor fileId={file.id} /> : <Notice tone="attention">{why}</Notice>}
    </>
  );
}

function whyNot({ file }: WeatherFileRecord, mayChange: boolean): string | null {
  if (!mayChange) return 'Engineers and leads of the team make derived years.';
  if (file.parent !== null) return 'This year is derived itself. Change the climate of the year that it came from.';
  return file.status === 'accepted' ? null : 'Only an accepted weather year can be derived from.';
}

function Editor({ fileId }: { fileId: string }) {
  const [draft, setDraft] = useState(emptyDraft);
  const reading = readClimateDraft(draft);
  const change = reading.ok ? { humidityRule: draft.humidityRule, monthly: [...reading.monthly] } : null;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-x-12 gap-y-8 lg:grid-cols-[minmax(0,26rem)_minmax(0,1fr)]">
      <ClimateForm
        draft={draft}
        onChange={setDraft}
        problems={reading.ok ? [] : reading.problems}
        sources={<ClimateSources humidityRule={draft.humidityRule} onDraft={setDraft} />}
      />
      <div className="grid min-w-0 content-start gap-8">
        <ClimatePreview fileId={fileId} change={change} changes={reading.ok && reading.changes} />
        <SaveDerived fileId={fileId} change={reading.ok && reading.changes ? change : null} />
      </div>
    </div>
  );
}
