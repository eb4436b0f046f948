import { useQuery } from '@tanstack/react-query';
import { useId, useState } from 'react';
import type { BriefVersionView } from '../../contract/briefs.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { moment, sentence, shortFingerprint } from '../../lib/format.ts';
import { useMedia } from '../../lib/use-media.ts';
import { type BriefKey, differenceQuery } from './brief-queries.ts';
import { usedWords } from './brief-words.ts';
import { ChangeList } from './change-list.tsx';

/** Where every column of a version finds room. */
const ROOMY = '(min-width: 48rem)';

/** Every version of the brief, and what changed between two of them. */
export function VersionsPanel({ briefKey, versions }: { briefKey: BriefKey; versions: readonly BriefVersionView[] }) {
  const isRoomy = useMedia(ROOMY);
  return (
    <section aria-labelledby="versions" className="min-w-0">
      <h2 id="versions" className="mb-1 text-name">
        Versions
      </h2>
      {isRoomy ? <VersionTable versions={versions} /> : <VersionList versions={versions} />}
      {versions.length > 1 ? <Difference briefKey={briefKey} versions={versions} /> : null}
    </section>
  );
}

function VersionTable({ versions }: { versions: readonly BriefVersionView[] }) {
  return (
    <table className="ruled">
      <caption className="sr-only">Versions of the brief, newest first</caption>
      <thead>
        <tr>
          <th scope="col">Version</th>
          <th scope="col">Saved</th>
          <th scope="col">Requirement</th>
          <th scope="col">Used</th>
          <th scope="col">Fingerprint</th>
        </tr>
      </thead>
      <tbody>
        {versions.map((version) => (
          <tr key={version.versionId}>
            <th scope="row" className="whitespace-nowrap">
              Version {version.version}
            </th>
            <td>
              {moment(version.madeAt)}
              <span className="block text-fine text-soft">{version.madeBy}</span>
            </td>
            <td>{sentence(version.sentence)}</td>
            <td>{usedWords(version)}</td>
            <td className="whitespace-nowrap">{shortFingerprint(version.hash)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function VersionList({ versions }: { versions: readonly BriefVersionView[] }) {
  return (
    <ul aria-label="Versions of the brief, newest first">
      {versions.map((version) => (
        <li key={version.versionId} className="border-t border-line py-2">
          <span className="font-medium">Version {version.version}</span>
          <span className="text-fine text-soft">
            {' '}
            {moment(version.madeAt)}, {version.madeBy}
          </span>
          <span className="block">{sentence(version.sentence)}</span>
          <span className="block text-fine text-soft">
            {usedWords(version)}; fingerprint {shortFingerprint(version.hash)}
          </span>
        </li>
      ))}
    </ul>
  );
}

function Difference({ briefKey, versions }: { briefKey: BriefKey; versions: readonly BriefVersionView[] }) {
  const newest = versions[0]?.version ?? 1;
  const [chosenFrom, setFrom] = useState<number | null>(null);
  const [chosenTo, setTo] = useState<number | null>(null);
  const between = { from: chosenFrom ?? newest - 1, to: chosenTo ?? newest };
  const difference = useQuery(differenceQuery(briefKey, between));
  const numbers = versions.map(({ version }) => version);
  return (
    <div className="mt-5">
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <h3 className="max-sm:w-full">What changed</h3>
        <VersionChoice label="from" value={between.from} numbers={numbers} onChange={setFrom} />
        <VersionChoice label="to" value={between.to} numbers={numbers} onChange={setTo} />
      </div>
      {difference.isError ? <p role="alert">{errorSentence(difference.error)}</p> : null}
      {difference.data && difference.data.changes.length === 0 ? (
        <p className="mt-1 text-soft">The two versions say the same.</p>
      ) : null}
      {difference.data && difference.data.changes.length > 0 ? (
        <ChangeList changes={difference.data.changes} label={`From version ${between.from} to version ${between.to}`} />
      ) : null}
    </div>
  );
}

interface VersionChoiceProps {
  readonly label: string;
  readonly value: number;
  readonly numbers: readonly number[];
  readonly onChange: (version: number) => void;
}

function VersionChoice({ label, value, numbers, onChange }: VersionChoiceProps) {
  const id = useId();
  return (
    <span className="flex items-center gap-2">
      <label htmlFor={id} className="text-fine text-soft">
        {label}
      </label>
      <select
        id={id}
        value={value}
        onChange={({ currentTarget }) => onChange(Number(currentTarget.value))}
        className="min-h-8 rounded-md border border-[#918a78] bg-paper px-2"
      >
        {numbers.map((each) => (
          <option key={each} value={each}>
            version {each}
          </option>
        ))}
      </select>
    </span>
  );
}
