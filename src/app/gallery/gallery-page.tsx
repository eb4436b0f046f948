import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import { getRunHours } from '../../contract/run-hours.ts';
import { LedgerPanel } from '../../features/runs/ledger-panel.tsx';
import { placesOfMap } from '../../features/runs/map-places.ts';
import { PlaceHeading, ScoreBlock } from '../../features/runs/place-heading.tsx';
import { PlaceList } from '../../features/runs/place-list.tsx';
import {
  CautionsNote,
  GradeNote,
  SpellNote,
  VerdictNote,
  WaterElectricityNote,
} from '../../features/runs/place-notes.tsx';
import { ScoreArithmetic } from '../../features/runs/score-arithmetic.tsx';
import { YearStrip } from '../../features/runs/year-strip.tsx';
import { DepressionTable } from '../../features/weather/depression-table.tsx';
import { DesignTable } from '../../features/weather/design-table.tsx';
import { Findings } from '../../features/weather/findings.tsx';
import { HoursAccount } from '../../features/weather/hours-account.tsx';
import { ReadingSteps } from '../../features/weather/reading-steps.tsx';
import { WeatherTable } from '../../features/weather/weather-table.tsx';
import { apiKey } from '../../lib/api-query.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { Button } from '../../ui/button.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { Progress } from '../../ui/progress.tsx';
import { TextField } from '../../ui/text-field.tsx';
import {
  fixtureFiles,
  fixtureHours,
  fixtureId,
  fixtureMap,
  fixturePlace,
  fixtureRecord,
  fixtureTeam,
} from './fixtures.ts';

/** Every component on invented data, for looking at; only in development. */
export function GalleryPage() {
  const [client] = useState(() => {
    const made = new QueryClient({ defaultOptions: { queries: { staleTime: Number.POSITIVE_INFINITY } } });
    const params = { teamId: fixtureTeam.teamId, runId: fixtureId(5) };
    made.setQueryData(apiKey(getRunHours, { params, query: {} }), fixtureHours());
    return made;
  });
  return (
    <QueryClientProvider client={client}>
      <main className="mx-auto grid max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-12 p-6">
        <PageTitle>Gallery</PageTitle>
        <h1 className="text-title">Gallery</h1>
        <UiParts />
        <WeatherParts />
        <RunParts />
      </main>
    </QueryClientProvider>
  );
}

function Scene({ name, children }: { name: string; children: ReactNode }) {
  return (
    <section className="border-t border-ink pt-2">
      <h2 className="mb-4 text-fine text-soft">{name}</h2>
      {children}
    </section>
  );
}

function UiParts() {
  const [text, setText] = useState('');
  return (
    <Scene name="Parts">
      <div className="grid max-w-xl gap-4">
        <div className="flex flex-wrap gap-2">
          <Button look="primary">Accept</Button>
          <Button>Withdraw</Button>
          <Button look="quiet">Clear the list</Button>
          <Button look="primary" busy>
            At work
          </Button>
          <CopyButton text="9c41e07a" what="the fingerprint" />
        </div>
        <TextField label="Reason" value={text} onChange={setText} hint="Kept with the file." />
        <TextField label="E-mail" value={text} onChange={setText} problem="Type an e-mail address." />
        <Notice title="In review">Accepting puts the station on the map.</Notice>
        <Notice tone="attention">Too many tries.</Notice>
        <Notice tone="wrong" actions={<Button>Try again</Button>}>
          The server did not answer.
        </Notice>
        <Progress label="Sending" share={0.64} />
        <Progress label="Sending" share={null} />
      </div>
    </Scene>
  );
}

function WeatherParts() {
  const [review] = fixtureFiles();
  if (!review) return null;
  const record = fixtureRecord(review);
  return (
    <Scene name="Weather">
      <div className="grid grid-cols-[minmax(0,1fr)] gap-8">
        <ReadingSteps file={{ ...review, status: 'reading', step: 'reducing' }} />
        <WeatherTable teamId={fixtureTeam.teamId} items={fixtureFiles()} />
        <Findings findings={record.findings} asks={record.asks} isReading={false} />
        {record.facts ? (
          <>
            <DepressionTable facts={record.facts} />
            <HoursAccount facts={record.facts} />
            <DesignTable design={record.facts.design} isTypical />
          </>
        ) : null}
      </div>
    </Scene>
  );
}

function RunParts() {
  const map = fixtureMap();
  const [chosenId, setChosenId] = useState(map.stations[0]?.id ?? null);
  const [typed, setTyped] = useState('');
  const { stations } = placesOfMap(map);
  const station = map.stations.find(({ id }) => id === chosenId);
  const figures = stations.find(({ id }) => id === chosenId);
  if (!station || !figures) return null;
  const place = fixturePlace(station);
  return (
    <Scene name="Runs">
      <div className="mb-8 grid grid-cols-[14rem_18.5rem] gap-8">
        <PlaceList
          kind="station"
          places={stations}
          chosenId={chosenId}
          onChoose={setChosenId}
          typed={typed}
          onType={setTyped}
          colourOf={() => null}
          isBehind={false}
        />
        <div className="grid gap-3">
          <PlaceHeading place={place} teamId={fixtureTeam.teamId} />
          <ScoreBlock place={place} figures={figures} isDraft={false} />
          {place.shown ? <LedgerPanel ledger={place.shown.ledger} /> : null}
        </div>
      </div>
      <YearStrip place={place} teamId={fixtureTeam.teamId} mayExport onListDay={() => undefined} />
      <div className="mt-8 grid gap-8">
        {place.shown ? (
          <>
            <ScoreArithmetic shown={place.shown} />
            <WaterElectricityNote shown={place.shown} loadKw={null} />
            <VerdictNote shown={place.shown} />
            <SpellNote shown={place.shown} />
            <CautionsNote shown={place.shown} />
          </>
        ) : null}
        <GradeNote place={place} />
      </div>
    </Scene>
  );
}
