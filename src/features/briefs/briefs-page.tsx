import { useMutation, useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { type BriefVersionView, makeBrief, type Preset } from '../../contract/briefs.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { type FormProblems, noProblems, problemsOfError, problemsOfIssues } from '../../lib/form-problems.ts';
import { moment, sentence } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { briefsQuery, type ProgrammeKey, presetsQuery } from './brief-queries.ts';
import { mayChangeBriefs, usedWords } from './brief-words.ts';

/** The programme's briefs, and the presets that others begin from. */
export function BriefsPage() {
  const { teamId, role, programmes } = useTeam();
  const { programmeId = '' } = useParams();
  const key = { teamId, programmeId };
  const briefs = useQuery(briefsQuery(key));
  const presets = useQuery(presetsQuery(teamId));
  const [preset, setPreset] = useState<Preset | null>(null);
  const mayChange = mayChangeBriefs(role);
  return (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Briefs</PageTitle>
      <header className="mb-5">
        <p className="text-fine text-soft">{programmes.find(({ id }) => id === programmeId)?.name}</p>
        <h1 className="text-title">Briefs</h1>
        <p className="mt-1 text-soft">Written cooling requirements; every change makes a new version.</p>
      </header>
      {briefs.isPending ? <Loading what="the briefs" /> : null}
      {briefs.isError ? (
        <Notice tone="wrong" live actions={<Button onClick={() => briefs.refetch()}>Try again</Button>}>
          {errorSentence(briefs.error)}
        </Notice>
      ) : null}
      <ul className="mb-10">
        {briefs.data?.items.map((brief) => (
          <BriefItem key={brief.briefId} programme={key} brief={brief} />
        ))}
      </ul>
      <section aria-labelledby="presets">
        <h2 id="presets" className="mb-1 text-name">
          Presets
        </h2>
        <p className="mb-2 text-soft">
          Requirement sets in customary use, to begin a brief from. “Ours” can be changed.
        </p>
        <ul className="grid gap-x-10 lg:grid-cols-2">
          {presets.data?.items.map((each) => (
            <PresetItem key={each.id} preset={each} onBegin={mayChange ? () => setPreset(each) : null} />
          ))}
        </ul>
      </section>
      {preset ? <MakeBriefDialog programme={key} preset={preset} onClose={() => setPreset(null)} /> : null}
    </div>
  );
}

function BriefItem({ programme, brief }: { programme: ProgrammeKey; brief: BriefVersionView }) {
  const { teamId, programmeId } = programme;
  return (
    <li className="border-t border-line py-3">
      <h2 className="text-name">
        <Link to={paths.brief.to({ teamId, programmeId, briefId: brief.briefId })}>{brief.name}</Link>
      </h2>
      <p className="max-w-[80ch]">{sentence(brief.sentence)}</p>
      <p className="text-fine text-soft">
        Version {brief.version}, {brief.presetName}, saved by {brief.madeBy} on {moment(brief.madeAt)};{' '}
        {usedWords(brief)}. <Link to={paths.map.to(programme, undefined, brief.briefId)}>Show on the map</Link>
      </p>
    </li>
  );
}

function PresetItem({ preset, onBegin }: { preset: Preset; onBegin: (() => void) | null }) {
  return (
    <li className="border-t border-line py-3">
      <h3 className="text-body text-ink">{preset.name}</h3>
      <p>{sentence(preset.sentence.charAt(0).toUpperCase() + preset.sentence.slice(1))}</p>
      <p className="text-fine text-soft">{preset.use}</p>
      {onBegin === null ? null : (
        <Button look="quiet" onClick={onBegin}>
          Begin a brief from {preset.name}
        </Button>
      )}
    </li>
  );
}

interface MakeBriefDialogProps {
  readonly programme: ProgrammeKey;
  readonly preset: Preset;
  readonly onClose: () => void;
}

/** Asks for the name of the brief, then opens it. */
function MakeBriefDialog({ programme, preset, onClose }: MakeBriefDialogProps) {
  const { teamId, programmeId } = programme;
  const navigate = useNavigate();
  const [name, setName] = useState(preset.name);
  const [problems, setProblems] = useState<FormProblems>(noProblems);
  const make = useMutation({
    mutationFn: (body: { name: string; preset: string }) =>
      call(makeBrief, { params: { teamId, programmeId }, query: {}, body }),
    onSuccess: ({ briefId }) => navigate(paths.brief.to({ teamId, programmeId, briefId })),
    onError: (error) => setProblems(problemsOfError(error) ?? { fields: {}, form: [errorSentence(error)] }),
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const parsed = makeBrief.body.schema.safeParse({ name, preset: preset.id });
    setProblems(parsed.success ? noProblems : problemsOfIssues(parsed.error.issues));
    if (parsed.success) make.mutate(parsed.data);
  };
  return (
    <Dialog isOpen onClose={onClose} title={`A brief from ${preset.name}`}>
      <form noValidate onSubmit={submit} className="grid gap-4">
        <p>Every accepted weather year of the team is judged by it. Its fields can be changed afterwards.</p>
        {problems.form.map((message) => (
          <Notice key={message} tone="wrong" live>
            {message}
          </Notice>
        ))}
        <TextField label="Name" value={name} onChange={setName} problem={problems.fields.name} autoFocus />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" look="primary" busy={make.isPending}>
            Make the brief
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
