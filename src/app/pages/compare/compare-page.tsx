import { useQuery } from '@tanstack/react-query';
import { Link, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { mapQuery } from '../../../features/runs/run-queries.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { sentence } from '../../../lib/format.ts';
import { PageTitle } from '../../../lib/page-title.tsx';
import { paths } from '../../../lib/paths.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { type CompareAddress, kindOfCompare, readCompare } from './compare-address.ts';
import { CompareChoice } from './compare-choice.tsx';
import { CompareDepressions } from './compare-depressions.tsx';
import { CompareCloths, CompareCurves } from './compare-pictures.tsx';
import { CompareRanking } from './compare-ranking.tsx';
import { ArithmeticTable, FigureTable } from './figure-table.tsx';
import { type CompareColumn, useCompareColumns } from './use-compare-columns.ts';

/** Places, briefs or years side by side; the address says which. */
export function ComparePage() {
  const { teamId, programmes } = useTeam();
  const { programmeId = '' } = useParams();
  const [search] = useSearchParams();
  const navigate = useNavigate();
  const ids = { teamId, programmeId };
  const address = readCompare(search);
  const kind = kindOfCompare(address);
  const briefId = address.briefs[0] ?? null;
  const map = useQuery(mapQuery({ ...ids, briefId }));
  const { columns, isPending, error } = useCompareColumns(ids, address);
  const change = (next: CompareAddress): void => {
    navigate(paths.compare.to(ids, next));
  };
  return (
    <div className="mx-auto w-full max-w-[84rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Compare</PageTitle>
      <header className="mb-4">
        <p className="text-fine text-soft">{programmes.find(({ id }) => id === programmeId)?.name}</p>
        <h1 className="text-title">Compare</h1>
        <p className="mt-1 max-w-[80ch] text-soft">{subject(kind, columns)}</p>
      </header>
      {map.isPending ? <Loading what="the places" /> : null}
      {map.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => map.refetch()}>Try again</Button>}>
          {errorSentence(map.error)}
        </Notice>
      ) : null}
      {map.data ? (
        <CompareChoice
          ids={ids}
          map={map.data}
          address={address}
          kind={kind}
          place={columns[0]?.place ?? null}
          onChange={change}
        />
      ) : null}
      {error === null ? null : (
        <Notice tone="wrong" live>
          {errorSentence(error)}
        </Notice>
      )}
      {isPending && address.places.length > 0 ? <Loading what="what is compared" /> : null}
      {columns.length > 0 && !isPending ? (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-8">
          <Chosen columns={columns} ids={ids} onChange={change} />
          <FigureTable columns={columns} />
          {kind === 'places' && columns.length > 1 ? (
            <CompareRanking ids={{ ...ids, briefId }} placeIds={address.places.map(({ id }) => id)} />
          ) : null}
          <ArithmeticTable columns={columns} />
          <CompareCloths columns={columns} teamId={teamId} />
          <CompareCurves columns={columns} />
          {kind === 'briefs' ? null : <CompareDepressions columns={columns} teamId={teamId} />}
        </div>
      ) : null}
    </div>
  );
}

function subject(kind: ReturnType<typeof kindOfCompare>, columns: readonly CompareColumn[]): string {
  const [first] = columns;
  if (first === undefined) return 'Choose what is to stand side by side.';
  const brief = `“${first.place.brief.name}”, version ${first.place.brief.version}: ${sentence(first.place.brief.sentence)}`;
  if (kind === 'briefs')
    return `${first.place.site?.name ?? first.place.station.name} under each brief. Differences are against the first.`;
  return `Under ${brief} Differences are against the first.`;
}

function Chosen({
  columns,
  ids,
  onChange,
}: {
  columns: readonly CompareColumn[];
  ids: { teamId: string; programmeId: string };
  onChange: (address: CompareAddress) => void;
}) {
  return (
    <ul aria-label="Side by side" className="flex flex-wrap gap-x-6 gap-y-2">
      {columns.map(({ key, title, note, shown, place, remove }) => (
        <li key={key} className="border-l-2 border-ink pl-3">
          <p className="text-name">{title}</p>
          <p className="text-fine text-soft">{note}</p>
          <p>
            {shown?.score ?? 'no score'}
            {shown?.words ? <span className="text-soft"> ({shown.words} of the demand)</span> : null}, grade{' '}
            {place.grade}
          </p>
          <p className="text-fine">
            {place.site === null ? (
              <Link to={paths.map.to(ids, place.station.id, place.brief.briefId)}>On the map</Link>
            ) : (
              <Link to={paths.site.to({ ...ids, siteId: place.site.id })}>The site</Link>
            )}{' '}
            <Button look="quiet" aria-label={`Take ${title} out`} onClick={() => onChange(remove)}>
              Take out
            </Button>
          </p>
        </li>
      ))}
    </ul>
  );
}
