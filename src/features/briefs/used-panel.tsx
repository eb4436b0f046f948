import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { BriefVersionRecord } from '../../contract/briefs.ts';
import { number } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import type { BriefKey } from './brief-queries.ts';
import { usedWords } from './brief-words.ts';

/** More are listed when somebody asks for them. */
const FIRST_LISTED = 60;

/** The stations that are judged by the version in the form. */
export function UsedPanel({ briefKey, record }: { briefKey: BriefKey; record: BriefVersionRecord }) {
  const { version, stations, newest } = record;
  const [isWhole, setWhole] = useState(false);
  const listed = isWhole ? stations : stations.slice(0, FIRST_LISTED);
  const link = (stationId?: string) => paths.map.to(briefKey, stationId, briefKey.briefId);
  return (
    <section aria-labelledby="used">
      <h2 id="used" className="mb-1 text-name">
        Where version {version.version} is used
      </h2>
      <p className="mb-2">
        {usedWords(version)}. {version.version === newest ? <Link to={link()}>Show this brief on the map</Link> : null}
      </p>
      <ul className="columns-2 gap-x-6 sm:columns-3">
        {listed.map((station) => (
          <li key={station.id}>
            {version.version === newest ? <Link to={link(station.id)}>{station.name}</Link> : station.name}
            {station.judged ? '' : ', not judged'}
          </li>
        ))}
      </ul>
      {listed.length < stations.length ? (
        <Button look="quiet" onClick={() => setWhole(true)}>
          List all {number(stations.length)} stations
        </Button>
      ) : null}
    </section>
  );
}
