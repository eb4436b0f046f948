import type { Knex } from 'knex';
import type { BriefBasis } from '#contract/runs.ts';
import { briefSentence } from '#engine/brief/brief-sentence.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { AppError } from '../../http/app-error.ts';
import { findProgrammeBrief, type ProgrammeBrief } from '../briefs/brief-read-model.ts';

/** The brief that a programme's screens are drawn under. @throws AppError not_found without the programme or a brief of it */
export async function briefOfProgramme(
  db: Knex,
  programme: { teamId: string; programmeId: string; briefId?: string | undefined },
): Promise<ProgrammeBrief> {
  const brief = await findProgrammeBrief(db, programme);
  if (brief === null)
    throw new AppError('not_found', 'There is no such programme in this team, or it has no brief yet.');
  return brief;
}

export function presentBriefBasis(brief: ProgrammeBrief): BriefBasis {
  return {
    briefId: brief.briefId,
    briefVersionId: brief.briefVersionId,
    name: brief.name,
    version: brief.version,
    preset: brief.body.preset,
    sentence: briefSentence(brief.body),
    methodVersion: METHOD_VERSION,
  };
}
